import type { Limit, Requirement, Trace } from '@shared/contract';
import { isTemperature, knownDimension, outputsOf, temperatureInWords } from '../analysis-ports';
import {
  type Apply,
  type EditContext,
  freshId,
  given,
  nextKey,
  referred,
  refuseControlled,
  revised,
  target,
} from '../edit-context';
import { a, readLimit } from '../measures';
import { Refusal, invalid } from '../refusal';
import type { Study } from '../study';
import { blockingFindings } from '../wording';
import { describeDimension } from '@shared/units';

/** Writes a new requirement in preparation, with its key and its traces to parents. */
export const createRequirement: Apply<'requirement.create'> = (study, command, context) => {
  const { type: _type, id: _id, prefix, parentIds, limit, ...fields } = command;
  const element = fields.elementId ? referred(study, 'element', 'elementId', fields.elementId) : undefined;
  const keyPrefix = prefix ?? element?.key;
  if (!keyPrefix)
    throw invalid('prefix', '', 'give a key prefix such as MIS, or allocate the requirement to an element.');
  refuseReservedPrefix(keyPrefix);
  refuseUnknownLevel(study, fields.level);
  const requirement: Requirement = {
    ...fields,
    id: freshId(study, 'requirement', command, context),
    version: 1,
    key: nextKey(study, keyPrefix),
    limit: readLimit('limit', limit),
    budget: null,
    ownerId: context.actorId,
    coOwnerIds: [],
    state: 'in preparation',
  };
  study.put('requirement', requirement);
  for (const parentId of new Set(parentIds)) {
    refuseWithdrawnParent(referred(study, 'requirement', 'parentIds', parentId), 'parentIds');
    study.put('trace', { id: context.newId(), version: 1, parentId, childId: requirement.id, share: 'none' });
  }
};

function refuseWithdrawnParent(parent: Requirement, field: string): void {
  if (parent.state === 'withdrawn')
    throw new Refusal('state', `${parent.key} is withdrawn; nothing is flowed down from it.`, {
      field,
      value: parent.key,
      expected: 'a parent in force',
    });
}

const RESERVED_PREFIXES = ['CR', 'B', 'Q', 'AN', 'DEV', 'WAV'];
/** Refuses a key prefix, or the code of an element, that keys of other things begin with. */
export function refuseReservedPrefix(prefix: string, field = 'prefix'): void {
  if (RESERVED_PREFIXES.includes(prefix))
    throw invalid(field, prefix, `${RESERVED_PREFIXES.join(', ')} are used for other things; choose another.`);
}

function refuseUnknownLevel(study: Study, level: string): void {
  const { levels } = study.settings;
  if (!levels.includes(level))
    throw invalid('level', level, `it must be one of this study's levels: ${levels.join(', ')}.`);
}

/** Refuses an edit that this person may not make to this requirement in its state. */
function refuseUnlessEditable(requirement: Requirement, context: EditContext): void {
  if (requirement.state === 'withdrawn')
    throw new Refusal('state', `${requirement.key} is withdrawn and stays as it was.`, {
      field: 'id',
      value: requirement.key,
      expected: 'a requirement in force',
    });
  if (requirement.state === 'baselined') refuseControlled(context, requirement.key, 'is baselined');
  if (context.authority !== 'direct') return;
  if (requirement.state === 'in review') {
    throw new Refusal('state', `${requirement.key} is in review; return it to preparation before editing it.`, {
      field: 'id',
      value: requirement.key,
      expected: 'a requirement in preparation',
    });
  }
  if (requirement.ownerId !== context.actorId && !requirement.coOwnerIds.includes(context.actorId)) {
    throw new Refusal(
      'forbidden',
      `${requirement.key} belongs to ${context.personName(requirement.ownerId)}; only its owner and co-owners edit it in preparation.`,
      { field: 'id', value: requirement.key, expected: 'a requirement of your own' },
    );
  }
}

/** Changes statement, limit, allocation or ownership; a limit keeps the dimension of the outputs that verify it. */
export const reviseRequirement: Apply<'requirement.revise'> = (study, command, context) => {
  const requirement = target(study, 'requirement', command);
  refuseUnlessEditable(requirement, context);
  const { limit, ...rest } = command.changes;
  if (rest.elementId) referred(study, 'element', 'changes.elementId', rest.elementId);
  if (rest.level !== undefined) refuseUnknownLevel(study, rest.level);
  const changes: Partial<Requirement> = given(rest);
  const next: Partial<Requirement> =
    limit === undefined ? changes : { ...changes, limit: readLimit('changes.limit', limit) };
  if (next.limit) refuseOtherDimension(study, requirement, next.limit);
  if (next.limit === null && requirement.budget)
    throw invalid(
      'changes.limit',
      '',
      `${requirement.key} carries a budget, which needs a limit; remove the budget first.`,
    );
  revised(study, 'requirement', requirement, next);
};

function refuseOtherDimension(study: Study, requirement: Requirement, limit: Limit): void {
  const { unit } = limit.value;
  const dimension = knownDimension(unit);
  for (const verification of study.find('verification', 'requirementId', requirement.id)) {
    const analysis = verification.analysisId ? study.get('analysis', verification.analysisId) : undefined;
    const output = analysis && outputsOf(study, analysis).find((port) => port.name === verification.output);
    if (analysis && output && output.dimension !== dimension) {
      throw invalid(
        'changes.limit.value',
        unit,
        `${requirement.key} is verified by ${analysis.key} ${output.name}, which is ${a(describeDimension(output.dimension))}; unlink it first or keep the limit in that dimension.`,
      );
    }
    const known = analysis && analysis.kind !== 'external' && isTemperature(dimension);
    if (known && output && output.temperature !== limit.temperature) {
      throw invalid(
        'changes.limit.temperature',
        limit.temperature,
        `${requirement.key} is verified by ${analysis.key} ${output.name}, which is ${temperatureInWords(output.temperature)}; unlink it first or keep the limit on that.`,
      );
    }
  }
}

/** Withdraws a requirement; its key is kept and never used again. */
export const withdrawRequirement: Apply<'requirement.withdraw'> = (study, command, context) => {
  const requirement = target(study, 'requirement', command);
  refuseUnlessEditable(requirement, context);
  const children = study
    .find('trace', 'parentId', requirement.id)
    .filter((trace) => study.get('requirement', trace.childId)?.state !== 'withdrawn');
  if (children.length > 0) {
    const keys = children.map((trace) => study.get('requirement', trace.childId)?.key).join(', ');
    throw new Refusal(
      'in-use',
      `${requirement.key} is still flowed down to ${keys}. Link these elsewhere or withdraw them first.`,
      { field: 'id', value: requirement.key, expected: 'a requirement without children in force' },
    );
  }
  revised(study, 'requirement', requirement, { state: 'withdrawn' });
};

/** Sends a requirement to review; refuses empty mandatory fields and blocking wording findings by name. */
export const submitRequirement: Apply<'requirement.submit'> = (study, command, context) => {
  const requirement = target(study, 'requirement', command);
  if (requirement.state !== 'in preparation')
    throw new Refusal(
      'state',
      `${requirement.key} is ${requirement.state}; only a requirement in preparation can be submitted.`,
      { field: 'id', value: requirement.key, expected: 'a requirement in preparation' },
    );
  refuseUnlessEditable(requirement, context);
  if (!requirement.rationale)
    throw invalid('rationale', '', 'say why the requirement is there before it goes to review.');
  const [finding] = blockingFindings(requirement);
  if (finding) throw invalid('text', requirement.text, finding.message);
  revised(study, 'requirement', requirement, { state: 'in review' });
};

/** Returns a requirement from review to its owner. */
export const returnRequirement: Apply<'requirement.return'> = (study, command) => {
  const requirement = target(study, 'requirement', command);
  if (requirement.state !== 'in review')
    throw new Refusal(
      'state',
      `${requirement.key} is ${requirement.state}; only a requirement in review can be returned.`,
      { field: 'id', value: requirement.key, expected: 'a requirement in review' },
    );
  revised(study, 'requirement', requirement, { state: 'in preparation' });
};

/** Links a child below a parent; refuses a second link of the same pair and a circle. */
export const linkTrace: Apply<'trace.link'> = (study, command, context) => {
  const parent = referred(study, 'requirement', 'parentId', command.parentId);
  const child = referred(study, 'requirement', 'childId', command.childId);
  refuseUnlessEditable(child, context);
  refuseWithdrawnParent(parent, 'parentId');
  if (study.find('trace', 'parentId', parent.id).some((trace) => trace.childId === child.id)) {
    throw invalid('childId', child.key, `${child.key} is already linked below ${parent.key}.`);
  }
  const path = pathUp(study, parent.id, child.id);
  if (path) {
    const keys = [...path.map((id) => study.held('requirement', id).key), parent.key];
    throw new Refusal('cycle', `This would make a circle in the flow-down: ${keys.join(' → ')} → ${child.key}.`, {
      field: 'parentId',
      value: parent.key,
      expected: 'a parent that is not below the child',
    });
  }
  study.put('trace', {
    id: freshId(study, 'trace', command, context),
    version: 1,
    parentId: parent.id,
    childId: child.id,
    share: 'none',
  });
};

/** Requirement ids from `ancestor` down to `from`, when `ancestor` lies above it. */
export function pathUp(study: Study, from: string, ancestor: string): string[] | null {
  if (from === ancestor) return [];
  for (const trace of study.find('trace', 'childId', from)) {
    const rest = trace.parentId === ancestor ? [ancestor] : pathUp(study, trace.parentId, ancestor);
    if (rest) return trace.parentId === ancestor ? rest : [...rest, trace.parentId];
  }
  return null;
}

/** Removes a link; one that counts in a baselined parent's budget only by change request. */
export const unlinkTrace: Apply<'trace.unlink'> = (study, command, context) => {
  const trace = target(study, 'trace', command);
  refuseAdoptedShare(study, trace, context);
  refuseUnlessEditable(referred(study, 'requirement', 'id', trace.childId), context);
  study.remove('trace', trace.id);
};

function refuseAdoptedShare(study: Study, trace: Trace, context: EditContext): void {
  const parent = study.held('requirement', trace.parentId);
  if (trace.share === 'adopted' && parent.state === 'baselined')
    refuseControlled(context, parent.key, 'is baselined with this share in its budget');
}

/** Gives a requirement a budget: how its limit is shared out among its children. */
export const setBudget: Apply<'budget.set'> = (study, command, context) => {
  const requirement = target(study, 'requirement', command);
  refuseUnlessEditable(requirement, context);
  if (command.budget && !requirement.limit)
    throw invalid('budget', requirement.key, 'a budget shares out a limit; give the requirement one first.');
  revised(study, 'requirement', requirement, { budget: command.budget });
};

/** Proposes a child's limit as a share of the parent's budget, or takes the proposal back. */
export const proposeShare: Apply<'budget.propose'> = (study, command, context) => {
  const trace = target(study, 'trace', command);
  const child = study.held('requirement', trace.childId);
  refuseAdoptedShare(study, trace, context);
  refuseUnlessEditable(child, context);
  if (command.share === 'proposed') refuseUnfitShare(study, trace);
  revised(study, 'trace', trace, { share: command.share });
};

function refuseUnfitShare(study: Study, trace: Trace): void {
  const parent = study.held('requirement', trace.parentId);
  const child = study.held('requirement', trace.childId);
  if (!parent.budget || !parent.limit)
    throw invalid('share', parent.key, `${parent.key} has no budget to take a share of; give it one first.`);
  if (!child.limit) throw invalid('share', child.key, `the share is the limit of ${child.key}; give it one first.`);
  const needed = knownDimension(parent.limit.value.unit);
  const actual = knownDimension(child.limit.value.unit);
  if (parent.budget.rule !== 'product' && needed !== actual) {
    throw invalid(
      'share',
      `${child.limit.value.text} ${child.limit.value.unit}`,
      `the budget of ${parent.key} is of ${describeDimension(needed)}, the limit of ${child.key} is ${a(describeDimension(actual))}.`,
    );
  }
}

/** Adopts a share into the parent's budget; a baselined parent takes one only by change request. */
export const adoptShare: Apply<'budget.adopt'> = (study, command, context) => {
  const trace = target(study, 'trace', command);
  const parent = study.held('requirement', trace.parentId);
  if (parent.state === 'baselined')
    refuseControlled(context, parent.key, 'is baselined; its budget takes a new share only by an approved change');
  refuseUnfitShare(study, trace);
  if (trace.share === 'adopted') throw invalid('id', parent.key, 'this share is already in the budget.');
  revised(study, 'trace', trace, { share: 'adopted' });
};
