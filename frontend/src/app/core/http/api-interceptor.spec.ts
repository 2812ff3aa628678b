import { HttpClient, provideHttpClient, withInterceptors } from '@angular/common/http';
import { HttpTestingController, provideHttpClientTesting } from '@angular/common/http/testing';
import { TestBed } from '@angular/core/testing';
import { SignedOut } from '../session/signed-out';
import { apiInterceptor } from './api-interceptor';
import type { ProblemError } from './problem-error';

describe('apiInterceptor', () => {
  function server() {
    TestBed.configureTestingModule({
      providers: [provideHttpClient(withInterceptors([apiInterceptor])), provideHttpClientTesting()],
    });
    return { http: TestBed.inject(HttpClient), answers: TestBed.inject(HttpTestingController) };
  }

  beforeAll(() => {
    globalThis.crypto.randomUUID ??= () => '00000000-0000-4000-8000-000000000000';
  });

  it('gives writes JSON and a key of their own, and leaves reads alone', () => {
    const { http, answers } = server();
    http.post('/api/studies/P/edits', { commands: [] }).subscribe();
    http.delete('/api/session').subscribe();
    http.get('/api/studies').subscribe();
    const [write] = answers.match('/api/studies/P/edits');
    expect(write?.request.headers.get('Content-Type')).toBe('application/json');
    expect(write?.request.headers.get('Idempotency-Key')).toMatch(/^[0-9a-f-]{36}$/);
    expect(answers.match('/api/session')[0]?.request.body).toEqual({});
    expect(answers.match('/api/studies')[0]?.request.headers.has('Idempotency-Key')).toBe(false);
  });

  it('keeps the key of a repeated write and the form of an upload', () => {
    const { http, answers } = server();
    http.post('/api/imports', new FormData(), { headers: { 'Idempotency-Key': 'again' } }).subscribe();
    const [upload] = answers.match('/api/imports');
    expect(upload?.request.headers.get('Idempotency-Key')).toBe('again');
    expect(upload?.request.headers.has('Content-Type')).toBe(false);
    expect(upload?.request.headers.get('X-Requested-With')).toBe('deltaproof');
  });

  it('announces an expired session once it is told so, but not a refused sign-in', () => {
    const { http, answers } = server();
    let announced = 0;
    TestBed.inject(SignedOut).announcements.subscribe(() => (announced += 1));
    const problems: ProblemError[] = [];
    const error = (problem: ProblemError): number => problems.push(problem);
    http.post('/api/session', {}).subscribe({ error });
    answers.expectOne('/api/session').flush({ code: 'sign-in-refused' }, { status: 401, statusText: 'no' });
    expect(announced).toBe(0);
    http.get('/api/studies').subscribe({ error });
    answers.expectOne('/api/studies').flush({ code: 'not-signed-in' }, { status: 401, statusText: 'no' });
    expect(announced).toBe(1);
    expect(problems.map((problem) => problem.code)).toEqual(['sign-in-refused', 'not-signed-in']);
  });
});
