import type { StudySettings } from '@shared/contract';
import { Op, QueryTypes, type Sequelize, type Transaction } from 'sequelize';
import { Invalid } from '../middleware/problems';
import { Membership } from '../models/membership';
import { Study } from '../models/study';

/** What a new study starts with. */
export interface NewStudy {
  readonly key: string;
  readonly name: string;
  readonly summary: string;
  readonly concept: string;
  readonly phase: string;
}

/** Levels of the flow-down unless the study names its own. */
const DEFAULT_LEVELS = ['mission', 'vehicle', 'system', 'unit'];

/** Makes an empty study whose maker holds the given roles in it; the key must be free. */
export async function createStudy(
  sequelize: Sequelize,
  input: NewStudy,
  members: readonly { readonly personId: string; readonly roles: readonly string[] }[],
  transaction: Transaction,
): Promise<Study> {
  const taken = await Study.findOne({ where: { key: { [Op.eq]: input.key } }, transaction });
  if (taken)
    throw new Invalid([
      {
        field: 'key',
        value: input.key,
        message: `“${input.key}” is the key of another study`,
        expected: 'a key that is free',
      },
    ]);
  const settings: Omit<StudySettings, 'id' | 'key' | 'name' | 'version'> = {
    summary: input.summary,
    phase: input.phase,
    concept: input.concept,
    levels: DEFAULT_LEVELS,
    maturity: 'concept',
    k: 2,
    quorum: 1,
    counters: {},
  };
  const [row] = await sequelize.query<{ id: string }>(
    'INSERT INTO studies (key, name, settings) VALUES ($1, $2, $3::jsonb) RETURNING id',
    { bind: [input.key, input.name, JSON.stringify(settings)], type: QueryTypes.SELECT, transaction },
  );
  if (!row) throw new Error('the study was not made');
  for (const { personId, roles } of members)
    await Membership.create({ studyId: row.id, personId, roles: [...roles] }, { transaction });
  const study = await Study.findByPk(row.id, { transaction });
  if (!study) throw new Error('the study was not made');
  return study;
}
