import type { NamedMigration } from '../named-migration';
import { people } from './001-people';
import { studies } from './002-studies';

/**
 * All migrations in the order in which they run. They are imported statically, so that the bundled migration runner
 * carries them; a migration that has been released is never edited, only followed by another.
 */
export const migrations: readonly NamedMigration[] = [people, studies];
