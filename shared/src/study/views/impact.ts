import type { ChangeRequest, Impact, Patch, Requirement, VerdictMove, VerdictView } from '@shared/contract';
import { applyCommands } from '../apply';
import type { EditContext } from '../edit-context';
import { reprove, type Proof } from '../prove';
import { Refusal } from '../refusal';
import type { Study } from '../study';
import { verdictRank } from '../verdict';
import { budgetView } from './budget-view';
import { moveOf } from './verdict-moves';
import { byKey, verdictView, type ProofSource } from './verdict-view';

/** What computing an impact needs beside the study: the revision it is computed on, and what editing needs. */
export interface ImpactContext extends Pick<EditContext, 'newId' | 'at' | 'personName'> {
  readonly revision: number;
}

/**
 * What approving a change request would do now: its edits applied on an overlay with the board's authority, and the study
 * re-proved. Nothing of the base is touched. Where the edits cannot be applied, `problem` says which and why.
 */
export function impactOf(base: Proof, change: ChangeRequest, context: ImpactContext): Impact {
  const total = base.study.all('requirement').filter(inForce).length;
  const fork = base.study.fork();
  const nothing = { revision: context.revision, total, turned: [], moved: [], better: 0, worse: [], budgets: [] };
  try {
    applyCommands(fork, change.edits, boardContext(change, context), () => {
      throw new Error('an edit of a change request asked for a row of the matrix');
    });
  } catch (error) {
    if (!(error instanceof Refusal)) throw error;
    const { code, message, command } = error;
    const kind = code === 'stale' || code === 'not-found' ? 'conflict' : 'refused';
    return { ...nothing, problem: { message, edit: command ?? 0, kind } };
  }
  const patch = fork.patch();
  const { changed } = reprove(base, fork, patch);
  const after: ProofSource = { proof: { ...base, study: fork, proven: overlaid(base.proven, changed) } };
  const { turned, moved } = movesBetween({ proof: base }, after, new Set([...changed.keys(), ...withdrawn(patch)]));
  const judged = turned.flatMap(({ key, before: was, after: is }) =>
    was && is ? [{ key, step: verdictRank(is.verdict) - verdictRank(was.verdict) }] : [],
  );
  return {
    ...nothing,
    turned,
    moved,
    better: judged.filter(({ step }) => step > 0).length,
    worse: judged.filter(({ step }) => step < 0).map(({ key }) => key),
    budgets: budgetMoves({ proof: base }, after, patch),
    problem: null,
  };
}

function boardContext(change: ChangeRequest, context: ImpactContext): EditContext {
  return {
    ...context,
    actorId: change.authorId,
    roles: [],
    revision: context.revision + 1,
    authority: 'board',
    patchOf: () => null,
  };
}

function inForce(requirement: Requirement | undefined): requirement is Requirement {
  return requirement !== undefined && requirement.state !== 'withdrawn';
}

function overlaid<V>(base: ReadonlyMap<string, V>, changed: ReadonlyMap<string, V | null>): Map<string, V> {
  const all = new Map(base);
  for (const [id, value] of changed) {
    if (value === null) all.delete(id);
    else all.set(id, value);
  }
  return all;
}

/** Requirements whose state changes: a withdrawn one leaves the count although its own verdict may stand. */
function withdrawn(patch: Patch): string[] {
  return patch.flatMap((entry) =>
    entry.kind === 'requirement' && entry.before?.state !== entry.after?.state ? [entry.id] : [],
  );
}

function movesBetween(
  before: ProofSource,
  after: ProofSource,
  ids: ReadonlySet<string>,
): { turned: VerdictMove[]; moved: VerdictMove[] } {
  const turned: VerdictMove[] = [];
  const moved: VerdictMove[] = [];
  for (const id of ids) {
    const was = before.proof.study.get('requirement', id);
    const is = after.proof.study.get('requirement', id);
    const move = moveOf(
      inForce(was) ? (before.proof.proven.get(id) ?? null) : null,
      inForce(is) ? (after.proof.proven.get(id) ?? null) : null,
    );
    const requirement = is ?? was;
    if (!move || !requirement) continue;
    const { key, title, limit } = requirement;
    const line = { key, title, before: view(before, was), after: view(after, is), limit };
    (move === 'turned' ? turned : moved).push(line);
  }
  return { turned: turned.sort(byKey), moved: moved.sort(byKey) };
}

function view(source: ProofSource, requirement: Requirement | undefined): VerdictView | null {
  return inForce(requirement) ? verdictView(source, requirement) : null;
}

/** Budgets whose reserve becomes another one, in SI; null where it cannot be stated or there is no budget. */
function budgetMoves(before: ProofSource, after: ProofSource, patch: Patch): Impact['budgets'] {
  const moves: Impact['budgets'][number][] = [];
  for (const id of budgetHolders(before.proof.study, after.proof.study, patch)) {
    const was = before.proof.study.get('requirement', id);
    const is = after.proof.study.get('requirement', id);
    const old = inForce(was) ? budgetView(before, was) : null;
    const now = inForce(is) ? budgetView(after, is) : null;
    if ((!old && !now) || Object.is(old?.reserve ?? null, now?.reserve ?? null)) continue;
    const key = (is ?? was)?.key ?? '';
    moves.push({ key, before: old?.reserve ?? null, after: now?.reserve ?? null, unit: (now ?? old)?.unit ?? '' });
  }
  return moves.sort(byKey);
}

/** Requirements whose budget a patch can reach: themselves edited, or parents of what is. */
function budgetHolders(before: Study, after: Study, patch: Patch): Set<string> {
  const ids = new Set<string>();
  for (const entry of patch) {
    if (entry.kind === 'trace') {
      if (entry.before) ids.add(entry.before.parentId);
      if (entry.after) ids.add(entry.after.parentId);
    }
    if (entry.kind !== 'requirement') continue;
    ids.add(entry.id);
    for (const study of [before, after])
      for (const trace of study.find('trace', 'childId', entry.id)) ids.add(trace.parentId);
  }
  return ids;
}
