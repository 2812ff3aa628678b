import { EditCommand, type Command, type CommandType } from '@shared/contract';
import { applyCommands } from '../apply';
import type { Authority } from '../edit-context';
import { newId } from '../ids';
import { Refusal, type RefusalCode } from '../refusal';
import type { ViewContext } from './view-context';

/** Refusals that mean "not you" or "not now"; any other is about what a command says, which is still to be typed. */
const NOT_NOW: readonly RefusalCode[] = ['forbidden', 'state', 'controlled', 'not-found', 'in-use'];

const PROPOSABLE: readonly CommandType[] = EditCommand.options.map((option) => option.shape.type.value);

/**
 * Which of these commands the person could give now: each is tried on an overlay by the rules that also judge the real
 * one, so that what is offered and what is accepted cannot part. Nothing is offered where the standpoint cannot be edited;
 * in a draft only what can be proposed.
 */
export function permitted(context: ViewContext, trials: readonly Command[]): CommandType[] {
  if (!context.standpoint.editable) return [];
  const { study, proven } = context.proof;
  const drafting = context.standpoint.text.startsWith('draft:');
  const authority: Authority = drafting ? 'proposal' : 'direct';
  const may = trials.filter((command) => {
    if (drafting && !PROPOSABLE.includes(command.type)) return false;
    try {
      applyCommands(
        study.fork(),
        [command],
        {
          actorId: context.me.id,
          roles: context.roles,
          at: context.provedAt,
          newId: () => newId(),
          revision: context.revision + 1,
          authority,
          patchOf: () => null,
          personName: (id) => context.people.get(id) ?? 'a former member',
        },
        (requirementId) => {
          const row = proven.get(requirementId);
          if (!row) throw new Refusal('not-found', 'There is no such requirement in this study.');
          const departed = study
            .find('departure', 'requirementId', requirementId)
            .some((departure) => departure.state === 'in force');
          return { compliance: row.computedCompliance, verdict: row.verdict, digest: row.digest, departed };
        },
      );
      return true;
    } catch (error) {
      if (!(error instanceof Refusal)) throw error;
      return !NOT_NOW.includes(error.code);
    }
  });
  return [...new Set(may.map(({ type }) => type))];
}
