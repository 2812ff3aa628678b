import type { BindableView, RequirementSheet } from '@shared/contract';
import { stateLine } from './state-line';
import { outputsFor } from './verification-acts';

describe('stateLine', () => {
  it('says where it stands, on which level, and whose it is', () => {
    const sheet = {
      state: 'baselined' as const,
      baselinedIn: 'B2',
      owner: { id: 'p1', name: 'Ines Okafor' },
      coOwners: [],
      level: 'vehicle',
      element: null,
    };
    expect(stateLine(sheet)).toBe(
      'baselined in B2 · changes go through the board · vehicle · allocated to no element · owned by Ines Okafor',
    );
    expect(stateLine({ ...sheet, state: 'in preparation', baselinedIn: null })).toContain('in preparation · vehicle');
  });
});

describe('outputsFor', () => {
  const output = (name: string, dimension: string): BindableView['outputs'][number] => ({
    analysisId: 'a1',
    key: 'AN-001',
    output: name,
    name,
    unit: '',
    dimension,
    si: 1,
  });
  const sheet = {
    limit: {
      relation: 'at least',
      value: { text: '38', unit: 'km/s', si: 38_000 },
      upper: null,
      tolerance: null,
      temperature: 'absolute',
      condition: '',
    },
    verifications: [{ analysisId: 'a1', output: 'taken' }] as unknown as RequirementSheet['verifications'],
  } as const;

  it('offers what has the dimension of the limit and is not linked yet', () => {
    const outputs = [output('dv', 'speed'), output('taken', 'speed'), output('m', 'mass')];
    expect(outputsFor(sheet, outputs).map((one) => one.output)).toEqual(['dv']);
    expect(outputsFor({ ...sheet, limit: null }, outputs)).toEqual([]);
  });
});
