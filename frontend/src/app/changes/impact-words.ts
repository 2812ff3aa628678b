import type { Impact, VerdictMove } from '@shared/contract';

const WORDS = ['no', 'one', 'two', 'three', 'four', 'five', 'six', 'seven', 'eight', 'nine', 'ten', 'eleven', 'twelve'];

/** Small numbers as words, larger ones as digits. */
export function inWords(count: number): string {
  return WORDS[count] ?? String(count);
}

/** "3 edits", "one edit". */
export function counted(count: number, one: string, many: string): string {
  return `${inWords(count)} ${count === 1 ? one : many}`;
}

/** A sentence of which the first part stands out. */
export interface ImpactSentence {
  readonly strong: string;
  readonly rest: string;
}

/** "**Three of 42 verdicts turn**, one for the better; two more move." In the past tense once it was approved. */
export function impactSentence(impact: Impact, approved = false): ImpactSentence {
  const turned = impact.turned.length;
  const moved = impact.moved.length;
  const verb = (count: number, stem: 'turn' | 'move'): string => {
    if (approved) return stem === 'turn' ? 'turned' : 'moved';
    return count === 1 ? `${stem}s` : stem;
  };
  if (turned === 0) {
    const rest = moved === 0 ? ' and no margin moves.' : `; ${inWords(moved)} ${verb(moved, 'move')}.`;
    return {
      strong: `No verdict ${verb(1, 'turn')}`,
      rest: approved && moved === 0 ? ' and no margin moved.' : rest,
    };
  }
  const more = moved === 0 ? '' : `; ${inWords(moved)} more ${verb(moved, 'move')}`;
  return {
    strong: `${capital(inWords(turned))} of ${impact.total} verdicts ${verb(turned, 'turn')}`,
    rest: `${direction(turned, impact.better, impact.worse.length)}${more}.`,
  };
}

function direction(turned: number, better: number, worse: number): string {
  if (better === turned) return turned === 1 ? ', for the better' : ', all for the better';
  if (worse === turned) return turned === 1 ? ', for the worse' : ', all for the worse';
  if (better > 0) return `, ${inWords(better)} for the better`;
  return worse > 0 ? `, ${inWords(worse)} for the worse` : '';
}

/** What a verdict that gets worse means: "VEH-001 would become indeterminate: its limit would lie inside its uncertainty." */
export function worseSentence(move: VerdictMove): ImpactSentence {
  const after = move.after;
  if (after === null) return { strong: `${move.key} would be withdrawn.`, rest: '' };
  return { strong: `${move.key} would become ${after.verdict}:`, rest: ` ${meaning(after.verdict, after.reason)}.` };
}

function meaning(verdict: NonNullable<VerdictMove['after']>['verdict'], reason: string): string {
  switch (verdict) {
    case 'indeterminate':
      return 'its limit would lie inside its uncertainty';
    case 'short margin':
      return 'it would meet its limit, but not with the required margin';
    case 'non-compliant':
      return 'it would miss its limit';
    case 'not computable':
      return reason.replace(/\.$/, '') || 'its calculation would have no result';
    case 'no evidence':
      return 'nothing would be linked to show it';
    case 'compliant':
      return 'it would hold with margin';
  }
}

function capital(text: string): string {
  return text.charAt(0).toUpperCase() + text.slice(1);
}
