import type { Command, CommandType, Requirement } from '@shared/contract';
import { permitted } from './permitted';
import { provenOf } from './verdict-view';
import type { ViewContext } from './view-context';

const WHY = 'to find out whether it may';

/** Commands that this person may give on a requirement and what hangs on it, here and now. */
export function requirementMay(context: ViewContext, requirement: Requirement): CommandType[] {
  if (requirement.state === 'withdrawn') return [];
  return permitted(context, [
    ...onRequirement(requirement),
    ...onFlowDown(context, requirement),
    ...onVerifications(context, requirement),
    ...onRow(context, requirement),
    ...onDepartures(context, requirement),
    { type: 'change.write', title: requirement.title, reason: '', due: null, edits: [] },
  ]);
}

function onRequirement({ id, version, title, text, rationale, level, limit }: Requirement): Command[] {
  const child = { title, text, rationale, level, elementId: null, parameter: null, limit: null, openItem: null };
  const budget: Command[] = limit ? [{ type: 'budget.set', id, version, budget: null }] : [];
  return [
    { type: 'requirement.revise', id, version, changes: {} },
    { type: 'requirement.withdraw', id, version, reason: WHY },
    { type: 'requirement.submit', id, version },
    { type: 'requirement.return', id, version, reason: WHY },
    { type: 'requirement.create', prefix: 'NEW', ...child, parentIds: [id] },
    // Linked below itself it makes a circle, which is about what is typed; who may link it is decided before.
    { type: 'trace.link', parentId: id, childId: id },
    ...budget,
  ];
}

function onFlowDown({ proof: { study } }: ViewContext, { id }: Requirement): Command[] {
  const up = study.find('trace', 'childId', id).flatMap((trace): Command[] => [
    { type: 'trace.unlink', id: trace.id, version: trace.version },
    { type: 'budget.propose', id: trace.id, version: trace.version, share: 'none' },
  ]);
  const down = study
    .find('trace', 'parentId', id)
    .filter(({ share }) => share !== 'adopted')
    .map((trace): Command => ({ type: 'budget.adopt', id: trace.id, version: trace.version }));
  return study.get('requirement', id)?.budget ? [...up, ...down] : up;
}

function onVerifications({ proof: { study } }: ViewContext, requirement: Requirement): Command[] {
  const planned = { method: 'test', level: '', stage: '', gate: '', criterion: '' } as const;
  const linked = study.find('verification', 'requirementId', requirement.id).flatMap(({ id, version, method }) => {
    const trials: Command[] = [
      { type: 'verification.revise', id, version, changes: {} },
      { type: 'verification.unlink', id, version },
    ];
    const finding = { met: true, document: WHY, issue: '', note: '' };
    if (method !== 'analysis' || !requirement.limit)
      trials.push({ type: 'verification.record', id, version, ...finding });
    return trials;
  });
  const link: Command = {
    type: 'verification.link',
    requirementId: requirement.id,
    ...planned,
    analysisId: null,
    output: null,
    deciding: false,
  };
  return [link, ...linked];
}

function onRow(context: ViewContext, { id, version }: Requirement): Command[] {
  const { computedCompliance } = provenOf(context, id);
  const assessment = context.proof.study.find('assessment', 'requirementId', id)[0];
  const trials: Command[] = [];
  if (computedCompliance !== 'not assessed')
    trials.push({ type: 'assessment.lower', id, version, to: 'not assessed', reason: WHY });
  else if (assessment?.lowered) trials.push({ type: 'assessment.lower', id, version, to: null, reason: WHY });
  if (provenOf(context, id).closeOut !== 'closed') trials.push({ type: 'assessment.close', id, version, reason: WHY });
  trials.push({ type: 'assessment.reopen', id, version, reason: WHY });
  return trials;
}

function onDepartures({ proof: { study } }: ViewContext, { id, state, title }: Requirement): Command[] {
  const decided = study.find('departure', 'requirementId', id).flatMap((departure): Command[] => {
    const target = { id: departure.id, version: departure.version };
    return [
      { type: 'departure.decide', ...target, decision: 'in force', reason: WHY },
      { type: 'departure.expire', ...target },
    ];
  });
  if (state !== 'baselined') return decided;
  const asked = { kind: 'deviation', class: 'minor', title, reason: WHY, effectivity: WHY, expires: null } as const;
  return [{ type: 'departure.request', requirementId: id, ...asked }, ...decided];
}
