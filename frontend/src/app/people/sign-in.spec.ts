import { provideHttpClient, withInterceptors } from '@angular/common/http';
import { HttpTestingController, provideHttpClientTesting } from '@angular/common/http/testing';
import { TestBed } from '@angular/core/testing';
import { Router, provideRouter } from '@angular/router';
import { apiInterceptor } from '../core/http/api-interceptor';
import { SignIn } from './sign-in';

describe('SignIn', () => {
  function page(from?: string) {
    TestBed.configureTestingModule({
      providers: [
        provideRouter([{ path: '**', children: [] }]),
        provideHttpClient(withInterceptors([apiInterceptor])),
        provideHttpClientTesting(),
      ],
    });
    const fixture = TestBed.createComponent(SignIn);
    if (from !== undefined) fixture.componentRef.setInput('from', from);
    fixture.detectChanges();
    const host: HTMLElement = fixture.nativeElement;
    const settle = async (): Promise<void> => {
      await new Promise((resolve) => setTimeout(resolve));
      fixture.detectChanges();
    };
    const type = (kind: string, text: string): void => {
      const box = host.querySelector<HTMLInputElement>(`input[type="${kind}"]`);
      if (box === null) throw new Error(`no ${kind} field`);
      box.value = text;
      box.dispatchEvent(new Event('input'));
    };
    const send = async (): Promise<void> => {
      host.querySelector('form')?.dispatchEvent(new Event('submit'));
      await settle();
    };
    return { host, settle, type, send, answers: TestBed.inject(HttpTestingController) };
  }

  const session = {
    person: { id: 'p1', name: 'Ines', email: 'i@example.org', administrator: false },
    memberships: [],
    demonstration: false,
  };

  it('says beside each field what is missing and sends nothing', async () => {
    const { host, send, answers } = page();
    await send();
    expect([...host.querySelectorAll('[role="alert"]')].map((message) => message.textContent)).toEqual([
      'Type the mail address you were invited with.',
      'Type your password.',
    ]);
    answers.expectNone('/api/session');
  });

  it('keeps what was typed when the server refuses it', async () => {
    const { host, type, send, settle, answers } = page();
    type('email', ' i@example.org ');
    type('password', 'not the one');
    await send();
    const request = answers.expectOne('/api/session');
    expect(request.request.body).toEqual({ email: 'i@example.org', password: 'not the one' });
    request.flush(
      { title: 'Not signed in', detail: 'Address or password is wrong.' },
      { status: 401, statusText: 'no' },
    );
    await settle();
    expect(host.querySelector('.note.bad')?.textContent).toContain('Address or password is wrong.');
    expect(host.querySelector<HTMLInputElement>('input[type="password"]')?.value).toBe('not the one');
  });

  it.each([
    ['/studies/PETREL/requirements?at=baseline:B2', '/studies/PETREL/requirements?at=baseline:B2'],
    ['//elsewhere.example', '/'],
    ['https://elsewhere.example', '/'],
    ['/\\elsewhere.example', '/'],
  ])('goes from %s to %s', async (from, to) => {
    const { type, send, settle, answers } = page(from);
    type('email', 'i@example.org');
    type('password', 'right');
    await send();
    answers.expectOne('/api/session').flush(session);
    await settle();
    expect(TestBed.inject(Router).url).toBe(to);
  });
});
