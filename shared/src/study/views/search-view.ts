import type { Hit } from '@shared/contract';
import { seesChange } from './changes-view';
import { byKey } from './verdict-view';
import type { ViewContext } from './view-context';

const LIMIT = 20;

interface Candidate extends Hit {
  /** What words are looked for in, beside the key. */
  readonly words: string;
}

/** What a person may mean by a few letters: keys that begin with them first, then what holds every word; 20 at most. */
export function searchView(context: ViewContext, q: string): Hit[] {
  const sought = q.trim().toLowerCase();
  if (!sought) return [];
  const words = sought.split(/\s+/);
  const byPrefix: Candidate[] = [];
  const byWords: Candidate[] = [];
  for (const candidate of candidates(context)) {
    if (candidate.key.toLowerCase().startsWith(sought)) {
      byPrefix.push(candidate);
      continue;
    }
    const text = `${candidate.key} ${candidate.words}`.toLowerCase();
    if (words.every((word) => text.includes(word))) byWords.push(candidate);
  }
  // Among those found by word, a title that holds them all goes before one found only in its text.
  const inTitle = ({ title }: Hit): boolean => words.every((word) => title.toLowerCase().includes(word));
  byWords.sort((a, b) => Number(inTitle(b)) - Number(inTitle(a)) || byKey(a, b));
  return [...byPrefix.sort(byKey), ...byWords]
    .slice(0, LIMIT)
    .map(({ kind, key, title, route }) => ({ kind, key, title, route }));
}

function* candidates(context: ViewContext): Generator<Candidate> {
  const { study } = context.proof;
  for (const { key, title, text } of study.all('requirement'))
    yield { kind: 'requirement', key, title, route: `requirements/${key}`, words: `${title} ${text}` };
  for (const { key, name, symbol } of study.all('quantity'))
    yield { kind: 'quantity', key, title: name, route: `quantities?select=${key}`, words: `${name} ${symbol}` };
  for (const { key, name, purpose } of study.all('analysis'))
    yield { kind: 'analysis', key, title: name, route: `analyses/${key}`, words: `${name} ${purpose}` };
  for (const change of study.all('change')) {
    if (!seesChange(context, change)) continue;
    const { key, title, reason } = change;
    yield { kind: 'change', key, title, route: `changes/${key}`, words: `${title} ${reason}` };
  }
  for (const { key, name, review } of study.all('baseline'))
    yield { kind: 'baseline', key, title: name, route: `baselines/${key}`, words: `${name} ${review}` };
  for (const { key, name, description } of study.all('element'))
    yield { kind: 'element', key, title: name, route: `product-tree?select=${key}`, words: `${name} ${description}` };
  for (const { key, title, reason, requirementId } of study.all('departure')) {
    const requirement = study.get('requirement', requirementId)?.key ?? '';
    yield { kind: 'departure', key, title, route: `requirements/${requirement}`, words: `${title} ${reason}` };
  }
}
