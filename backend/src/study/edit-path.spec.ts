import { randomUUID } from 'node:crypto';
import { createTestApp, type TestApp } from '../../test/app';
import { createTestStudy, edit, post, type SmallStudy, type TestStudy, writeSmallStudy } from '../../test/studies';
import { checkChain } from './ledger';
import { holds, reproveStudy } from './reprove-service';

let testApp: TestApp;
let study: TestStudy;
let small: SmallStudy;

beforeAll(async () => {
  testApp = await createTestApp();
});
afterAll(async () => {
  await testApp.close();
});
beforeEach(async () => {
  study = await createTestStudy(testApp);
  small = await writeSmallStudy(study);
});

const read = (path: string, at = 'now') => study.owner.agent.get(`/api/studies/${study.key}${path}`).query({ at });
const setImpulse = (text: string, version: number, unit = 's') => [
  { type: 'quantity.set', id: small.impulse, version, value: { text, unit } },
];
const submit = () => edit(study, study.owner, [{ type: 'requirement.submit', id: small.requirement, version: 1 }]);
const expectHolds = async (): Promise<void> => {
  const report = await reproveStudy(testApp.services.sequelize, study.study.id);
  expect(report).toMatchObject({ verdicts: [], outputs: [], chain: { broken: null } });
  expect(holds(report)).toBe(true);
};

describe('an edit', () => {
  it('moves the verdict that rests on it, in one revision with its ledger entry', async () => {
    // 9.80665 m/s² × 6500 s × ln 1.85 = 39.2145 km/s (arithmetic); × 6200/6500 = 37.405 km/s, below 38.
    const before = await read('/requirements').expect(200);
    expect(before.body.rows[0]).toMatchObject({ key: 'VEH-001', verdict: 'compliant' });
    expect(before.body.rows[0].value.si).toBeCloseTo(9.80665 * 6500 * Math.log(1.85), 6);
    const answer = await edit(study, study.analyst, setImpulse('6200', 1), { why: 'vendor data' });
    expect(answer).toMatchObject({ revision: 3, turned: [{ key: 'VEH-001', from: 'compliant', to: 'non-compliant' }] });
    const records = await read('/records').expect(200);
    expect(records.body.rows[0]).toMatchObject({ revision: 3, why: 'vendor data', commands: ['quantity.set'] });
    expect((await read('/requirements')).body.rows[0].verdict).toBe('non-compliant');
    expect((await read('/requirements', 'revision:2')).body.rows[0].verdict).toBe('compliant');
    await expectHolds();
  });

  it('is refused whole when one of its commands is', async () => {
    const answer = await post(study, study.analyst, [...setImpulse('7000', 1), ...setImpulse('5 apples', 2, '')]);
    expect(answer.status).toBe(422);
    const head = await read('').expect(200);
    expect(head.body.revision).toBe(2);
    await expectHolds();
  });

  it('on a stale version answers 409 with the current state and applies nothing', async () => {
    await edit(study, study.analyst, setImpulse('6600', 1));
    const answer = await post(study, study.analyst, setImpulse('6100', 1));
    expect(answer.status).toBe(409);
    expect(answer.body).toMatchObject({ code: 'stale', current: { version: 2, value: { text: '6600' } } });
    expect((await read('')).body.revision).toBe(3);
  });

  it('sent twice with one idempotency key is applied once and answered alike', async () => {
    const key = randomUUID();
    const first = await post(study, study.analyst, setImpulse('6600', 1), { key });
    const again = await post(study, study.analyst, setImpulse('6600', 1), { key });
    expect(first.status).toBe(200);
    expect(again.body).toEqual(first.body);
    expect((await read('')).body.revision).toBe(3);
  });

  it('raced by twenty writers gives one revision per acceptance and none besides', async () => {
    const writers = await Promise.all(
      Array.from({ length: 20 }, (_, i) => post(study, study.analyst, setImpulse(String(6500 + i), 1))),
    );
    const accepted = writers.filter((answer) => answer.status === 200);
    expect(accepted).toHaveLength(1);
    expect(writers.filter((answer) => answer.status === 409)).toHaveLength(19);
    expect((await read('')).body.revision).toBe(3);
    await expectHolds();
  });

  it.each([
    ['an unknown unit', { text: '6500', unit: 'sceonds' }, /sceonds/],
    ['a wrong dimension', { text: '6500', unit: 'kg' }, /mass/],
    ['a number without unit', { text: '6500', unit: '' }, /6500/],
    ['what is no number', { text: 'many', unit: 's' }, /many/],
  ])('with %s names the field, the value and what would be right', async (_what, value, says) => {
    const answer = await post(study, study.analyst, [{ type: 'quantity.set', id: small.impulse, version: 1, value }]);
    expect(answer.status).toBe(422);
    expect(answer.body.fields[0].field).toBe('commands.0.value');
    expect(answer.body.detail).toMatch(says);
  });

  it('by a role too low, by a stranger and of a foreign id is refused', async () => {
    const reader = await post(study, study.reader, setImpulse('6000', 1));
    expect([reader.status, reader.body.code]).toEqual([403, 'forbidden']);
    const stranger = await post(study, study.stranger, setImpulse('6000', 1));
    expect(stranger.status).toBe(404);
    const other = await createTestStudy(testApp);
    const foreign = await post(other, other.analyst, setImpulse('6000', 1));
    expect(foreign.status).toBe(404);
    expect((await read('')).body.revision).toBe(2);
  });
});

describe('undo', () => {
  it('takes one edit of one’s own back and keeps the record of both', async () => {
    await edit(study, study.analyst, setImpulse('6200', 1));
    await edit(study, study.analyst, [{ type: 'edit.undo', revision: 3 }]);
    const quantities = await read('/quantities').expect(200);
    expect(quantities.body.rows.find((row: { symbol: string }) => row.symbol === 'I_sp').value).toMatchObject({
      text: '6500',
      unit: 's',
    });
    expect((await read('/requirements')).body.rows[0].verdict).toBe('compliant');
    expect((await read('')).body.revision).toBe(4);
    await expectHolds();
  });
});

describe('a change request', () => {
  const baseline = async () => {
    await submit();
    return edit(study, study.chair, [
      {
        type: 'baseline.take',
        name: 'Mission definition',
        review: 'MDR',
        requirementIds: [small.requirement],
        quantityIds: [small.impulse],
      },
    ]);
  };

  it('is the only way to what is controlled; its impact is what then stands', async () => {
    await baseline();
    const direct = await post(study, study.analyst, setImpulse('6200', 2));
    expect([direct.status, direct.body.code]).toEqual([409, 'controlled']);
    const written = await edit(study, study.owner, [
      { type: 'change.write', title: 'Lower the impulse', reason: 'Grid erosion.' },
    ]);
    const key = written.created[0]!.key;
    await edit(study, study.owner, setImpulse('6200', 2), { draft: key });
    // The draft shows what approval would make; the study itself has not moved.
    expect((await read('/requirements', `draft:${key}`)).body.rows[0].verdict).toBe('non-compliant');
    expect((await read('/requirements')).body.rows[0].verdict).toBe('compliant');
    const sheet = await read(`/changes/${key}`).expect(200);
    expect(sheet.body.impact.turned).toMatchObject([
      { key: 'VEH-001', before: { verdict: 'compliant' }, after: { verdict: 'non-compliant' } },
    ]);
    const { id } = sheet.body;
    const next = async (type: string, member: TestStudy['owner'], more: object = {}): Promise<void> => {
      const { version } = (await read(`/changes/${key}`)).body;
      await edit(study, member, [{ type, id, version, ...more }]);
    };
    await next('change.submit', study.owner);
    await next('change.refer', study.chair);
    await next('change.vote', study.member, { vote: 'for', remark: '' });
    const { version } = (await read(`/changes/${key}`)).body;
    const unreasoned = await post(study, study.chair, [
      { type: 'change.dispose', id, version, decision: 'approved', reason: '' },
    ]);
    expect([unreasoned.status, unreasoned.body.code]).toEqual([422, 'refused']);
    expect(unreasoned.body.detail).toMatch(/VEH-001/);
    await next('change.dispose', study.chair, { decision: 'approved', reason: 'Accepted for this phase.' });
    const after = (await read('/requirements')).body.rows[0];
    expect(after.verdict).toBe('non-compliant');
    expect(after.value.si).toBe(sheet.body.impact.turned[0].after.value.si);
    await expectHolds();
  });

  it('whose author votes, or that has moved under it, is refused', async () => {
    await baseline();
    const written = await edit(study, study.owner, [
      {
        type: 'change.write',
        title: 'Lower the ratio',
        reason: 'Tanks.',
        edits: [{ type: 'quantity.set', id: small.ratio, version: 1, value: { text: '1.7', unit: '1' } }],
      },
    ]);
    const { id, key } = written.created[0]!;
    await edit(study, study.analyst, [
      { type: 'quantity.set', id: small.ratio, version: 1, value: { text: '1.9', unit: '1' } },
    ]);
    const sheet = (await read(`/changes/${key}`)).body;
    expect(sheet).toMatchObject({ inConflict: true, impact: { problem: { kind: 'conflict' } } });
    expect((await read('/requirements', `draft:${key}`)).status).toBe(409);
    const submit = await post(study, study.owner, [{ type: 'change.submit', id, version: 1 }]);
    expect([submit.status, submit.body.code]).toEqual([409, 'conflict']);
  });
});

describe('a baseline', () => {
  it('keeps its verdicts, values and digest whatever comes after', async () => {
    await submit();
    await edit(study, study.chair, [
      { type: 'baseline.take', name: 'Mission definition', review: 'MDR', requirementIds: [small.requirement] },
    ]);
    const before = await read('/compliance', 'baseline:B1').expect(200);
    await edit(study, study.analyst, setImpulse('6200', 1));
    const after = await read('/compliance', 'baseline:B1').expect(200);
    expect(after.body.rows).toEqual(before.body.rows);
    expect(after.body.header.digest).toMatch(/^[0-9a-f]{64}$/);
    expect((await read('/requirements')).body.rows[0].verdict).toBe('non-compliant');
    expect((await read('/requirements/VEH-001')).body.turnedBy).toMatchObject({
      revision: 5,
      direct: true,
      baselineVerdict: 'compliant',
    });
    await expectHolds();
  });
});

describe('the ledger', () => {
  it('cannot be edited, and tells the first bad entry when somebody with the database did so', async () => {
    const { sequelize } = testApp.services;
    await expect(
      sequelize.query('UPDATE ledger SET why = $1 WHERE study_id = $2', { bind: ['forged', study.study.id] }),
    ).rejects.toThrow(/only ever added/);
    await sequelize.transaction(async (transaction) => {
      await sequelize.query("SET LOCAL session_replication_role = 'replica'", { transaction });
      await sequelize.query('UPDATE ledger SET why = $1 WHERE study_id = $2 AND revision = 2', {
        bind: ['forged', study.study.id],
        transaction,
      });
    });
    expect((await checkChain(sequelize, study.study.id)).broken).toMatchObject({ revision: 2 });
  });
});

describe('another server process', () => {
  it('catches up from the ledger and answers alike', async () => {
    const other = await createTestApp();
    try {
      const before = await other.services.studies.now(study.study.id);
      expect(before.revision).toBe(2);
      await edit(study, study.analyst, setImpulse('6200', 1));
      const after = await other.services.studies.now(study.study.id);
      expect(after.revision).toBe(3);
      expect(after.proof.proven.get(small.requirement)?.verdict).toBe('non-compliant');
    } finally {
      await other.close();
    }
  });
});
