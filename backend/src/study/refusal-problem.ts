import type { Refusal } from '@shared/study';
import { ProblemError } from '../middleware/problems';

const STATUS = {
  forbidden: [403, 'forbidden', 'Not allowed'],
  invalid: [422, 'refused', 'Not accepted'],
  'not-found': [404, 'not-found', 'Not found'],
  stale: [409, 'stale', 'Changed meanwhile'],
  controlled: [409, 'controlled', 'Under control'],
  conflict: [409, 'conflict', 'In conflict'],
  'in-use': [409, 'in-use', 'In use'],
  cycle: [422, 'cycle', 'A circle'],
  state: [409, 'state', 'Not possible now'],
} as const;

/** A refusal of the core as the problem that HTTP answers. */
export function refusalProblem(refusal: Refusal): ProblemError {
  const [status, code, title] = STATUS[refusal.code];
  const { field, value, expected, range, current } = refusal.details;
  const place = refusal.command === null ? '' : `commands.${refusal.command}.`;
  const path = `${place}${field ?? ''}`.replace(/\[(\d+)\]/g, '.$1');
  const at = range ? { range: { from: range.from, to: range.to } } : {};
  const fields = field === undefined ? undefined : [{ field: path, value, message: refusal.message, expected, ...at }];
  return new ProblemError(status, code, title, refusal.message, { fields, current });
}
