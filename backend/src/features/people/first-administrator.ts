import { oneTimeLink } from '../../mail/messages';
import { Person } from '../../models';
import type { Services } from '../../services';
import { issueToken } from './one-time-links';

/** While nobody can administer the product: a fresh one-time link for making the first administrator; otherwise null. */
export async function firstAdministratorLink({ sequelize, config }: Services): Promise<string | null> {
  if (config.demonstration || (await Person.count({ where: { administrator: true } })) > 0) return null;
  const token = await sequelize.transaction((transaction) =>
    issueToken(sequelize, transaction, 'first-administrator', null),
  );
  return oneTimeLink(config.publicUrl, 'first-administrator', token);
}
