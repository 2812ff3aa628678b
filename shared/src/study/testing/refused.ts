import type { Command } from '@shared/contract';
import { applyCommands } from '../apply';
import type { EditContext } from '../edit-context';
import { Refusal } from '../refusal';
import type { Study } from '../study';
import { editingAs, factsOf, type Somebody } from './small-study';

/** The refusal that commands meet; fails when they are accepted, or when they leave a trace in the study. */
export function refused(
  study: Study,
  person: Somebody,
  commands: Command | readonly Command[],
  over: Partial<EditContext> = {},
): Refusal {
  const list: readonly Command[] = Array.isArray(commands) ? commands : [commands as Command];
  const before = JSON.stringify(study.all('requirement').concat(study.all('quantity') as never));
  try {
    applyCommands(study.fork(), list, editingAs(person, over), factsOf(study));
  } catch (error) {
    if (!(error instanceof Refusal)) throw error;
    if (JSON.stringify(study.all('requirement').concat(study.all('quantity') as never)) !== before)
      throw new Error('a refused edit changed the study', { cause: error });
    return error;
  }
  throw new Error(`accepted, though it should be refused: ${list.map(({ type }) => type).join(', ')}`);
}
