import { provideHttpClient, withInterceptors } from '@angular/common/http';
import { HttpTestingController, provideHttpClientTesting } from '@angular/common/http/testing';
import { ChangeDetectionStrategy, Component, inject } from '@angular/core';
import { TestBed } from '@angular/core/testing';
import { Router, provideRouter } from '@angular/router';
import type { StudyHead } from '@shared/contract';
import { Subject } from 'rxjs';
import { apiInterceptor } from '../http/api-interceptor';
import { LIVE_STREAM } from '../live/live-updates';
import { signedIn } from '../session/guards';
import { StudyContext } from '../study/study-context';
import { TitleBlock } from '../title-block';
import { Shell } from './shell';

const ran: string[] = [];

@Component({ changeDetection: ChangeDetectionStrategy.OnPush, template: '<h1>Requirements of Petrel</h1>' })
class Page {
  constructor() {
    inject(TitleBlock).register({
      name: () => 'VEH-001',
      actions: () => [
        { label: 'Propose a change', main: true, run: () => ran.push('propose') },
        { label: 'History', disabled: true, reason: 'Nothing has happened yet.', run: () => ran.push('history') },
      ],
    });
  }
}

@Component({ changeDetection: ChangeDetectionStrategy.OnPush, template: 'Sign in' })
class SignInPage {}

const HEAD = {
  study: { name: 'Petrel, nuclear-electric tug', key: 'PETREL' },
  standpoint: { text: 'now', label: 'Now', revision: 418, editable: true },
  revision: 418,
  baselineInForce: { key: 'B2', name: 'System requirements review', review: 'SRR' },
  baselines: [],
  drafts: [],
  provedAt: '2026-12-01T12:00:00Z',
  verdicts: 42,
  roles: ['requirements-owner', 'reader'],
} as unknown as StudyHead;

describe('Shell', () => {
  async function shell(url: string) {
    ran.length = 0;
    const stream = new Subject<string>();
    TestBed.configureTestingModule({
      providers: [
        provideRouter([
          { path: 'sign-in', component: SignInPage },
          { path: 'studies/:study', canActivate: [signedIn], children: [{ path: 'requirements', component: Page }] },
        ]),
        provideHttpClient(withInterceptors([apiInterceptor])),
        provideHttpClientTesting(),
        { provide: LIVE_STREAM, useValue: () => stream },
      ],
    });
    const answers = TestBed.inject(HttpTestingController);
    const fixture = TestBed.createComponent(Shell);
    fixture.detectChanges();
    const host: HTMLElement = fixture.nativeElement;
    const settle = async (): Promise<void> => {
      await new Promise((resolve) => setTimeout(resolve));
      fixture.detectChanges();
    };
    const arriving = TestBed.inject(Router).navigateByUrl(url);
    await settle();
    return { host, answers, stream, settle, arriving, text: () => host.textContent?.replaceAll(/\s+/g, ' ') ?? '' };
  }

  const person = { id: 'p1', name: 'Ines Okafor', email: 'ines@example.org', administrator: false };

  async function inPetrel(url = '/studies/PETREL/requirements') {
    const opened = await shell(url);
    opened.answers.expectOne('/api/session').flush({ person, memberships: [], demonstration: false });
    await opened.arriving;
    await opened.settle();
    const reads = opened.answers.match((request) => request.url === '/api/studies/PETREL');
    reads.at(-1)?.flush(HEAD);
    await opened.settle();
    return { ...opened, reads };
  }

  it('says in the title block which study, standpoint, baseline, sheet and role this is', async () => {
    const { host, text } = await inPetrel();
    const block = host.querySelector('dp-title-block-bar')?.textContent?.replaceAll(/\s+/g, ' ') ?? '';
    for (const part of [
      'Petrel, nuclear-electric tug',
      'Now · r418',
      'B2 · System requirements review',
      '42 verdicts',
      'VEH-001',
    ]) {
      expect(block).toContain(part);
    }
    expect(block).toContain('Requirements owner, reader');
    expect(host.querySelector('.tabs [aria-current="page"]')?.textContent).toBe('Requirements');
    expect(text()).toContain('Ines Okafor');
  });

  it('puts the main action last, runs it, and says why another cannot be done', async () => {
    const { host, settle, text } = await inPetrel();
    const buttons = [...host.querySelectorAll<HTMLButtonElement>('.action')];
    expect(buttons.map((button) => button.textContent?.trim())).toEqual(['History', 'Propose a change']);
    buttons[0]?.click();
    buttons[1]?.click();
    await settle();
    expect(ran).toEqual(['propose']);
    expect(text()).toContain('Nothing has happened yet.');
  });

  it('reads from the standpoint of the address and keeps it in the section tabs', async () => {
    const { host, reads } = await inPetrel('/studies/PETREL/requirements?at=baseline:B2');
    expect(reads.at(-1)?.request.params.get('at')).toBe('baseline:B2');
    expect(host.querySelector<HTMLAnchorElement>('.tabs a')?.getAttribute('href')).toBe(
      '/studies/PETREL/overview?at=baseline:B2',
    );
    expect(host.querySelector('.elsewhere')?.textContent).toContain('Baseline B2');
  });

  it('tells of an edit by somebody else and moves the revision on, without reload', async () => {
    const { stream, settle, text } = await inPetrel();
    const moved = [{ key: 'VEH-002', from: 'compliant', to: 'non-compliant' }];
    stream.next(
      JSON.stringify({ revision: 419, by: 'M. Sato', byId: 'p2', at: '', summary: 'Set specific impulse', moved }),
    );
    await settle();
    expect(TestBed.inject(StudyContext).readKey()).toEqual({ study: 'PETREL', at: undefined, revision: 419 });
    expect(text()).toContain('M. Sato, r419: Set specific impulse. VEH-002 is now non-compliant.');
  });

  it('sends whoever is not signed in to sign in, and remembers where they were going', async () => {
    const { answers, arriving, settle, host } = await shell('/studies/PETREL/requirements');
    answers.expectOne('/api/session').flush({ code: 'not-signed-in' }, { status: 401, statusText: 'no' });
    await arriving;
    await settle();
    expect(TestBed.inject(Router).url).toBe('/sign-in?from=%2Fstudies%2FPETREL%2Frequirements');
    expect(host.querySelector('dp-title-block-bar')).toBeNull();
  });
});
