import { HttpErrorResponse } from '@angular/common/http';
import { toProblem } from './problem-error';

const answer = (status: number, error: unknown) => new HttpErrorResponse({ status, error });

describe('toProblem', () => {
  it('keeps code, fields and the current state of a refusal', () => {
    const problem = toProblem(
      answer(409, { title: 'Stale', detail: 'It moved.', code: 'stale', current: { version: 4 }, fields: [] }),
    );
    expect(problem).toMatchObject({
      status: 409,
      code: 'stale',
      title: 'Stale',
      detail: 'It moved.',
      current: { version: 4 },
    });
    expect(problem.isConflict).toBe(true);
  });

  it('says a refused field in a sentence, also when the server names its whole path', () => {
    const fields = [{ field: 'commands.0.limit.unit', value: 'kms', message: 'is no unit', expected: 'km/s' }];
    const problem = toProblem(answer(400, { title: 'Bad input', fields }));
    expect(problem.fieldMessage('limit.unit')).toBe('Is no unit. Right would be km/s.');
    expect(problem.fieldMessage('unit')).toBe('Is no unit. Right would be km/s.');
    expect(problem.fieldMessage('name')).toBeUndefined();
  });

  it('does not say twice what would be right', () => {
    const fields = [{ field: 'expires', message: 'nothing was given; give a day.', expected: 'give a day.' }];
    expect(toProblem(answer(422, { fields })).fieldMessage('expires')).toBe('Nothing was given; give a day.');
  });

  it('tells an unreachable server from a refusal, and survives a body that is no problem document', () => {
    expect(toProblem(answer(0, null)).code).toBe('unreachable');
    expect(toProblem(answer(502, '<html>Bad gateway</html>'))).toMatchObject({ code: 'http-502', fields: [] });
    expect(toProblem(answer(400, { fields: [{ nonsense: 1 }] })).fields).toEqual([]);
  });
});
