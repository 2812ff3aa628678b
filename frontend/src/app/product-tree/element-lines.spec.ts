import type { ElementRow } from '@shared/contract';
import { above, branchOf, elementLines } from './element-lines';

function element(id: string, parentId: string | null, depth: number): ElementRow {
  return {
    ...{ id, version: 1, key: id.toUpperCase(), name: id, description: '', parentId, depth },
    ...{ requirements: [], quantities: 0, worst: null },
  };
}
const ROWS = [element('veh', null, 0), element('prp', 'veh', 1), element('tank', 'prp', 2), element('rad', 'veh', 1)];

describe('the tree on screen', () => {
  it('leaves out what lies below a closed element, however deep', () => {
    expect(elementLines(ROWS, new Set(['prp'])).map(({ row }) => row.id)).toEqual(['veh', 'prp', 'rad']);
    expect(elementLines(ROWS, new Set(['veh'])).map(({ row }) => row.id)).toEqual(['veh']);
  });

  it('knows which elements can be opened', () => {
    expect(elementLines(ROWS, new Set()).map(({ hasChildren }) => hasChildren)).toEqual([true, true, false, false]);
  });

  it('finds the branch below an element and the way up', () => {
    expect(branchOf(ROWS, 'prp').map(({ id }) => id)).toEqual(['prp', 'tank']);
    expect(above(ROWS, 'tank').map(({ id }) => id)).toEqual(['prp', 'veh']);
  });
});
