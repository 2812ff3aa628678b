import type { EditAnswer, Role } from '@shared/contract';
import { randomUUID } from 'node:crypto';
import { createStudy as createStudyRow } from '../src/study/study-creation';
import type { Study } from '../src/models/study';
import type { TestApp } from './app';
import { type Agent, signedInAs } from './people';

/** A study with one signed-in person per role, as most tests of the path need it. */
export interface TestStudy {
  readonly study: Study;
  readonly key: string;
  readonly owner: Member;
  readonly analyst: Member;
  readonly member: Member;
  readonly chair: Member;
  readonly reader: Member;
  /** Signed in, without a role in this study. */
  readonly stranger: Member;
}
export interface Member {
  readonly id: string;
  readonly agent: Agent;
}

let count = 0;

/** Makes a study and its people. */
export async function createTestStudy(testApp: TestApp): Promise<TestStudy> {
  count += 1;
  const key = `STUDY-${count}`;
  const { sequelize } = testApp.services;
  const study = await sequelize.transaction((transaction) =>
    createStudyRow(
      sequelize,
      { key, name: `Study ${count}`, summary: '', concept: 'nuclear-electric', phase: 'concept' },
      [],
      transaction,
    ),
  );
  const join = async (name: string, role?: Role): Promise<Member> => {
    const { person, agent } = await signedInAs(
      testApp,
      `${name} ${randomUUID().slice(0, 8)}`,
      role && { study: key, roles: [role] },
      {
        email: `${randomUUID()}@example.org`,
      },
    );
    return { id: person.id, agent };
  };
  return {
    study,
    key,
    owner: await join('Owner', 'requirements-owner'),
    analyst: await join('Analyst', 'analyst'),
    member: await join('Member', 'board-member'),
    chair: await join('Chair', 'board-chair'),
    reader: await join('Reader', 'reader'),
    stranger: await join('Stranger'),
  };
}

/** Posts commands as a person and expects them to be accepted. */
export async function edit(
  study: TestStudy,
  member: Member,
  commands: readonly unknown[],
  more: { draft?: string; why?: string } = {},
): Promise<EditAnswer> {
  const answer = await post(study, member, commands, more);
  if (answer.status !== 200) throw new Error(`refused ${answer.status}: ${JSON.stringify(answer.body)}`);
  return answer.body as EditAnswer;
}

/** Posts commands as a person and hands over whatever comes back. */
export function post(
  study: TestStudy,
  member: Member,
  commands: readonly unknown[],
  more: { draft?: string; why?: string; key?: string } = {},
) {
  const { key = randomUUID(), ...body } = more;
  return member.agent
    .post(`/api/studies/${study.key}/edits`)
    .set('Idempotency-Key', key)
    .send({ commands, ...body });
}

/** What a small study is made of: a delta-v requirement verified by a formula of two quantities. */
export interface SmallStudy {
  readonly requirement: string;
  readonly impulse: string;
  readonly ratio: string;
  readonly analysis: string;
  readonly verification: string;
}

/** Writes the small study: 6 500 s and a mass ratio of 1.85 against at least 38 km/s; 9.80665 × 6500 × ln 1.85 = 39.21 km/s. */
export async function writeSmallStudy(study: TestStudy): Promise<SmallStudy> {
  const small: SmallStudy = {
    requirement: randomUUID(),
    impulse: randomUUID(),
    ratio: randomUUID(),
    analysis: randomUUID(),
    verification: randomUUID(),
  };
  await edit(study, study.owner, [
    { type: 'element.create', key: 'VEH', name: 'Vehicle' },
    {
      type: 'requirement.create',
      id: small.requirement,
      prefix: 'VEH',
      title: 'Provide total delta-v',
      text: 'The vehicle shall provide a total delta-v of at least 38.0 km/s.',
      rationale: 'Reference transfer.',
      level: 'vehicle',
      parameter: 'delta-v',
      limit: { relation: 'at least', value: { text: '38.0', unit: 'km/s' } },
    },
  ]);
  await edit(study, study.analyst, [
    {
      type: 'quantity.create',
      id: small.impulse,
      symbol: 'I_sp',
      name: 'Specific impulse',
      unit: 's',
      value: { text: '6500', unit: 's' },
    },
    {
      type: 'quantity.create',
      id: small.ratio,
      symbol: 'R',
      name: 'Mass ratio',
      unit: '1',
      value: { text: '1.85', unit: '1' },
    },
    {
      type: 'analysis.create',
      id: small.analysis,
      kind: 'formula',
      name: 'Transfer delta-v',
      inputs: [
        { name: 'I_sp', from: { quantityId: small.impulse } },
        { name: 'R', from: { quantityId: small.ratio } },
        { name: 'g_0', from: { constant: 'g_0' } },
      ],
      lines: [
        { name: 'v_e', expression: 'g_0 * I_sp', unit: 'km/s' },
        { name: 'dv', expression: 'v_e * log(R)', unit: 'km/s' },
      ],
    },
    {
      type: 'verification.link',
      id: small.verification,
      requirementId: small.requirement,
      method: 'analysis',
      analysisId: small.analysis,
      output: 'dv',
    },
  ]);
  return small;
}
