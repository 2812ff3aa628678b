import { type ProblemError, fieldSentence } from '../http/problem-error';

/** The refusal of one field of a command, by its whole path below the command, such as "limit.value"; empty when it was not refused. */
export function refusedField(problem: ProblemError | null, ...paths: readonly string[]): string {
  const refused = problem?.fields.find(({ field }) =>
    paths.includes(field.replace(/^commands\.\d+\./, '').replace(/^changes\./, '')),
  );
  return refused === undefined ? '' : fieldSentence(refused);
}
