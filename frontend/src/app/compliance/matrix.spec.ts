import type { MatrixRow } from '@shared/contract';
import { type MatrixFilter, choicesOf, filtered } from './matrix-filter';
import { matrixTableText } from './matrix-table-text';

const NOTHING: MatrixFilter = { verdict: '', compliance: '', method: '', element: '', owner: '', q: '' };

function row(part: Partial<MatrixRow>): MatrixRow {
  return {
    id: '1',
    version: 1,
    key: 'VEH-001',
    title: 'Provide total delta-v',
    text: 'The vehicle shall provide a total delta-v of at least 38 km/s.',
    parents: [],
    limit: null,
    method: 'analysis',
    level: 'vehicle',
    stage: '',
    criterion: '',
    verdict: 'short margin',
    value: null,
    expanded: null,
    k: 2,
    policy: '',
    margin: null,
    required: null,
    compliance: 'partial',
    basis: 'predicted',
    evidence: 'AN-001 version 3',
    placard: '',
    departure: '',
    closeOut: 'open',
    reason: '',
    owner: 'Ines Okafor',
    signature: '',
    element: 'Vehicle',
    state: 'baselined',
    ...part,
  };
}
const ROWS = [
  row({}),
  row({ key: 'RAD-002', title: 'Reject waste heat', method: 'analysis, test', element: 'Radiator' }),
];
const keys = (filter: Partial<MatrixFilter>) => filtered(ROWS, { ...NOTHING, ...filter }).map(({ key }) => key);

describe('the filter of the matrix', () => {
  it('passes everything when it asks for nothing', () => {
    expect(keys({})).toEqual(['VEH-001', 'RAD-002']);
  });

  it('narrows by each part, a method by any of the methods of a row', () => {
    expect(keys({ method: 'test' })).toEqual(['RAD-002']);
    expect(keys({ method: 'analysis' })).toEqual(['VEH-001', 'RAD-002']);
    expect(keys({ element: 'Vehicle' })).toEqual(['VEH-001']);
    expect(keys({ verdict: 'compliant' })).toEqual([]);
    expect(keys({ q: 'heat rad' })).toEqual(['RAD-002']);
  });

  it('offers what occurs, once and in order', () => {
    expect(choicesOf(ROWS, 'method')).toEqual(['analysis', 'test']);
    expect(choicesOf(ROWS, 'element')).toEqual(['Radiator', 'Vehicle']);
  });
});

describe('the matrix for a spreadsheet', () => {
  it('keeps numbers bare, in the unit of the limit, and texts inert', () => {
    const limited = row({
      title: '=HYPERLINK("x")',
      limit: {
        relation: 'at least',
        value: { text: '38', unit: 'km/s', si: 38_000 },
        upper: null,
        tolerance: null,
        temperature: 'absolute',
        condition: '',
      },
      value: { si: 36_480, unit: 'km/s' },
      // 36.48 km/s against at least 38 km/s: 1.52 km/s short, which is 4 % of the limit.
      margin: { absolute: -1_520, percent: -4, percentOf: 'of the limit', atLimit: false },
    });
    const [, line = ''] = matrixTableText([limited]).split('\n');
    const cells = line.split('\t');
    expect(cells.slice(1, 9)).toEqual([`'=HYPERLINK("x")`, 'at least', '38', '36.48', '', 'km/s', '-1.52', '-4']);
  });
});
