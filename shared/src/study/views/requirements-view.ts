import type { FlowRow, Requirement, RequirementsView, Trace } from '@shared/contract';
import { pendingChanges } from '../change-requests';
import { budgetView } from './budget-view';
import { byKey, requirementsInForce, verdictView } from './verdict-view';
import type { ViewContext } from './view-context';

/** Where in the flow-down a requirement is listed. */
interface Place {
  readonly path: string;
  readonly depth: number;
  readonly share: Trace['share'];
}

/** Children in force of a requirement, by key, with the trace to each. */
export function childrenOf(
  { proof: { study } }: Pick<ViewContext, 'proof'>,
  requirementId: string,
): { readonly child: Requirement; readonly trace: Trace }[] {
  return linked(study.find('trace', 'parentId', requirementId), (trace) => study.get('requirement', trace.childId)).map(
    ({ requirement: child, trace }) => ({ child, trace }),
  );
}

/** Parents in force of a requirement, by key, with the trace from each. */
export function parentsOf(
  { proof: { study } }: Pick<ViewContext, 'proof'>,
  requirementId: string,
): { readonly parent: Requirement; readonly trace: Trace }[] {
  return linked(study.find('trace', 'childId', requirementId), (trace) => study.get('requirement', trace.parentId)).map(
    ({ requirement: parent, trace }) => ({ parent, trace }),
  );
}

function linked(
  traces: readonly Trace[],
  other: (trace: Trace) => Requirement | undefined,
): { requirement: Requirement; trace: Trace }[] {
  return traces
    .flatMap((trace) => {
      const requirement = other(trace);
      return requirement && requirement.state !== 'withdrawn' ? [{ requirement, trace }] : [];
    })
    .sort((a, b) => byKey(a.requirement, b.requirement));
}

/** Makes the lines of the flow-down; what does not depend on the place is computed once for each requirement. */
export function flowRows(context: ViewContext): (requirement: Requirement, place: Place) => FlowRow {
  const { study } = context.proof;
  const pending = pendingChanges(study);
  const made = new Map<string, Omit<FlowRow, keyof Place>>();

  function make(requirement: Requirement): Omit<FlowRow, keyof Place> {
    const { id, version, key, title, level, state, limit } = requirement;
    const element = requirement.elementId ? study.get('element', requirement.elementId) : undefined;
    return {
      ...verdictView(context, requirement),
      hasChildren: childrenOf(context, id).length > 0,
      id,
      version,
      key,
      title,
      level,
      state,
      limit,
      changePending: pending.get(id) ?? [],
      toBeResolved: requirement.openItem !== null,
      element: element ? { key: element.key, name: element.name } : null,
      budget: budgetView(context, requirement),
    };
  }

  return (requirement, place) => {
    let row = made.get(requirement.id);
    if (!row) made.set(requirement.id, (row = make(requirement)));
    return { ...row, ...place };
  };
}

/** The flow-down, depth first, by key; a requirement with several parents stands under each. Withdrawn ones are left out. */
export function requirementsView(context: ViewContext): RequirementsView {
  const rowOf = flowRows(context);
  const rows: FlowRow[] = [];
  const list = (requirement: Requirement, place: Place): void => {
    rows.push(rowOf(requirement, place));
    for (const { child, trace } of childrenOf(context, requirement.id))
      list(child, { path: `${place.path}/${child.key}`, depth: place.depth + 1, share: trace.share });
  };
  const inForce = requirementsInForce(context);
  for (const requirement of inForce) {
    if (parentsOf(context, requirement.id).length === 0)
      list(requirement, { path: requirement.key, depth: 0, share: 'none' });
  }
  return {
    rows,
    counts: {
      inForce: inForce.length,
      inPreparation: inForce.filter(({ state }) => state === 'in preparation').length,
      toBeResolved: inForce.filter(({ openItem }) => openItem !== null).length,
    },
  };
}
