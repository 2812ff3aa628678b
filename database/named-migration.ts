import type { QueryInterface } from 'sequelize';

/** What a migration step gets: the query interface of the one connection that holds the migration transaction. */
export interface MigrationStep {
  readonly context: QueryInterface;
}

/**
 * One step of the schema. `up` and `down` must not open a transaction of their own: the runner wraps the whole run in
 * one, so that a run that fails half-way leaves the schema as it was.
 */
export interface NamedMigration {
  /** Number and subject, e.g. `001-people`; recorded in the database and never changed. */
  readonly name: string;
  up(step: MigrationStep): Promise<void>;
  down(step: MigrationStep): Promise<void>;
}
