import { type ConflictField, type Side } from '../../ui/conflict/conflict-view';
import type { AnalysisText } from '../text/analysis-text';

const LABELS = {
  name: 'Name',
  purpose: 'Purpose',
  elementId: 'Element',
  assumptions: 'Assumptions',
  lines: 'Lines',
  inputs: 'Inputs',
  results: 'Results',
  method: 'Method',
} as const satisfies Partial<Record<keyof AnalysisText, string>>;
type Part = keyof typeof LABELS;
const PARTS = Object.keys(LABELS) as Part[];

/** Both sides of every part of an analysis, for the choice between them. */
export function conflictFields(theirs: AnalysisText, mine: AnalysisText): readonly ConflictField[] {
  return PARTS.map((part) => ({
    field: part,
    label: LABELS[part],
    theirs: inWords(theirs, part),
    mine: inWords(mine, part),
  }));
}

/** What was typed, with their part where that was chosen. */
export function withTheirs(
  mine: AnalysisText,
  theirs: AnalysisText,
  chosen: Readonly<Record<string, Side>>,
): AnalysisText {
  const taken = PARTS.filter((part) => chosen[part] === 'theirs');
  return { ...mine, ...Object.fromEntries(taken.map((part) => [part, theirs[part]])) };
}

function inWords(text: AnalysisText, part: Part): string {
  switch (part) {
    case 'lines':
      return text.lines.map((line) => `${line.text}${line.unit ? `  [${line.unit}]` : ''}`).join('\n');
    case 'inputs':
      return text.inputs.map(({ name, from }) => `${name} ← ${Object.values(from).join(' ')}`).join('\n');
    case 'results':
      return text.results.map(({ name, value, document }) => `${name} = ${value}, ${document}`).join('\n');
    case 'method':
      return text.method === null ? '' : `${text.method.id} ${text.method.version}`;
    default:
      return text[part];
  }
}
