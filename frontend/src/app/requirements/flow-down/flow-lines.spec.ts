import type { FlowRow } from '@shared/contract';
import { type FlowFilter, flowLines, nextLine, pathsAbove } from './flow-lines';

const WIDE: FlowFilter = { text: '', verdict: '', state: '' };

function row(path: string, verdict: FlowRow['verdict'] = 'compliant', more: Partial<FlowRow> = {}): FlowRow {
  const key = path.split('/').at(-1) ?? path;
  return {
    path,
    key,
    title: `Title of ${key}`,
    verdict,
    depth: path.split('/').length - 1,
    state: 'baselined',
    changePending: [],
    toBeResolved: false,
    element: null,
    budget: null,
    ...more,
  } as FlowRow;
}

const ROWS = [
  row('MIS-001'),
  row('MIS-001/VEH-001', 'short margin'),
  row('MIS-001/VEH-001/PRP-001'),
  row('MIS-002', 'no evidence'),
];
const NONE: ReadonlySet<string> = new Set();
const ids = (lines: ReturnType<typeof flowLines>) => lines.map((line) => line.id);

describe('flowLines', () => {
  it('lists everything, and nothing below what is closed', () => {
    expect(ids(flowLines(ROWS, WIDE, NONE, null))).toEqual(ROWS.map(({ path }) => path));
    expect(ids(flowLines(ROWS, WIDE, new Set(['MIS-001/VEH-001']), null))).toEqual([
      'MIS-001',
      'MIS-001/VEH-001',
      'MIS-002',
    ]);
    expect(ids(flowLines(ROWS, WIDE, new Set(['MIS-001']), null))).toEqual(['MIS-001', 'MIS-002']);
  });

  it('keeps the parents that lead to a match, and tells them apart', () => {
    const lines = flowLines(ROWS, { ...WIDE, verdict: 'short margin' }, NONE, null);
    expect(lines.map((line) => line.kind === 'requirement' && [line.id, line.matches])).toEqual([
      ['MIS-001', false],
      ['MIS-001/VEH-001', true],
    ]);
    expect(ids(flowLines(ROWS, { ...WIDE, text: 'prp title' }, NONE, null))).toContain('MIS-001/VEH-001/PRP-001');
    expect(flowLines(ROWS, { ...WIDE, state: 'to be resolved' }, NONE, null)).toEqual([]);
  });

  it('makes room for two lines of budget below the row that is unfolded', () => {
    const withBudget = [row('MIS-001', 'compliant', { budget: {} as FlowRow['budget'] }), row('MIS-002')];
    expect(flowLines(withBudget, WIDE, NONE, 'MIS-001').map((line) => line.kind)).toEqual([
      'requirement',
      'budget',
      'room',
      'requirement',
    ]);
    expect(flowLines(withBudget, WIDE, NONE, 'MIS-002').map((line) => line.kind)).toEqual([
      'requirement',
      'requirement',
    ]);
  });
});

describe('moving in the flow-down', () => {
  it('steps over the budget and stops at the ends', () => {
    const withBudget = [row('MIS-001', 'compliant', { budget: {} as FlowRow['budget'] }), row('MIS-002')];
    const lines = flowLines(withBudget, WIDE, NONE, 'MIS-001');
    expect(nextLine(lines, 0, 'ArrowDown')).toBe(3);
    expect(nextLine(lines, 3, 'ArrowUp')).toBe(0);
    expect(nextLine(lines, 3, 'ArrowDown')).toBe(3);
    expect([nextLine(lines, 0, 'End'), nextLine(lines, 3, 'Home')]).toEqual([3, 0]);
  });

  it('knows the way up, nearest first', () => {
    expect(pathsAbove('MIS-001/VEH-001/PRP-001')).toEqual(['MIS-001/VEH-001', 'MIS-001']);
  });
});
