import type { Command } from '@shared/contract';
import type { Study } from '../study';
import { takeBaseline } from './baselines';
import { CHAIR, ID, MEMBER, edit, idOf, smallStudy, type Somebody } from './small-study';

/** Identifier of the baseline of the reviewed study, and of the change request that `changeBeforeBoard` writes. */
export const BASELINE = idOf(900);
export const CHANGE = idOf(910);

/** The small study after its review: VEH-001 and VEH-002 baselined, the specific impulse controlled, PRP-001 not. */
export function reviewedStudy(): Study {
  const study = smallStudy();
  takeBaseline(study, [ID.deltaV, ID.mass], { id: BASELINE, quantityIds: [ID.isp] });
  return study;
}

/** What a command needs to name something in the version it has now. */
export function seen(
  study: Study,
  kind:
    'requirement' | 'quantity' | 'analysis' | 'verification' | 'trace' | 'change' | 'element' | 'policy' | 'departure',
  id: string,
): { readonly id: string; readonly version: number } {
  return { id, version: study.get(kind, id)!.version };
}

/** Writes a change request as somebody. */
export function writeChange(study: Study, person: Somebody, ...edits: readonly Command[]): void {
  edit(study, person, {
    type: 'change.write',
    id: CHANGE,
    title: 'Change it',
    reason: 'It is needed.',
    due: null,
    edits: [...edits] as never,
  });
}

/** Brings the written change request before the board with one vote for it. */
export function bringToVote(study: Study, author: Somebody): void {
  edit(study, author, { type: 'change.submit', ...seen(study, 'change', CHANGE) });
  edit(study, CHAIR, { type: 'change.refer', ...seen(study, 'change', CHANGE), due: null });
  edit(study, MEMBER, { type: 'change.vote', ...seen(study, 'change', CHANGE), vote: 'for', remark: '' });
}

/** The chair approves it. */
export function approval(study: Study): Command {
  return { type: 'change.dispose', ...seen(study, 'change', CHANGE), decision: 'approved', reason: 'agreed' };
}
