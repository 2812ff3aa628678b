import type { StudyEvent } from '@shared/contract';
import { QueryTypes, type Sequelize } from 'sequelize';

/** Where live streams read what happened in a study after a revision. */
export interface LedgerFeed {
  /** Events after the given revision, oldest first, without gaps from the first one on; may answer only the first few hundred. */
  eventsSince(studyId: string, revision: number): Promise<StudyEvent[]>;
}

const MOST_AT_ONCE = 500;

interface Row {
  readonly revision: string;
  readonly by: string | null;
  readonly by_id: string;
  readonly at: Date;
  readonly summary: string;
  readonly moved: StudyEvent['moved'];
  readonly touched: string[];
}

/** Reads the ledger table itself. */
export class LedgerTableFeed implements LedgerFeed {
  constructor(private readonly sequelize: Sequelize) {}

  async eventsSince(studyId: string, revision: number): Promise<StudyEvent[]> {
    const rows = await this.sequelize.query<Row>(
      `SELECT l.revision, p.name AS by, l.person_id AS by_id, l.at, l.summary, l.moved,
              ARRAY(SELECT DISTINCT coalesce(e -> 'after' ->> 'key', e -> 'before' ->> 'key', e ->> 'id')
                      FROM jsonb_array_elements(l.patch) e ORDER BY 1) AS touched
         FROM ledger l LEFT JOIN people p ON p.id = l.person_id
        WHERE l.study_id = $1 AND l.revision > $2 ORDER BY l.revision LIMIT $3`,
      { bind: [studyId, revision, MOST_AT_ONCE], type: QueryTypes.SELECT },
    );
    return rows.map((row) => ({
      revision: Number(row.revision),
      by: row.by ?? '',
      byId: row.by_id,
      at: row.at.toISOString(),
      summary: row.summary,
      moved: row.moved,
      touched: row.touched,
    }));
  }
}
