import { createTestApp, type TestApp } from '../../backend/test/app';
import { Study } from '../../backend/src/models/study';
import { holds, reproveStudy } from '../../backend/src/study/reprove-service';
import { DEMO_PEOPLE } from './demo-people';
import { seedDemonstration } from './index';
import { ProductExecutor } from './product-executor';

let testApp: TestApp;
let executor: ProductExecutor;

beforeAll(async () => {
  testApp = await createTestApp();
  executor = new ProductExecutor(testApp.services);
  await executor.createPeople();
  await seedDemonstration(executor);
}, 120_000);
afterAll(() => testApp.close());

it('writes the three studies through the product’s own path', async () => {
  const rows = await Study.findAll({ order: ['key'] });
  expect(rows.map(({ key }) => key)).toEqual(['CINDER', 'LONGREACH', 'PETREL']);
  expect((await executor.read('PETREL')).byKey('change', 'CR-003')?.state).toBe('before the board');
});

it('leaves every study re-proving to the bit, with an unbroken ledger', async () => {
  for (const { id } of await Study.findAll()) {
    const report = await reproveStudy(testApp.services.sequelize, id);
    expect(report.requirements).toBeGreaterThan(9);
    expect({ ...report, holds: holds(report) }).toMatchObject({ holds: true, verdicts: [], outputs: [] });
  }
});

it('makes every person of the demonstration known by address', async () => {
  for (const { email } of DEMO_PEOPLE) expect(await executor.personId(email)).toMatch(/^[0-9a-f-]{36}$/);
});
