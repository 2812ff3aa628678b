import type { Role } from '@shared/contract';
import type { Study } from '@shared/study';
import { createPerson } from '../../backend/src/features/people/people-service';
import { Membership } from '../../backend/src/models/membership';
import { Person } from '../../backend/src/models/person';
import { Study as StudyRow } from '../../backend/src/models/study';
import type { Services } from '../../backend/src/services';
import { createStudy } from '../../backend/src/study/study-creation';
import { DEMO_PASSWORD, DEMO_PEOPLE } from './demo-people';
import type { EditOptions, SeedExecutor, StudyOpening } from './script';

type SeedServices = Pick<Services, 'sequelize' | 'passwords' | 'studies' | 'edits'>;

/** Writes demonstration studies through the product's own path: the same commands, rules and ledger as a person's edits. */
export class ProductExecutor implements SeedExecutor {
  constructor(private readonly services: SeedServices) {}

  /** Makes the people of the demonstration, with the published password. */
  async createPeople(): Promise<void> {
    await this.services.sequelize.transaction(async (transaction) => {
      for (const { name, email, administrator } of DEMO_PEOPLE) {
        await createPerson(this.services, transaction, {
          name,
          email,
          administrator,
          password: DEMO_PASSWORD,
          demonstration: true,
        });
      }
    });
  }

  async createStudy(
    opening: StudyOpening,
    memberships: readonly { email: string; roles: readonly Role[] }[],
  ): Promise<void> {
    const members = await Promise.all(
      memberships.map(async ({ email, roles }) => ({ personId: await this.personId(email), roles })),
    );
    await this.services.sequelize.transaction((transaction) =>
      createStudy(this.services.sequelize, opening, members, transaction),
    );
  }

  async edit(
    studyKey: string,
    actorEmail: string,
    commands: Parameters<SeedExecutor['edit']>[2],
    options: EditOptions,
  ): ReturnType<SeedExecutor['edit']> {
    const studyId = await this.studyId(studyKey);
    const personId = await this.personId(actorEmail);
    const member = await Membership.findOne({ where: { studyId, personId } });
    const { why = '', draft, at } = options;
    return this.services.edits.edit(
      { studyId, personId, roles: member?.roles ?? [] },
      { commands, why, ...(draft ? { draft } : {}) },
      { at },
    );
  }

  async read(studyKey: string): Promise<Study> {
    return (await this.services.studies.now(await this.studyId(studyKey))).proof.study;
  }

  async personId(email: string): Promise<string> {
    const person = await Person.findOne({ where: { email } });
    if (!person) throw new Error(`${email} is not a person of the demonstration`);
    return person.id;
  }

  private async studyId(key: string): Promise<string> {
    const study = await StudyRow.findOne({ where: { key } });
    if (!study) throw new Error(`there is no study ${key}`);
    return study.id;
  }
}
