import type { Command } from '@shared/contract';
import { proveAll } from '../prove';
import type { Study } from '../study';
import { sendToReview, takeBaseline } from '../testing/baselines';
import { refused } from '../testing/refused';
import { reviewedStudy, seen } from '../testing/reviewed-study';
import {
  ANALYST,
  CHAIR,
  ID,
  MEMBER,
  OWNER,
  READER,
  edit,
  idOf,
  limit,
  requirement,
  smallStudy,
  verifiedBy,
} from '../testing/small-study';

const row = (study: Study, type: string, id: string, more: object = {}): Command =>
  ({ type, ...seen(study, 'requirement', id), reason: 'because', ...more }) as Command;
const closeOut = (study: Study, id: string): string => proveAll(study).proven.get(id)!.closeOut;

/** A study with a compliant, baselined requirement of mass: at most 130 t against 120 t. */
function compliantRow(): Study {
  const study = smallStudy();
  edit(study, OWNER, requirement({ id: idOf(80), title: 'lift', limit: limit('at most', '130', 't') }));
  edit(study, ANALYST, verifiedBy(idOf(81), idOf(80), ID.rollUp, 'm_0'));
  takeBaseline(study, [idOf(80)]);
  return study;
}
function take(requirementIds: string[], more: object = {}): Command {
  return {
    type: 'baseline.take',
    id: idOf(95),
    name: 'N',
    review: 'R',
    note: '',
    requirementIds,
    quantityIds: [],
    openItems: 'listed',
    ...more,
  };
}

describe('lowering compliance', () => {
  it('is possible with a reason, never upwards', () => {
    const study = reviewedStudy();
    const raise = refused(study, CHAIR, row(study, 'assessment.lower', ID.deltaV, { to: 'yes' }));
    expect(raise).toMatchObject({ code: 'invalid', details: { field: 'to', value: 'yes' } });
    expect(raise.message).toContain('a person may lower it, never raise it');
    expect(refused(study, CHAIR, row(study, 'assessment.lower', ID.deltaV, { to: 'partial' })).code).toBe('invalid');
    edit(study, CHAIR, row(study, 'assessment.lower', ID.deltaV, { to: 'no' }));
    expect(proveAll(study).proven.get(ID.deltaV)).toMatchObject({ computedCompliance: 'partial', compliance: 'no' });
    edit(study, CHAIR, row(study, 'assessment.lower', ID.deltaV, { to: null }));
    expect(proveAll(study).proven.get(ID.deltaV)!.compliance).toBe('partial');
  });
});

describe('closing a row', () => {
  it('asks for a baselined requirement that complies, signed by somebody else than its owner', () => {
    const study = compliantRow();
    expect(refused(study, CHAIR, row(study, 'assessment.close', ID.mass)).message).toContain(
      'only the row of a baselined',
    );
    const failing = reviewedStudy();
    expect(refused(failing, CHAIR, row(failing, 'assessment.close', ID.mass)).message).toContain(
      'VEH-002 is non-compliant',
    );
    const owner = { ...OWNER, roles: ['board-member'] as const };
    expect(refused(study, owner, row(study, 'assessment.close', idOf(80)))).toMatchObject({ code: 'forbidden' });
    expect(refused(study, ANALYST, row(study, 'assessment.close', idOf(80))).code).toBe('forbidden');
    edit(study, CHAIR, row(study, 'assessment.close', idOf(80)));
    expect(closeOut(study, idOf(80))).toBe('closed');
  });

  it('is refused where a person has lowered the compliance', () => {
    const study = compliantRow();
    edit(study, CHAIR, row(study, 'assessment.lower', idOf(80), { to: 'partial' }));
    expect(refused(study, CHAIR, row(study, 'assessment.close', idOf(80))).message).toContain('lowered to partial');
  });

  it('is possible with a departure in force, which reopens it when it expires', () => {
    const study = reviewedStudy();
    edit(study, OWNER, departure());
    edit(study, CHAIR, { type: 'departure.decide', id: idOf(90), version: 1, decision: 'in force', reason: 'r' });
    edit(study, MEMBER, row(study, 'assessment.close', ID.mass));
    expect(closeOut(study, ID.mass)).toBe('closed');
    edit(study, CHAIR, { type: 'departure.expire', id: idOf(90), version: 2 });
    expect(closeOut(study, ID.mass)).toBe('reopened');
  });

  it('is undone by itself when an input moves the result, and not when it does not', () => {
    const study = compliantRow();
    edit(study, CHAIR, row(study, 'assessment.close', idOf(80)));
    edit(study, ANALYST, {
      type: 'quantity.set',
      ...seen(study, 'quantity', ID.isp),
      value: { text: '6400', unit: 's' },
    });
    expect(closeOut(study, idOf(80))).toBe('closed');
    edit(study, ANALYST, {
      type: 'quantity.set',
      ...seen(study, 'quantity', ID.dry),
      value: { text: '66', unit: 't' },
    });
    expect(closeOut(study, idOf(80))).toBe('reopened');
    edit(study, CHAIR, row(study, 'assessment.close', idOf(80)));
    expect(closeOut(study, idOf(80))).toBe('closed');
    edit(study, CHAIR, row(study, 'assessment.reopen', idOf(80)));
    expect(closeOut(study, idOf(80))).toBe('open');
    expect(refused(study, CHAIR, row(study, 'assessment.reopen', idOf(80))).code).toBe('state');
  });

  it('waits for the children, also for one that reopened by itself', () => {
    const study = compliantRow();
    edit(
      study,
      OWNER,
      requirement({ id: idOf(82), title: 'lift its part', limit: limit('at most', '125', 't'), parentIds: [idOf(80)] }),
    );
    edit(study, ANALYST, verifiedBy(idOf(83), idOf(82), ID.rollUp, 'm_0'));
    takeBaseline(study, [idOf(82)]);
    expect(refused(study, CHAIR, row(study, 'assessment.close', idOf(80))).message).toContain(
      'VEH-004, which is still open',
    );
    edit(study, CHAIR, row(study, 'assessment.close', idOf(82)));
    edit(study, ANALYST, {
      type: 'quantity.set',
      ...seen(study, 'quantity', ID.dry),
      value: { text: '66', unit: 't' },
    });
    expect(refused(study, CHAIR, row(study, 'assessment.close', idOf(80))).code).toBe('state');
    edit(study, CHAIR, row(study, 'assessment.close', idOf(82)));
    edit(study, CHAIR, row(study, 'assessment.close', idOf(80)));
  });
});

function departure(more: object = {}): Command {
  return {
    type: 'departure.request',
    id: idOf(90),
    kind: 'waiver',
    class: 'major',
    requirementId: ID.mass,
    title: 'Heavier',
    reason: 'built so',
    effectivity: 'article 1',
    expires: null,
    ...more,
  };
}

describe('departures', () => {
  it('are limited, from a baselined requirement, and decided by somebody else', () => {
    const study = reviewedStudy();
    expect(refused(study, OWNER, departure({ effectivity: '' })).details.field).toBe('effectivity');
    expect(refused(study, OWNER, departure({ requirementId: ID.outbound })).details.field).toBe('requirementId');
    expect(refused(study, OWNER, departure({ requirementId: idOf(777) })).details.field).toBe('requirementId');
    edit(study, OWNER, departure());
    expect(study.get('departure', idOf(90))).toMatchObject({ key: 'WAV-001', state: 'requested' });
    const decide: Command = { type: 'departure.decide', id: idOf(90), version: 1, decision: 'in force', reason: 'r' };
    const self = { ...OWNER, roles: ['board-chair'] as const };
    expect(refused(study, self, decide)).toMatchObject({ code: 'forbidden' });
    expect(refused(study, MEMBER, decide)).toMatchObject({ code: 'forbidden' });
    expect(refused(study, CHAIR, { type: 'departure.expire', id: idOf(90), version: 1 }).code).toBe('state');
    edit(study, CHAIR, decide);
    expect(refused(study, CHAIR, { ...decide, version: 2 }).code).toBe('state');
  });
});

describe('taking a baseline', () => {
  it('brings requirements and quantities under control', () => {
    const study = reviewedStudy();
    expect(study.get('requirement', ID.deltaV)!.state).toBe('baselined');
    expect(study.get('quantity', ID.isp)!.state).toBe('controlled');
    expect(study.byKey('baseline', 'B1')).toMatchObject({ takenBy: CHAIR.id, digest: '' });
    edit(study, CHAIR, take([ID.deltaV]));
    expect(study.byKey('baseline', 'B2')).toBeDefined();
    expect(study.get('requirement', ID.deltaV)!.version).toBe(4);
  });

  it('refuses open items where the board does not list them, what is withdrawn and what is elsewhere', () => {
    const study = smallStudy();
    const openItem = {
      kind: 'TBR',
      estimate: '116 t',
      action: 'weigh it',
      personId: OWNER.id,
      due: '2026-12-01',
      rationale: '',
    };
    edit(study, OWNER, { type: 'requirement.revise', id: ID.mass, version: 1, changes: { openItem } } as Command);
    edit(study, OWNER, { type: 'requirement.withdraw', ...seen(study, 'requirement', ID.outbound), reason: 'no' });
    sendToReview(study, ID.mass);
    const open = refused(study, CHAIR, take([ID.mass], { openItems: 'refused' }));
    expect(open.details).toMatchObject({ field: 'requirementIds', value: 'VEH-002' });
    expect(refused(study, CHAIR, take([ID.outbound])).code).toBe('state');
    expect(refused(study, CHAIR, take([idOf(777)])).details.field).toBe('requirementIds');
    expect(refused(study, CHAIR, take([], { quantityIds: [idOf(777)] })).details.field).toBe('quantityIds');
    expect(refused(study, MEMBER, take([ID.mass])).code).toBe('forbidden');
    expect(refused(study, READER, take([ID.mass])).code).toBe('forbidden');
    takeBaseline(study, [ID.mass]);
  });

  it('refuses what nobody has reviewed', () => {
    const study = smallStudy();
    const unreviewed = refused(study, CHAIR, take([ID.mass]));
    expect(unreviewed).toMatchObject({ code: 'state', details: { field: 'requirementIds', value: 'VEH-002' } });
    expect(unreviewed.message).toContain('in preparation');
    sendToReview(study, ID.mass);
    edit(study, CHAIR, take([ID.mass]));
    expect(study.get('requirement', ID.mass)!.state).toBe('baselined');
  });
});
