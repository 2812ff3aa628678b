import type { Command } from '@shared/contract';
import { refused } from '../testing/refused';
import { reviewedStudy, seen } from '../testing/reviewed-study';
import { ANALYST, CHAIR, ID, MEMBER, OWNER, edit, idOf, limit, requirement, smallStudy } from '../testing/small-study';

const revise = (id: string, version: number, changes: object): Command => ({
  type: 'requirement.revise',
  id,
  version,
  changes,
});

describe('writing a requirement', () => {
  it('gives keys by prefix that are never issued again', () => {
    const study = smallStudy();
    edit(study, OWNER, requirement({ id: idOf(80), title: 'a' }));
    expect(study.get('requirement', idOf(80))!.key).toBe('VEH-003');
    edit(study, OWNER, { type: 'requirement.withdraw', ...seen(study, 'requirement', idOf(80)), reason: 'no' });
    edit(study, OWNER, requirement({ id: idOf(81), title: 'b' }));
    expect(study.get('requirement', idOf(81))!.key).toBe('VEH-004');
  });

  it('takes the prefix from the element, and asks for one where there is none', () => {
    const study = smallStudy();
    const { prefix: _prefix, ...bare } = requirement({ id: idOf(80), title: 'a' }) as never as Record<string, unknown>;
    edit(study, OWNER, { ...bare, elementId: ID.propulsion } as never);
    expect(study.get('requirement', idOf(80))!.key).toBe('PRP-002');
    expect(refused(study, OWNER, { ...bare, id: idOf(81) } as never).details.field).toBe('prefix');
    expect(refused(study, OWNER, requirement({ id: idOf(81), title: 'a', prefix: 'CR' })).details.field).toBe('prefix');
  });

  it('links each parent once, and none that is withdrawn or elsewhere', () => {
    const study = smallStudy();
    edit(study, OWNER, requirement({ id: idOf(80), title: 'a', parentIds: [ID.mass, ID.mass] }));
    expect(study.find('trace', 'childId', idOf(80))).toHaveLength(1);
    const foreign = refused(study, OWNER, requirement({ id: idOf(81), title: 'b', parentIds: [idOf(777)] }));
    expect(foreign).toMatchObject({ code: 'invalid', details: { field: 'parentIds', value: idOf(777) } });
    edit(study, OWNER, { type: 'requirement.withdraw', ...seen(study, 'requirement', ID.outbound), reason: 'no' });
    expect(refused(study, OWNER, requirement({ id: idOf(81), title: 'b', parentIds: [ID.outbound] })).code).toBe(
      'state',
    );
  });

  it('refuses an unknown level and an element of another study', () => {
    const study = smallStudy();
    const level = refused(study, OWNER, requirement({ id: idOf(80), title: 'a', level: 'galaxy' }));
    expect(level.details).toMatchObject({ field: 'level', value: 'galaxy' });
    expect(level.message).toContain('mission, vehicle, system, unit');
    expect(refused(study, OWNER, requirement({ id: idOf(80), title: 'a', elementId: idOf(777) })).details.field).toBe(
      'elementId',
    );
  });
});

describe('a limit', () => {
  const withLimit = (value: ReturnType<typeof limit>) => requirement({ id: idOf(80), title: 'a', limit: value });

  it('is refused with an unknown unit, naming the unit and the nearest known one', () => {
    const refusal = refused(smallStudy(), OWNER, withLimit(limit('at most', '5', 'Km/s')));
    expect(refusal).toMatchObject({ code: 'invalid', details: { field: 'limit.value', value: 'Km/s' } });
    expect(refusal.message).toContain('km');
  });

  it('is refused when it is not a number', () => {
    const refusal = refused(smallStudy(), OWNER, withLimit(limit('at most', 'five', 'km/s')));
    expect(refusal).toMatchObject({ code: 'invalid', details: { field: 'limit.value' } });
  });

  it('between needs its upper end above the lower, in the same dimension', () => {
    const study = smallStudy();
    const end = (upper?: { text: string; unit: string }) =>
      withLimit(limit('between', '5', 'km', upper ? { upper } : {}));
    expect(refused(study, OWNER, end()).details.field).toBe('limit.upper');
    expect(refused(study, OWNER, end({ text: '4000', unit: 'm' })).message).toContain('above the lower end');
    const other = refused(study, OWNER, end({ text: '6', unit: 'kg' }));
    expect(other.message).toMatch(/a mass.*a length/);
    edit(study, OWNER, end({ text: '6000', unit: 'm' }));
    expect(study.get('requirement', idOf(80))!.limit!.upper!.si).toBe(6000);
  });

  it('equal within needs a tolerance above zero', () => {
    const study = smallStudy();
    expect(refused(study, OWNER, withLimit(limit('equal within', '5', 'km'))).details.field).toBe('limit.tolerance');
    const zero = limit('equal within', '5', 'km', { tolerance: { text: '0', unit: 'm' } });
    expect(refused(study, OWNER, withLimit(zero)).details.field).toBe('limit.tolerance');
  });

  it('keeps the dimension of what verifies it', () => {
    const study = smallStudy();
    const refusal = refused(study, OWNER, revise(ID.mass, 1, { limit: limit('at most', '3', 'km') }));
    expect(refusal.details.field).toBe('changes.limit.value');
    expect(refusal.message).toMatch(/VEH-002 is verified by AN-001 m_0, which is a mass/);
    edit(study, OWNER, revise(ID.mass, 1, { limit: limit('at most', '255735', 'lb') }));
  });

  it('cannot be taken from a requirement with a budget', () => {
    const refusal = refused(smallStudy(), OWNER, revise(ID.deltaV, 2, { limit: null }));
    expect(refusal.message).toContain('carries a budget');
  });
});

describe('editing a requirement', () => {
  it('is refused on a stale version, with what it is now and nothing applied', () => {
    const study = smallStudy();
    edit(study, OWNER, revise(ID.mass, 1, { title: 'first' }));
    const refusal = refused(study, OWNER, revise(ID.mass, 1, { title: 'second' }));
    expect(refusal).toMatchObject({
      code: 'stale',
      details: { value: '1', expected: '2', current: { title: 'first' } },
    });
    expect(refusal.message).toContain('VEH-002');
    expect(study.get('requirement', ID.mass)!.title).toBe('first');
  });

  it('is for its owner and co-owners in preparation', () => {
    const study = smallStudy();
    const other = { ...ANALYST, roles: ['requirements-owner'] as const };
    expect(refused(study, other, revise(ID.mass, 1, { title: 'mine' }))).toMatchObject({ code: 'forbidden' });
    edit(study, OWNER, revise(ID.mass, 1, { coOwnerIds: [ANALYST.id] }));
    edit(study, other, revise(ID.mass, 2, { title: 'ours' }));
    expect(study.get('requirement', ID.mass)!.title).toBe('ours');
  });

  it('is for nobody in review', () => {
    const study = smallStudy();
    edit(study, OWNER, { type: 'requirement.submit', ...seen(study, 'requirement', ID.mass) });
    const refusal = refused(study, OWNER, revise(ID.mass, 2, { title: 'late' }));
    expect(refusal).toMatchObject({ code: 'state' });
    expect(refusal.message).toContain('return it to preparation');
    edit(study, MEMBER, { type: 'requirement.return', id: ID.mass, version: 2, reason: 'unclear' });
    edit(study, OWNER, revise(ID.mass, 3, { title: 'in time' }));
  });

  it('of a baselined one needs a change request, withdrawal and budget included', () => {
    const study = reviewedStudy();
    const at = seen(study, 'requirement', ID.deltaV);
    for (const command of [
      revise(at.id, at.version, { title: 'x' }),
      { type: 'requirement.withdraw', ...at, reason: 'x' },
      { type: 'budget.set', ...at, budget: null },
    ] as Command[]) {
      const refusal = refused(study, OWNER, command);
      expect(refusal.code).toBe('controlled');
      expect(refusal.message).toContain('Raise a change request');
    }
  });

  it('of a withdrawn one is refused for good', () => {
    const study = smallStudy();
    edit(study, OWNER, { type: 'requirement.withdraw', ...seen(study, 'requirement', ID.outbound), reason: 'no' });
    const at = seen(study, 'requirement', ID.outbound);
    expect(refused(study, OWNER, revise(at.id, at.version, { title: 'x' })).code).toBe('state');
    expect(refused(study, OWNER, { type: 'requirement.withdraw', ...at, reason: 'x' }).code).toBe('state');
  });

  it('withdraws none that is flowed down to others', () => {
    const study = smallStudy();
    const refusal = refused(study, OWNER, {
      type: 'requirement.withdraw',
      ...seen(study, 'requirement', ID.deltaV),
      reason: 'x',
    });
    expect(refusal.code).toBe('in-use');
    expect(refusal.message).toContain('PRP-001');
  });
});

describe('submitting a requirement', () => {
  const submit = (study: ReturnType<typeof smallStudy>): Command => ({
    type: 'requirement.submit',
    ...seen(study, 'requirement', idOf(80)),
  });

  it.each([
    ['no “shall”', { text: 'The vehicle is light.' }, 'text'],
    ['two of them', { text: 'It shall fly and shall land.' }, 'text'],
    ['no rationale', { rationale: '' }, 'rationale'],
  ])('is refused with %s', (_case, fields, field) => {
    const study = smallStudy();
    edit(study, OWNER, requirement({ id: idOf(80), title: 'a', ...fields }));
    const refusal = refused(study, OWNER, submit(study));
    expect(refusal).toMatchObject({ code: 'invalid', details: { field } });
  });

  it('is possible once, from preparation', () => {
    const study = smallStudy();
    edit(study, OWNER, requirement({ id: idOf(80), title: 'a' }));
    edit(study, OWNER, submit(study));
    expect(refused(study, OWNER, submit(study)).code).toBe('state');
    edit(study, CHAIR, { type: 'requirement.return', ...seen(study, 'requirement', idOf(80)), reason: 'x' });
    expect(
      refused(study, CHAIR, { type: 'requirement.return', ...seen(study, 'requirement', idOf(80)), reason: 'x' }).code,
    ).toBe('state');
  });
});

describe('the flow-down', () => {
  it('refuses a circle by its path, a pair twice, and a requirement below itself', () => {
    const study = smallStudy();
    edit(study, OWNER, requirement({ id: idOf(80), title: 'a', prefix: 'PRP', parentIds: [ID.outbound] }));
    const circle = refused(study, OWNER, { type: 'trace.link', parentId: idOf(80), childId: ID.deltaV });
    expect(circle.code).toBe('cycle');
    expect(circle.message).toContain('VEH-001 → PRP-001 → PRP-002 → VEH-001');
    expect(refused(study, OWNER, { type: 'trace.link', parentId: ID.mass, childId: ID.mass }).code).toBe('cycle');
    expect(refused(study, OWNER, { type: 'trace.link', parentId: ID.deltaV, childId: ID.outbound }).details.field).toBe(
      'childId',
    );
  });

  it('refuses both ends of another study', () => {
    const study = smallStudy();
    expect(refused(study, OWNER, { type: 'trace.link', parentId: idOf(777), childId: ID.mass }).details.field).toBe(
      'parentId',
    );
    expect(refused(study, OWNER, { type: 'trace.link', parentId: ID.mass, childId: idOf(777) }).details.field).toBe(
      'childId',
    );
  });
});

describe('budgets', () => {
  it('need a limit to share out', () => {
    const study = smallStudy();
    edit(study, OWNER, requirement({ id: idOf(80), title: 'a' }));
    const refusal = refused(study, OWNER, {
      type: 'budget.set',
      id: idOf(80),
      version: 1,
      budget: { rule: 'sum', sense: 'shares' },
    });
    expect(refusal.message).toContain('give the requirement one first');
  });

  it('take shares of their dimension from children with a limit', () => {
    const study = smallStudy();
    edit(
      study,
      OWNER,
      requirement({ id: idOf(80), title: 'heavy', limit: limit('at most', '1', 't') }),
      requirement({ id: idOf(81), title: 'bare' }),
      { type: 'trace.link', id: idOf(82), parentId: ID.deltaV, childId: idOf(80) },
      { type: 'trace.link', id: idOf(83), parentId: ID.deltaV, childId: idOf(81) },
      { type: 'trace.link', id: idOf(84), parentId: ID.mass, childId: idOf(80) },
    );
    const propose = (id: string): Command => ({ type: 'budget.propose', id, version: 1, share: 'proposed' });
    expect(refused(study, OWNER, propose(idOf(82))).message).toMatch(/of speed.*a mass/);
    expect(refused(study, OWNER, propose(idOf(83))).message).toContain('give it one first');
    expect(refused(study, OWNER, propose(idOf(84))).message).toContain('has no budget');
  });

  it('of a baselined parent take a proposed share at once and adopt it only by change request', () => {
    const study = reviewedStudy();
    edit(
      study,
      OWNER,
      requirement({ id: idOf(80), title: 'spare', limit: limit('at most', '1.5', 'km/s') }),
      { type: 'trace.link', id: idOf(82), parentId: ID.deltaV, childId: idOf(80) },
      { type: 'budget.propose', id: idOf(82), version: 1, share: 'proposed' },
    );
    const refusal = refused(study, OWNER, { type: 'budget.adopt', id: idOf(82), version: 2 });
    expect(refusal).toMatchObject({ code: 'controlled' });
    expect(refusal.message).toContain('VEH-001');
    const adopted = seen(study, 'trace', ID.share);
    expect(refused(study, OWNER, { type: 'trace.unlink', ...adopted }).code).toBe('controlled');
    expect(refused(study, OWNER, { type: 'budget.propose', ...adopted, share: 'none' }).code).toBe('controlled');
  });
});
