import type { RecordsView, RequirementSheet, Role, Verdict } from '@shared/contract';
import { isUndoable, recordChanges, verdictCounts, type ViewContext } from '@shared/study';
import { QueryTypes, type Sequelize } from 'sequelize';
import type { StudyAccess } from '../../middleware/access';
import type { Services } from '../../services';
import { entriesBefore } from '../../study/ledger';

/** Members of a study with their roles, for owners, boards and names. */
export async function membersOf(
  sequelize: Sequelize,
  studyId: string,
): Promise<{ id: string; name: string; roles: Role[] }[]> {
  return sequelize.query(
    `SELECT p.id, p.name, m.roles FROM memberships m JOIN people p ON p.id = m.person_id
      WHERE m.study_id = $1 AND NOT p.disabled ORDER BY p.name`,
    { bind: [studyId], type: QueryTypes.SELECT },
  );
}

/** Number of edits since the baseline in force. */
export async function directEditsSince(sequelize: Sequelize, studyId: string, context: ViewContext): Promise<number> {
  if (!context.baseline) return 0;
  const [row] = await sequelize.query<{ edits: string }>(
    'SELECT count(*) AS edits FROM ledger WHERE study_id = $1 AND revision > $2 AND revision <= $3',
    {
      bind: [studyId, context.baseline.revision, context.standpoint.revision],
      type: QueryTypes.SELECT,
    },
  );
  return Number(row?.edits ?? 0);
}

interface MoveRow {
  readonly revision: string;
  readonly what: string;
  readonly was: Verdict | null;
  readonly verdict: Verdict | null;
  readonly percent: number | null;
  readonly by: string;
  readonly at: Date;
  readonly direct: boolean;
}
const MOST_MOVES = 20;

async function moveRows(sequelize: Sequelize, studyId: string, context: ViewContext, key: string): Promise<MoveRow[]> {
  return sequelize.query<MoveRow>(
    `SELECT h.revision, l.summary AS what, h.was, h.verdict, h.percent, p.name AS by, l.at,
            NOT l.commands @> '[{"type": "change.dispose"}]' AS direct
       FROM verdict_history h
       JOIN ledger l ON l.study_id = h.study_id AND l.revision = h.revision
       JOIN people p ON p.id = l.person_id
      WHERE h.study_id = $1 AND h.key = $2 AND h.revision <= $3
      ORDER BY h.revision DESC LIMIT $4`,
    { bind: [studyId, key, context.standpoint.revision, MOST_MOVES], type: QueryTypes.SELECT },
  );
}

/** The edits that moved a requirement's margin, newest first. */
export async function movesOf(
  sequelize: Sequelize,
  studyId: string,
  context: ViewContext,
  key: string,
): Promise<RequirementSheet['moves']> {
  const rows = await moveRows(sequelize, studyId, context, key);
  return rows.flatMap((row) =>
    row.verdict === null
      ? []
      : [
          {
            revision: Number(row.revision),
            what: row.what,
            verdict: row.verdict,
            percent: row.percent,
            by: row.by,
            at: row.at.toISOString(),
          },
        ],
  );
}

/** The newest edit since the baseline in force that turned the verdict away from the baseline's, if it stands elsewhere. */
export async function turnedBy(
  sequelize: Sequelize,
  studyId: string,
  context: ViewContext,
  key: string,
): Promise<RequirementSheet['turnedBy']> {
  const requirement = context.proof.study.byKey('requirement', key);
  const frozen = requirement && context.baseline?.verdicts.get(requirement.id);
  if (!requirement || !frozen || !context.baseline || context.proof.proven.get(requirement.id)?.verdict === frozen)
    return null;
  const since = context.baseline.revision;
  const rows = await moveRows(sequelize, studyId, context, key);
  const row = rows.find((move) => Number(move.revision) > since && move.was !== move.verdict);
  return row ? { revision: Number(row.revision), direct: row.direct, baselineVerdict: frozen } : null;
}

/** Verdict counts frozen in each baseline. */
export async function baselineCounts(
  services: Services,
  study: StudyAccess,
  context: ViewContext,
): Promise<Map<string, Record<Verdict, number>>> {
  const counts = new Map<string, Record<Verdict, number>>();
  for (const baseline of context.proof.study.all('baseline')) {
    counts.set(baseline.key, verdictCounts(await services.standpoints.baselineProof(study.id, baseline.key)));
  }
  return counts;
}

/** Revision at which a change request was approved or rejected; null while it still waits. */
export async function dispositionRevision(
  sequelize: Sequelize,
  studyId: string,
  changeId: string,
): Promise<number | null> {
  const [row] = await sequelize.query<{ revision: string }>(
    `SELECT revision FROM ledger WHERE study_id = $1
        AND commands @> jsonb_build_array(jsonb_build_object('type', 'change.dispose', 'id', $2::text)) ORDER BY revision DESC LIMIT 1`,
    { bind: [studyId, changeId], type: QueryTypes.SELECT },
  );
  return row ? Number(row.revision) : null;
}

/** A page of the ledger with its changes in words. */
export async function recordsView(
  sequelize: Sequelize,
  studyId: string,
  context: ViewContext,
  before: number,
  limit: number,
): Promise<RecordsView> {
  const entries = await entriesBefore(sequelize, studyId, before, limit);
  const last = entries.at(-1);
  return {
    rows: entries.map((entry) => ({
      revision: entry.revision,
      at: entry.at,
      by: { id: entry.personId, name: context.people.get(entry.personId) ?? 'a former member' },
      summary: entry.summary,
      why: entry.why,
      commands: entry.commands.map((command) => command.type),
      changes: recordChanges(entry.patch, context),
      moved: entry.moved.map((move) => ({ ...move, percent: null })),
      digest: entry.digest,
      previous: entry.previous,
      undoable: context.standpoint.text === 'now' && isUndoable(context, entry.revision, entry.patch, entry.personId),
    })),
    next: last && last.revision > 1 ? last.revision : null,
    chain: { head: context.ledgerHead, entries: context.revision },
  };
}
