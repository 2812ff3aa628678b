import { QueryTypes } from 'sequelize';
import { createTestApp, type TestApp } from '../../test/app';
import { createTestStudy, edit, type SmallStudy, type TestStudy, writeSmallStudy } from '../../test/studies';
import { holds, reproveStudy } from '../study/reprove-service';
import { ExpireDepartures } from './expire-departures';

let testApp: TestApp;
/** A second server process: services, and so studies in memory, of its own. */
let otherApp: TestApp;
let study: TestStudy;
let small: SmallStudy;

beforeAll(async () => {
  testApp = await createTestApp();
  otherApp = await createTestApp();
});
afterAll(async () => {
  await otherApp.close();
  await testApp.close();
});
beforeEach(async () => {
  study = await createTestStudy(testApp);
  small = await writeSmallStudy(study);
  await edit(study, study.owner, [{ type: 'requirement.submit', id: small.requirement, version: 1 }]);
  await edit(study, study.chair, [
    { type: 'baseline.take', name: 'Frozen', review: 'MDR', requirementIds: [small.requirement] },
  ]);
});

/** The day so many days from today (UTC) by the database's clock. */
async function dayFromToday(days: number): Promise<string> {
  const [row] = await testApp.services.sequelize.query<{ day: string }>(
    "SELECT ((now() AT TIME ZONE 'UTC')::date + $1::int)::text AS day",
    { bind: [days], type: QueryTypes.SELECT },
  );
  return row!.day;
}

/** Asks for a departure that lasts until so many days from today and grants it; gives its key. */
async function granted(days: number): Promise<string> {
  const asked = await edit(study, study.owner, [
    {
      type: 'departure.request',
      kind: 'waiver',
      class: 'minor',
      requirementId: small.requirement,
      title: 'Less once',
      reason: 'First flight.',
      expires: await dayFromToday(days),
    },
  ]);
  const { id, key } = asked.created[0]!;
  await edit(study, study.chair, [
    { type: 'departure.decide', id, version: 1, decision: 'in force', reason: 'Agreed.' },
  ]);
  return key;
}
const read = (path: string) => study.reader.agent.get(`/api/studies/${study.key}${path}`).expect(200);
const closeOut = async (): Promise<string> => (await read('/compliance')).body.rows[0].closeOut as string;
const states = async (): Promise<Record<string, string>> => {
  const rows = await testApp.services.sequelize.query<{ key: string; state: string }>(
    'SELECT key, state FROM departures WHERE study_id = $1',
    { bind: [study.study.id], type: QueryTypes.SELECT },
  );
  return Object.fromEntries(rows.map(({ key, state }) => [key, state]));
};

describe('a departure whose last day is over', () => {
  it('is expired once by two processes, in the name of who granted it, and its row reopens', async () => {
    const key = await granted(-1);
    await edit(study, study.member, [
      { type: 'assessment.close', id: small.requirement, version: 3, reason: 'Departed from.' },
    ]);
    expect(await closeOut()).toBe('closed');
    const before = (await read('')).body.revision as number;

    await Promise.all([testApp, otherApp].map(({ services }) => new ExpireDepartures(services).expire()));

    expect(await states()).toEqual({ [key]: 'expired' });
    expect(await closeOut()).toBe('reopened');
    expect((await read('')).body.revision).toBe(before + 1);
    const [latest] = (await read('/records')).body.rows;
    expect(latest).toMatchObject({
      commands: ['departure.expire'],
      why: `Its last day was ${await dayFromToday(-1)}.`,
      by: { id: study.chair.id },
    });
    await new ExpireDepartures(testApp.services).expire();
    expect((await read('')).body.revision).toBe(before + 1);
    expect(holds(await reproveStudy(testApp.services.sequelize, study.study.id))).toBe(true);
  });

  it('does not keep others waiting when it cannot be expired', async () => {
    const stuck = await granted(-2);
    const key = await granted(-1);
    const { sequelize } = testApp.services;
    const setDecider = (personId: string) =>
      sequelize.query(
        `UPDATE departures SET body = jsonb_set(body, '{decision,personId}', to_jsonb($3::text))
          WHERE study_id = $1 AND key = $2`,
        { bind: [study.study.id, stuck, personId] },
      );
    // A ledger entry cannot name somebody whom the database does not know.
    await setDecider('00000000-0000-7000-8000-000000000000');
    await new ExpireDepartures(testApp.services).expire();
    expect(await states()).toEqual({ [stuck]: 'in force', [key]: 'expired' });
    await setDecider(study.chair.id);
    await new ExpireDepartures(testApp.services).expire();
    expect(await states()).toEqual({ [stuck]: 'expired', [key]: 'expired' });
  });
});

describe('a departure', () => {
  it('lasts to the end of its last day', async () => {
    const today = await granted(0);
    const tomorrow = await granted(1);
    await new ExpireDepartures(testApp.services).expire();
    expect(await states()).toEqual({ [today]: 'in force', [tomorrow]: 'in force' });
  });

  it('is looked at when the server starts, and no more once it has stopped', async () => {
    const key = await granted(-1);
    const job = new ExpireDepartures(testApp.services);
    job.start();
    await job.stop();
    expect(await states()).toEqual({ [key]: 'expired' });
  });
});
