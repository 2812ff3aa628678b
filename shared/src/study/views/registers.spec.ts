import type { Verdict } from '@shared/contract';
import { takeBaseline } from '../testing/baselines';
import {
  ANALYST,
  CHAIR,
  ID,
  OWNER,
  PEOPLE,
  READER,
  edit,
  idOf,
  limit,
  quantity,
  requirement,
  smallStudy,
  viewOf,
} from '../testing/small-study';
import { baselinesView } from './baselines-view';
import { bindableView } from './bindable-view';
import { productTreeView } from './product-tree-view';
import { searchView } from './search-view';
import { studyHead } from './study-head';

describe('the head of a study', () => {
  it('names the baseline in force, the people and what the person may look at', () => {
    const study = smallStudy();
    edit(study, OWNER, { type: 'change.write', title: 'Mine', reason: '', due: null, edits: [] });
    takeBaseline(study, [ID.deltaV]);
    const baseline = { key: 'B1', revision: 7, verdicts: new Map<string, Verdict>() };
    const members = PEOPLE.map((person) => ({ ...person, roles: [...person.roles] }));
    const head = studyHead(viewOf(study, OWNER, { baseline }), members);
    expect(head).toMatchObject({
      baselineInForce: { key: 'B1', name: 'Concept', review: 'Concept review' },
      verdicts: 3,
      drafts: [{ key: 'CR-001', mine: true, state: 'draft' }],
      me: { name: OWNER.name },
      roles: ['requirements-owner'],
    });
    expect(head.members).toHaveLength(PEOPLE.length);
    expect(head.policies).toHaveLength(1);
    expect(studyHead(viewOf(study, ANALYST), members).drafts).toEqual([]);
    expect(studyHead(viewOf(study, CHAIR), members)).toMatchObject({
      baselineInForce: null,
      drafts: [{ key: 'CR-001', mine: false }],
    });
  });
});

describe('the product tree', () => {
  it('lists elements from the top down with the worst verdict at or below', () => {
    const study = smallStudy();
    edit(
      study,
      OWNER,
      { type: 'element.create', id: idOf(12), key: 'RAD', name: 'Radiators', parentId: ID.vehicle, description: '' },
      requirement({ id: idOf(80), title: 'float free' }),
    );
    const { rows, unallocated } = productTreeView(viewOf(study));
    expect(rows.map(({ key, depth, worst, quantities }) => [key, depth, worst, quantities])).toEqual([
      ['VEH', 0, 'non-compliant', 1],
      ['PRP', 1, 'no evidence', 2],
      ['RAD', 1, null, 0],
    ]);
    expect(rows[0]!.requirements.map(({ key, verdict }) => [key, verdict])).toEqual([
      ['VEH-001', 'short margin'],
      ['VEH-002', 'non-compliant'],
    ]);
    expect(unallocated.map(({ key }) => key)).toEqual(['VEH-003']);
  });

  it('leaves out what is withdrawn', () => {
    const study = smallStudy();
    edit(study, OWNER, { type: 'requirement.withdraw', id: ID.outbound, version: 1, reason: 'gone' });
    expect(productTreeView(viewOf(study)).rows.map(({ worst }) => worst)).toEqual(['non-compliant', null]);
  });
});

describe('what an input can be bound to', () => {
  it('lists quantities and outputs with dimension and present value in SI', () => {
    const study = smallStudy();
    edit(study, ANALYST, quantity(idOf(80), 'T_r', null, 'K'));
    const { quantities, outputs } = bindableView(viewOf(study));
    expect(quantities.map(({ key, dimension, si }) => [key, dimension, si])).toEqual([
      ['Q-001', 'time', 6500],
      ['Q-002', 'mass', 65000],
      ['Q-003', 'mass', 55000],
      ['Q-004', 'temperature', null],
    ]);
    expect(outputs.map(({ key, output, dimension }) => [key, output, dimension])).toEqual([
      ['AN-001', 'm_0', 'mass'],
      ['AN-002', 'v_e', 'speed'],
      ['AN-002', 'm_f', 'mass'],
      ['AN-002', 'Delta_v', 'speed'],
    ]);
    expect(outputs[0]!.si).toBe(120000);
  });
});

describe('baselines', () => {
  it('are listed newest first, with what a new one would take in', () => {
    const study = smallStudy();
    edit(study, ANALYST, quantity(idOf(80), 'x', '1', 'm'));
    takeBaseline(study, [ID.deltaV], { quantityIds: [ID.isp] });
    takeBaseline(study, [ID.mass]);
    const counts = { compliant: 2 } as unknown as Record<Verdict, number>;
    const view = baselinesView(viewOf(study), new Map([['B1', counts]]));
    expect(view.rows.map(({ key, person }) => [key, person.name])).toEqual([
      ['B2', CHAIR.name],
      ['B1', CHAIR.name],
    ]);
    expect(view.rows[1]!.counts).toBe(counts);
    expect(view.rows[0]!.counts.compliant).toBe(0);
    expect(view.candidates.requirements.map(({ key, state }) => [key, state])).toEqual([['PRP-001', 'in preparation']]);
    // I_sp is controlled, x bears on nothing.
    expect(view.candidates.quantities.map(({ key, bearsOn }) => [key, bearsOn])).toEqual([
      ['Q-002', 2],
      ['Q-003', 2],
    ]);
  });
});

describe('search', () => {
  const hits = (q: string, study = smallStudy()) => searchView(viewOf(study), q).map(({ key, route }) => [key, route]);

  it('finds keys by their beginning first, in any case', () => {
    expect(hits('veh')).toEqual([
      ['VEH', 'product-tree?select=VEH'],
      ['VEH-001', 'requirements/VEH-001'],
      ['VEH-002', 'requirements/VEH-002'],
      // its statement begins “The vehicle shall”
      ['PRP-001', 'requirements/PRP-001'],
    ]);
    expect(hits('an-002')).toEqual([['AN-002', 'analyses/AN-002']]);
    expect(hits('Q-00')).toHaveLength(3);
  });

  it('finds by every word, titles before texts', () => {
    expect(hits('impulse specific')).toEqual([['Q-001', 'quantities?select=Q-001']]);
    expect(hits('mass').map(([key]) => key)).toEqual(['AN-001', 'Q-002', 'VEH-002']);
    expect(hits('mass unicorn')).toEqual([]);
    expect(hits('  ')).toEqual([]);
  });

  it('gives twenty at most and hides drafts of others', () => {
    const study = smallStudy();
    for (let i = 0; i < 25; i++)
      edit(study, OWNER, requirement({ id: idOf(200 + i), title: 'repeat', limit: limit('at most', '1', 't') }));
    expect(hits('repeat', study)).toHaveLength(20);
    edit(study, OWNER, { type: 'change.write', title: 'Secret plan', reason: '', due: null, edits: [] });
    expect(hits('secret', study)).toEqual([]);
    expect(searchView(viewOf(study, OWNER), 'secret')).toEqual([
      { kind: 'change', key: 'CR-001', title: 'Secret plan', route: 'changes/CR-001' },
    ]);
    expect(READER.roles).not.toContain('board-member');
  });
});
