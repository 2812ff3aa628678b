import fc from 'fast-check';
import type { Command } from '@shared/contract';
import { proveAll, proveFork, reprove, outputNodes, type Proof } from './prove';
import type { Study } from './study';
import { takeBaseline } from './testing/baselines';
import {
  ANALYST,
  ID,
  MEMBER,
  OWNER,
  edit,
  editingAs,
  emptyStudy,
  factsOf,
  formulaAnalysis,
  idOf,
  limit,
  quantity,
  requirement,
  smallStudy,
  verifiedBy,
  type Somebody,
} from './testing/small-study';
import { applyCommands } from './apply';
import { Refusal } from './refusal';

/** Everything derived, as plain data to compare bit by bit: Object.is semantics for numbers through their text. */
function derived(proof: Proof): unknown {
  const outcomes = outputNodes(proof.study).map((node) => [node, proof.model.outcome(node)]);
  return {
    proven: [...proof.proven].sort(([a], [b]) => (a < b ? -1 : 1)),
    outcomes,
    uncertain: [...proof.uncertain].sort(([a], [b]) => (a < b ? -1 : 1)),
  };
}

/** One edit as the server makes it: applied to a fork, re-proved, taken over. Refused edits leave everything as it was. */
function commit(proof: Proof, person: Somebody, commands: readonly Command[]): Proof {
  const fork = proof.study.fork();
  try {
    applyCommands(fork, commands, editingAs(person), factsOf(proof.study));
  } catch (error) {
    if (error instanceof Refusal) return proof;
    throw error;
  }
  const patch = fork.patch();
  const before = JSON.stringify(derived(proof));
  const reproof = reprove(proof, fork, patch);
  // Until the edit is committed the base is as before, to the bit.
  expect(JSON.stringify(derived(proof))).toBe(before);
  expect(derived(proveFork(proof, fork))).toEqual(derived(proveAll(fork)));
  proof.study.absorb(patch);
  return reproof.publish();
}

type Step = (study: Study) => { readonly person: Somebody; readonly commands: readonly Command[] };
const version = (
  study: Study,
  kind: 'quantity' | 'requirement' | 'analysis' | 'policy' | 'study',
  id: string,
): number => study.get(kind, id)?.version ?? 1;

/** Edits that touch every kind of thing a verdict rests on. */
const steps: fc.Arbitrary<Step> = fc.oneof(
  fc
    .record({
      id: fc.constantFrom(ID.isp, ID.dry, ID.propellant),
      value: fc.option(fc.double({ min: 1, max: 9000, noNaN: true }), { freq: 5 }),
    })
    .map(({ id, value }): Step => (study) => ({
      person: ANALYST,
      commands: [
        {
          type: 'quantity.set',
          id,
          version: version(study, 'quantity', id),
          value: value === null ? null : { text: String(value), unit: id === ID.isp ? 's' : 't' },
        },
      ],
    })),
  fc
    .record({
      id: fc.constantFrom(ID.isp, ID.dry, ID.propellant),
      half: fc.option(fc.double({ min: 0.001, max: 50, noNaN: true })),
    })
    .map(({ id, half }): Step => (study) => {
      const unit = id === ID.isp ? 's' : 't';
      const value = study.get('quantity', id)?.value;
      return {
        person: ANALYST,
        commands: [
          {
            type: 'quantity.set',
            id,
            version: version(study, 'quantity', id),
            value: value ? { text: value.text, unit: value.unit } : null,
            uncertainty:
              half === null ? null : { distribution: 'normal', halfWidth: { text: String(half), unit }, k: 2 },
          },
        ],
      };
    }),
  fc
    .record({ id: fc.constantFrom(ID.deltaV, ID.mass), value: fc.double({ min: 1, max: 200, noNaN: true }) })
    .map(({ id, value }): Step => (study) => ({
      person: OWNER,
      commands: [
        {
          type: 'requirement.revise',
          id,
          version: version(study, 'requirement', id),
          changes: {
            limit: limit(id === ID.mass ? 'at most' : 'at least', String(value), id === ID.mass ? 't' : 'km/s'),
          },
        },
      ],
    })),
  fc.integer({ min: 0, max: 40 }).map((percent): Step => (study) => ({
    person: OWNER,
    commands: [
      {
        type: 'policy.revise',
        id: ID.policy,
        version: version(study, 'policy', ID.policy),
        percent,
        absolute: null,
        definition: 'x',
        source: '',
      },
    ],
  })),
  fc.constantFrom(1, 2, 3).map((k): Step => (study) => ({
    person: OWNER,
    commands: [
      { type: 'study.configure', id: ID.settings, version: version(study, 'study', ID.settings), changes: { k } },
    ],
  })),
  fc
    .constantFrom('m_0 - m_p', 'm_0 - 2 * m_p', 'm_0 - 1.1 * m_p', 'sqrt(m_0 * m_p)')
    .map((expression): Step => (study) => {
      const { lines } = study.get('analysis', ID.transfer)!;
      const next = lines.map((line) => (line.name === 'm_f' ? { ...line, expression } : line));
      return {
        person: ANALYST,
        commands: [
          {
            type: 'analysis.revise',
            id: ID.transfer,
            version: version(study, 'analysis', ID.transfer),
            changes: { lines: next },
          },
        ],
      };
    }),
  fc.constantFrom('specific impulse', 'impulse').map((name): Step => (study) => ({
    person: ANALYST,
    commands: [{ type: 'quantity.revise', id: ID.isp, version: version(study, 'quantity', ID.isp), changes: { name } }],
  })),
  fc.boolean().map((link): Step => (study) => {
    const other = idOf(70);
    const linked = study.get('verification', other);
    if (link === Boolean(linked)) return { person: ANALYST, commands: [] };
    return {
      person: ANALYST,
      commands: linked
        ? [{ type: 'verification.unlink', id: other, version: linked.version }]
        : [verifiedBy(other, ID.outbound, ID.transfer, 'v_e', { deciding: true })],
    };
  }),
  fc.constant<Step>((study) => ({
    person: MEMBER,
    commands: [
      { type: 'analysis.check', id: ID.transfer, version: version(study, 'analysis', ID.transfer), remark: '' },
    ],
  })),
  fc.constantFrom<'no' | 'not assessed' | null>('no', 'not assessed', null).map((to): Step => (study) => ({
    person: OWNER,
    commands: [
      {
        type: 'assessment.lower',
        id: ID.deltaV,
        version: version(study, 'requirement', ID.deltaV),
        to,
        reason: 'for tests',
      },
    ],
  })),
);

describe('re-proving what an edit affects', () => {
  it('equals proving everything from scratch, bit by bit, after any series of edits', () => {
    fc.assert(
      fc.property(fc.array(steps, { minLength: 1, maxLength: 12 }), (series) => {
        let proof = proveAll(smallStudy());
        for (const step of series) {
          const { person, commands } = step(proof.study);
          proof = commit(proof, person, commands);
          expect(derived(proof)).toEqual(derived(proveAll(proof.study)));
        }
      }),
      { numRuns: 60 },
    );
  });

  it('finds slopes inside the what-if of an edit: U follows the masses, not only the verdict', () => {
    const proof = proveAll(smallStudy());
    const next = commit(proof, ANALYST, [
      { type: 'quantity.set', id: ID.propellant, version: 1, value: { text: '65', unit: 't' } },
    ]);
    // U = 2 × 9.80665 × 50 s × ln(130/65)
    expect(next.proven.get(ID.deltaV)!.expanded).toBeCloseTo(2 * 9.80665 * 50 * Math.log(2), 5);
  });

  it('names what changed and nothing else', () => {
    const proof = proveAll(smallStudy());
    const fork = proof.study.fork();
    applyCommands(
      fork,
      [{ type: 'quantity.set', id: ID.isp, version: 1, value: { text: '7000', unit: 's' } }],
      editingAs(ANALYST),
      factsOf(proof.study),
    );
    const { changed, outcomes } = reprove(proof, fork, fork.patch());
    expect([...changed.keys()]).toEqual([ID.deltaV]);
    expect([...outcomes.keys()].sort()).toEqual([`a:${ID.transfer}.Delta_v`, `a:${ID.transfer}.v_e`]);
  });

  it('changes nothing derived when the same value is typed again', () => {
    const proof = proveAll(smallStudy());
    const fork = proof.study.fork();
    applyCommands(
      fork,
      [{ type: 'quantity.set', id: ID.isp, version: 1, value: { text: '6500', unit: 's' }, basis: 'measured' }],
      editingAs(ANALYST),
      factsOf(proof.study),
    );
    expect(reprove(proof, fork, fork.patch()).changed.size).toBe(0);
  });
});

describe('the verdict of a requirement', () => {
  const proved = (study: Study) => proveAll(study).proven;
  const nothing = idOf(80);

  it('is no evidence when nothing is linked', () => {
    expect(proved(smallStudy()).get(ID.outbound)).toMatchObject({
      verdict: 'no evidence',
      compliance: 'not assessed',
      closeOut: 'open',
    });
  });

  it('is not computable when an input is missing, and says which', () => {
    const study = smallStudy();
    edit(study, ANALYST, { type: 'quantity.set', id: ID.isp, version: 1, value: null });
    const proven = proved(study).get(ID.deltaV)!;
    expect(proven.verdict).toBe('not computable');
    expect(proven.reason).toBe('specific impulse (Q-001) has no value');
  });

  it('says when no uncertainty is stated', () => {
    const proven = proved(smallStudy()).get(ID.mass)!;
    expect(proven.expanded).toBeNull();
    expect(proven.warnings).toContain('no uncertainty stated');
  });

  it('follows the worst of several verifications, and the deciding one when it is marked', () => {
    const study = smallStudy();
    // Delta-v of 39.1 km/s breaks the demand of at most 24.5 km/s; a budgeted 20 km/s keeps it.
    edit(
      study,
      ANALYST,
      quantity(idOf(81), 'v', '20', 'km/s'),
      formulaAnalysis(idOf(82), 'Budgeted', [{ name: 'v', from: { quantityId: idOf(81) } }], [['demand = v', 'km/s']]),
      verifiedBy(idOf(83), ID.outbound, ID.transfer, 'Delta_v'),
      verifiedBy(idOf(84), ID.outbound, idOf(82), 'demand'),
    );
    expect(proved(study).get(ID.outbound)).toMatchObject({ verdict: 'non-compliant', verificationId: idOf(83) });
    edit(study, ANALYST, {
      type: 'verification.revise',
      id: idOf(84),
      version: 1,
      changes: { deciding: true },
    });
    const decided = proved(study).get(ID.outbound)!;
    expect(decided).toMatchObject({ verdict: 'compliant', verificationId: idOf(84) });
    expect(decided.judgements.map(({ verdict }) => verdict)).toEqual(['non-compliant', 'compliant']);
  });

  it('lets no evidence come before all else among several', () => {
    const study = smallStudy();
    edit(study, OWNER, verifiedBy(idOf(83), ID.mass, '', '', { method: 'test', analysisId: null, output: null }));
    expect(proved(study).get(ID.mass)).toMatchObject({ verdict: 'no evidence', reason: 'the test has no finding yet' });
  });

  it('is the finding of a person where there is no limit, and says it is demonstrated', () => {
    const study = emptyStudy();
    edit(
      study,
      OWNER,
      requirement({ id: nothing, title: 'survive a puncture' }),
      verifiedBy(idOf(83), nothing, '', '', { method: 'inspection', analysisId: null, output: null }),
    );
    expect(proved(study).get(nothing)!.verdict).toBe('no evidence');
    edit(study, OWNER, {
      type: 'verification.record',
      id: idOf(83),
      version: 1,
      met: false,
      document: 'IR-7',
      issue: '2',
      note: '',
    });
    expect(proved(study).get(nothing)).toMatchObject({
      verdict: 'non-compliant',
      basis: 'demonstrated',
      compliance: 'no',
      reason: 'found not met by inspection, IR-7 issue 2',
    });
  });

  it('keeps the computed compliance beside a lowered one, and never raises it', () => {
    const study = smallStudy();
    edit(study, OWNER, {
      type: 'assessment.lower',
      id: ID.deltaV,
      version: study.get('requirement', ID.deltaV)!.version,
      to: 'no',
      reason: 'doubtful',
    });
    expect(proved(study).get(ID.deltaV)).toMatchObject({ computedCompliance: 'partial', compliance: 'no' });
    expect(() =>
      edit(study, OWNER, { type: 'assessment.lower', id: ID.mass, version: 1, to: 'yes', reason: 'wished' }),
    ).toThrow('a person may lower it, never raise it');
  });
});

describe('close-out', () => {
  it('reopens by itself when an input moves the result, and closes again when it moves back', () => {
    const study = smallStudy();
    edit(study, OWNER, {
      type: 'requirement.revise',
      id: ID.mass,
      version: 1,
      changes: { limit: limit('at most', '130', 't') },
    });
    takeBaseline(study, [ID.mass]);
    const version = study.get('requirement', ID.mass)!.version;
    edit(study, MEMBER, { type: 'assessment.close', id: ID.mass, version, reason: 'report seen' });
    expect(proveAll(study).proven.get(ID.mass)!.closeOut).toBe('closed');
    const patch = edit(study, ANALYST, {
      type: 'quantity.set',
      id: ID.dry,
      version: 1,
      value: { text: '66', unit: 't' },
    });
    expect(patch).toHaveLength(1);
    expect(proveAll(study).proven.get(ID.mass)!.closeOut).toBe('reopened');
    edit(study, ANALYST, { type: 'quantity.set', id: ID.dry, version: 2, value: { text: '65.0', unit: 't' } });
    expect(proveAll(study).proven.get(ID.mass)!.closeOut).toBe('closed');
  });
});
