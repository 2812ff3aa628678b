/** @jest-environment node */
import type { Verdict } from '@shared/contract';
import {
  applyCommands,
  blockingFindings,
  newId,
  outputNode,
  proveFork,
  Refusal,
  type Proof,
  type Proven,
} from '@shared/study';
import { MemoryExecutor } from './memory-executor';
import { seedDemonstration } from './index';

/** Reference figures of the demonstration as the product computes them; tolerances are half of the last digit quoted. */
const executor = new MemoryExecutor();
const NOW = new Date('2026-12-01T12:00:00Z');
const YEAR = 31_557_600;

beforeAll(() => seedDemonstration(executor, NOW));

function proofOf(study: string): Proof {
  return executor.held(study).proof;
}
function row(study: string, key: string, proof: Proof = proofOf(study)): Proven {
  return proof.proven.get(proof.study.byKey('requirement', key)!.id)!;
}
function output(study: string, analysisName: string, name: string): number {
  const proof = proofOf(study);
  const analysis = proof.study.all('analysis').find((candidate) => candidate.name === analysisName)!;
  const outcome = proof.model.outcome(outputNode(analysis.id, name));
  if (!outcome.ok) throw new Error(outcome.failure.message);
  return outcome.value;
}
function counts(study: string): Partial<Record<Verdict, number>> {
  const found: Partial<Record<Verdict, number>> = {};
  for (const { verdict } of proofOf(study).proven.values()) found[verdict] = (found[verdict] ?? 0) + 1;
  return found;
}
/** The study with a change request's edits applied, as the board sees it. */
function impact(study: string, changeKey: string): Proof {
  const proof = proofOf(study);
  const change = proof.study.byKey('change', changeKey)!;
  const fork = proof.study.fork();
  const context = {
    actorId: change.authorId,
    roles: [],
    at: NOW.toISOString(),
    newId,
    revision: executor.held(study).revision + 1,
    authority: 'proposal' as const,
    patchOf: () => null,
    personName: (id: string) => id,
  };
  applyCommands(fork, change.edits, context, () => {
    throw new Error('no row is assessed');
  });
  return proveFork(proof, fork);
}
/** The study with another specific impulse, as an analyst would set it. */
function withSpecificImpulse(seconds: number): Proof {
  const proof = proofOf('PETREL');
  const fork = proof.study.fork();
  const quantity = fork.all('quantity').find(({ symbol }) => symbol === 'I_sp')!;
  expect(quantity.state).toBe('working');
  fork.put('quantity', {
    ...quantity,
    version: quantity.version + 1,
    value: { text: String(seconds), unit: 's', si: seconds },
  });
  return proveFork(proof, fork);
}

describe('Petrel', () => {
  it('computes thrust, thrusting time and delta-v from one set of numbers', () => {
    // F = 2·0.68·1.0 MW/(6500 s·9.80665 m/s²) = 21.34 N; t = 55 t/(F/v_e) = 5.21 yr
    expect(row('PETREL', 'PRP-004').value).toBeCloseTo(21.3, 1);
    expect(row('PETREL', 'MIS-002').value! / YEAR).toBeCloseTo(5.2, 1);
    // 63.743 km/s · ln(120/65) = 39.08 km/s
    expect(Math.abs(row('PETREL', 'VEH-001').value! - 39_080)).toBeLessThan(10);
    expect(row('PETREL', 'VEH-001')).toMatchObject({ verdict: 'short margin', required: { percent: 5 } });
    expect(output('PETREL', 'Transfer delta-v', 'm_f')).toBeCloseTo(output('PETREL', 'Mass roll-up', 'm') - 55_000, 6);
  });

  it('misses its mass limit and says so', () => {
    expect(Math.abs(row('PETREL', 'VEH-002').value! - 120_000)).toBeLessThan(50);
    expect(row('PETREL', 'VEH-002').verdict).toBe('non-compliant');
  });

  it('leaves heat rejection indeterminate, punctures not computable and disposal without evidence', () => {
    // 0.88·σ·139.3 m²·(812⁴ − 50⁴) K⁴ = 3.02 MW; ±10 K alone is ±4.9 % of it
    expect(Math.abs(row('PETREL', 'RAD-002').value! - 3.02e6)).toBeLessThan(5e3);
    expect(row('PETREL', 'RAD-002').verdict).toBe('indeterminate');
    expect(row('PETREL', 'RAD-003').verdict).toBe('not computable');
    expect(row('PETREL', 'RAD-003').reason).toMatch(/puncture.*no value/);
    expect(row('PETREL', 'PRP-003').verdict).toBe('no evidence');
    expect(row('PETREL', 'MIS-001').margin).toMatchObject({ absolute: 0, atLimit: true });
  });

  it('holds the other requirements, but for the boil-off that a direct edit turned', () => {
    expect(counts('PETREL')).toEqual({
      compliant: 40,
      'short margin': 1,
      'non-compliant': 2,
      indeterminate: 1,
      'not computable': 1,
      'no evidence': 2,
    });
    expect(row('PETREL', 'TNK-004')).toMatchObject({ verdict: 'non-compliant', closeOut: 'reopened' });
    const { study } = proofOf('PETREL');
    expect(study.byKey('departure', 'DEV-001')).toMatchObject({ state: 'in force' });
    const turned = executor.held('PETREL').turned;
    expect([...turned.values()].flat()).toEqual(expect.arrayContaining(['VEH-001', 'VEH-002', 'TNK-004']));
  });

  it('draws the delta-v limit on by three demands with 2.0 km/s in reserve', () => {
    const { study } = proofOf('PETREL');
    const parent = study.byKey('requirement', 'VEH-001')!;
    expect(parent.budget).toEqual({ rule: 'sum', sense: 'demands' });
    const shares = study
      .find('trace', 'parentId', parent.id)
      .filter(({ share }) => share === 'adopted')
      .map(({ childId }) => study.get('requirement', childId)!.limit!.value.si);
    expect(shares).toEqual([24_500, 9_500, 2_000]);
    expect(parent.limit!.value.si - shares.reduce((sum, share) => sum + share, 0)).toBe(2_000);
  });

  it('turns with the specific impulse that an analyst sets', () => {
    // 5 % over 38.0 km/s is 39.9 km/s, reached at 39.9/0.6131/g_0 = 6636 s
    expect(row('PETREL', 'VEH-001', withSpecificImpulse(6700)).verdict).toBe('compliant');
    expect(row('PETREL', 'VEH-001', withSpecificImpulse(6200)).verdict).toBe('non-compliant');
  });

  it('shows the board what the cooler radiator would do', () => {
    const after = impact('PETREL', 'CR-003');
    expect(row('PETREL', 'RAD-002', after).verdict).toBe('compliant');
    expect(row('PETREL', 'VEH-001', after).verdict).toBe('indeterminate');
    expect(row('PETREL', 'VEH-003', after).verdict).toBe('short margin');
    expect(proofOf('PETREL').study.byKey('change', 'CR-003')).toMatchObject({ state: 'before the board', class: 1 });
  });

  it('has an approved change and one in conflict', () => {
    const { study } = proofOf('PETREL');
    expect(study.byKey('change', 'CR-001')!.state).toBe('approved');
    expect(study.byKey('change', 'CR-002')!.state).toBe('submitted');
    expect(() => impact('PETREL', 'CR-002')).toThrow(Refusal);
    expect(study.all('baseline').map(({ key }) => key)).toEqual(['B1', 'B2']);
  });
});

describe('Longreach', () => {
  it('needs a mass ratio of 2.42 and releases 2.0e14 W', () => {
    // exp(artanh 0.3/0.35) = exp(0.3095/0.35) = 2.421; 142.1 t·c²/2 yr = 2.02e14 W
    expect(row('LONGREACH', 'PRB-001').value).toBeCloseTo(2.42, 2);
    expect(Math.abs(output('LONGREACH', 'Energy per second at the engine', 'P') - 2.02e14)).toBeLessThan(5e11);
  });

  it('rejects one part in 79 of what the structure absorbs', () => {
    // 0.9·σ·(1500 K)⁴·2π·30 m·200 m = 9.74 GW of 0.38·0.01·2.02e14 W = 769 GW
    expect(Math.abs(output('LONGREACH', 'Share of the absorbed heat rejected', 'N') - 79)).toBeLessThan(0.5);
    // In balance 79^(1/4) = 2.98 times hotter than 1500 K
    expect(Math.abs(row('LONGREACH', 'RAD-001').value! - 4472)).toBeLessThan(10);
  });

  it('does not close, and says by which requirements', () => {
    expect(counts('LONGREACH')).toEqual({ compliant: 6, 'non-compliant': 4 });
    for (const key of ['PRB-002', 'ENG-001', 'RAD-001', 'SHD-001'])
      expect(row('LONGREACH', key).verdict).toBe('non-compliant');
  });
});

describe('Cinder', () => {
  it('complies and is closed out in every row', () => {
    expect(counts('CINDER')).toEqual({ compliant: 11 });
    for (const { closeOut } of proofOf('CINDER').proven.values()) expect(closeOut).toBe('closed');
    const { study } = proofOf('CINDER');
    expect(study.all('baseline').map(({ key }) => key)).toEqual(['B1']);
    for (const analysis of study.all('analysis')) expect(analysis.check).not.toBeNull();
  });

  it('computes delta-v from the mass that the roll-up gives', () => {
    // 900 s·g_0·ln(57.9/33.9) = 4.72 km/s
    expect(Math.abs(row('CINDER', 'STG-001').value! - 4_720)).toBeLessThan(10);
  });
});

describe('every study', () => {
  it('states each requirement without a wording finding that would stop it', () => {
    for (const { study } of executor.studies.values())
      for (const requirement of study.all('requirement')) expect(blockingFindings(requirement)).toEqual([]);
  });

  it('ends its history before now', () => {
    for (const { study } of executor.studies.values())
      for (const { at } of study.all('baseline')) expect(new Date(at).getTime()).toBeLessThan(NOW.getTime());
  });
});
