import type { OverviewView, Verdict } from '@shared/contract';
import { numberWord, sentenceCase } from './number-words';

/** Short name of a study: what stands before the comma. */
export function shortName(name: string): string {
  return name.split(',')[0] ?? name;
}

/** The sentence that the overview opens with: "Petrel does not close yet." */
export function closureHeadline(name: string, view: Pick<OverviewView, 'closes' | 'total'>): string {
  if (view.total === 0) return `${shortName(name)} has no requirements yet.`;
  return view.closes ? `${shortName(name)} closes.` : `${shortName(name)} does not close yet.`;
}

const PREDICATES: readonly { readonly verdict: Verdict; readonly one: string; readonly many: string }[] = [
  { verdict: 'non-compliant', one: 'misses its limit', many: 'miss their limit' },
  { verdict: 'short margin', one: 'holds it with too little margin', many: 'hold it with too little margin' },
  { verdict: 'indeterminate', one: 'is indeterminate', many: 'are indeterminate' },
  { verdict: 'not computable', one: 'cannot be computed', many: 'cannot be computed' },
  { verdict: 'no evidence', one: 'has no evidence', many: 'have no evidence' },
];

/** The counts in words: "Two of 42 requirements miss their limit and one is indeterminate. The other 39 hold with margin." */
export function closureSentence({ counts, total }: Pick<OverviewView, 'counts' | 'total'>): string {
  if (total === 0) return '';
  const open = PREDICATES.filter(({ verdict }) => counts[verdict] > 0);
  if (open.length === 0) {
    return total === 1 ? 'Its one requirement holds with margin.' : `All ${total} requirements hold with margin.`;
  }
  const parts = open.map(({ verdict, one, many }, index) => {
    const count = counts[verdict];
    const what = index > 0 ? '' : total === 1 ? ' requirement' : ` of ${total} requirements`;
    return `${numberWord(count)}${what} ${count === 1 ? one : many}`;
  });
  const first = sentenceCase(joined(parts));
  if (counts.compliant === 0) return `${first}. None holds with margin.`;
  const rest =
    counts.compliant === 1
      ? 'One other holds with margin.'
      : `The other ${numberWord(counts.compliant)} hold with margin.`;
  return `${first}. ${rest}`;
}

function joined(parts: readonly string[]): string {
  if (parts.length < 2) return parts.join('');
  return `${parts.slice(0, -1).join(', ')} and ${parts.at(-1)}`;
}
