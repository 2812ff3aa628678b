import type { OverviewView } from '@shared/contract';
import { numberWord } from './number-words';

/** What one input alone would have to become; `to` stands out. */
export interface MoveSentence {
  readonly key: string;
  readonly quantityKey: string;
  readonly before: string;
  readonly to: string;
  readonly after: string;
}

/**
 * "To bring VEH-002 within its limit, specific mass alone would have to fall from 8.9 kg/kW to **4.9 kg/kW**." Where that
 * is a factor of ten or more the sentence says by how many orders of magnitude.
 */
export function moveSentence(
  move: OverviewView['moves'][number],
  shown: (value: OverviewView['moves'][number]['from']) => string,
): MoveSentence {
  const direction = move.to.si > move.from.si ? 'rise' : 'fall';
  const name = lowerFirst(move.name);
  const decades = move.decades === null ? null : Math.round(Math.abs(move.decades));
  const size =
    decades === null || decades < 1
      ? ''
      : `, by about ${decades === 1 ? 'one order' : `${decades > 12 ? decades : numberWord(decades)} orders`} of magnitude`;
  return {
    key: move.key,
    quantityKey: move.quantityKey,
    before: ` within its limit, ${name} alone would have to ${direction} from ${shown(move.from)} to `,
    to: shown(move.to),
    after: `${size}.`,
  };
}

/** Lowers the first letter of a name inside a sentence, unless it is an abbreviation or a symbol. */
function lowerFirst(name: string): string {
  const [first = '', second = ''] = name;
  const isWord = second === second.toLowerCase() && second !== second.toUpperCase();
  return isWord ? first.toLowerCase() + name.slice(1) : name;
}
