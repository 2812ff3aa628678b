import type { Assessment, Compliance, Verdict } from '@shared/contract';
import { type Apply, type EditContext, revised, target } from '../edit-context';
import { Refusal } from '../refusal';
import type { Study } from '../study';
import { lowers } from '../verdict';

/** What assessments need to know of the derived state before the edit: the computed compliance of a row and the digest that a close-out signs. */
export interface RowFacts {
  readonly compliance: Compliance;
  readonly verdict: Verdict;
  readonly digest: string;
  readonly departed: boolean;
}

function rowOf(study: Study, requirementId: string, context: EditContext): Assessment {
  return (
    study.find('assessment', 'requirementId', requirementId)[0] ?? {
      id: context.newId(),
      version: 0,
      requirementId,
      lowered: null,
      closed: null,
    }
  );
}

/** Commands on a row of the compliance matrix; `facts` answers from the derived state at the current revision. */
export function assessmentCommands(facts: (requirementId: string) => RowFacts) {
  const lower: Apply<'assessment.lower'> = (study, command, context) => {
    const requirement = target(study, 'requirement', command);
    const { compliance } = facts(requirement.id);
    if (command.to !== null && !lowers(compliance, command.to)) {
      throw new Refusal(
        'invalid',
        `to: “${command.to}” was given; the computed compliance of ${requirement.key} is ${compliance}, and a person may lower it, never raise it.`,
        { field: 'to', value: command.to, expected: `something lower than ${compliance}` },
      );
    }
    const lowered =
      command.to === null
        ? null
        : { to: command.to, reason: command.reason, personId: context.actorId, at: context.at };
    revised(study, 'assessment', rowOf(study, requirement.id, context), { lowered });
  };

  const close: Apply<'assessment.close'> = (study, command, context) => {
    const requirement = target(study, 'requirement', command);
    if (requirement.state !== 'baselined')
      throw new Refusal(
        'state',
        `${requirement.key} is ${requirement.state}; only the row of a baselined requirement is closed.`,
        { field: 'id', value: requirement.key, expected: 'a baselined requirement' },
      );
    const row = facts(requirement.id);
    const lowered = study.find('assessment', 'requirementId', requirement.id)[0]?.lowered?.to;
    const compliance = lowered && lowers(row.compliance, lowered) ? lowered : row.compliance;
    if (compliance !== 'yes' && !row.departed) {
      throw new Refusal(
        'state',
        `${requirement.key} is ${row.verdict}${lowered ? `, lowered to ${lowered}` : ''}; its row closes when it complies, or with a departure in force.`,
        { field: 'id', value: requirement.key, expected: 'compliance yes, or a departure in force' },
      );
    }
    if (requirement.ownerId === context.actorId)
      throw new Refusal('forbidden', `You own ${requirement.key}; somebody else signs its close-out.`, {
        field: 'id',
        value: requirement.key,
        expected: 'a requirement owned by somebody else',
      });
    const openChild = study
      .find('trace', 'parentId', requirement.id)
      .map((trace) => study.get('requirement', trace.childId))
      .find(
        (child) =>
          child &&
          child.state !== 'withdrawn' &&
          // A closed row whose signature no longer covers what stands has reopened by itself.
          study.find('assessment', 'requirementId', child.id)[0]?.closed?.digest !== facts(child.id).digest,
      );
    if (openChild)
      throw new Refusal('state', `${requirement.key} cannot be closed over ${openChild.key}, which is still open.`, {
        field: 'id',
        value: requirement.key,
        expected: 'all children closed first',
      });
    revised(study, 'assessment', rowOf(study, requirement.id, context), {
      closed: { reason: command.reason, personId: context.actorId, at: context.at, digest: row.digest },
    });
  };

  const reopen: Apply<'assessment.reopen'> = (study, command, context) => {
    const requirement = target(study, 'requirement', command);
    const row = rowOf(study, requirement.id, context);
    if (!row.closed)
      throw new Refusal('state', `The row of ${requirement.key} is open.`, {
        field: 'id',
        value: requirement.key,
        expected: 'a closed row',
      });
    revised(study, 'assessment', row, { closed: null });
  };

  return { lower, close, reopen };
}
