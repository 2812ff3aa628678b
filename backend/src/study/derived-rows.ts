import type { Proof, Proven, Reproof } from '@shared/study';
import { outputNodes } from '@shared/study';
import type { Outcome } from '@shared/engine';
import { QueryTypes, type Sequelize, type Transaction } from 'sequelize';

/** What is stored of the derived state: one row per result and per verdict. Only the one path writes it. */
interface ResultRow {
  readonly analysis_id: string;
  readonly output: string;
  readonly value: number | null;
  readonly failure: object | null;
}

function resultRow(node: string, outcome: Outcome): ResultRow {
  const dot = node.indexOf('.');
  return {
    analysis_id: node.slice(2, dot),
    output: node.slice(dot + 1),
    value: outcome.ok ? outcome.value : null,
    failure: outcome.ok ? null : outcome.failure,
  };
}

/** Writes the results and verdicts that re-proving changed: one statement each, whatever their number. */
export async function writeDerived(
  sequelize: Sequelize,
  studyId: string,
  reproof: Reproof,
  exists: (analysisId: string) => boolean,
  transaction: Transaction,
): Promise<void> {
  const gone: { analysis_id: string; output: string }[] = [];
  const kept: ResultRow[] = [];
  for (const [node, outcome] of reproof.outcomes) {
    if (outcome) kept.push(resultRow(node, outcome));
    else {
      const dot = node.indexOf('.');
      gone.push({ analysis_id: node.slice(2, dot), output: node.slice(dot + 1) });
    }
  }
  // Rows of a removed analysis went with it, by the foreign key.
  const dropped = gone.filter((row) => exists(row.analysis_id));
  if (dropped.length > 0) {
    await sequelize.query(
      `DELETE FROM results r USING jsonb_to_recordset($2::jsonb) AS x(analysis_id uuid, output text)
        WHERE r.study_id = $1 AND r.analysis_id = x.analysis_id AND r.output = x.output`,
      { bind: [studyId, JSON.stringify(dropped)], transaction },
    );
  }
  if (kept.length > 0) await writeResults(sequelize, studyId, kept, transaction);
  const verdicts = [...reproof.changed.values()].flatMap((proven) => (proven ? [verdictRow(proven)] : []));
  if (verdicts.length > 0) await writeVerdicts(sequelize, studyId, verdicts, transaction);
}

async function writeResults(
  sequelize: Sequelize,
  studyId: string,
  results: readonly ResultRow[],
  transaction: Transaction,
): Promise<void> {
  await sequelize.query(
    `INSERT INTO results (study_id, analysis_id, output, value, failure)
     SELECT $1::uuid, x.analysis_id, x.output, x.value, x.failure
       FROM jsonb_to_recordset($2::jsonb) AS x(analysis_id uuid, output text, value double precision, failure jsonb)
     ON CONFLICT (study_id, analysis_id, output) DO UPDATE SET value = excluded.value, failure = excluded.failure`,
    { bind: [studyId, JSON.stringify(results)], transaction },
  );
}

interface VerdictRow {
  readonly requirement_id: string;
  readonly verdict: string;
  readonly compliance: string;
  readonly close_out: string;
  readonly value: number | null;
  readonly margin: number | null;
  readonly percent: number | null;
  readonly proven: Proven;
}

function verdictRow(proven: Proven): VerdictRow {
  return {
    requirement_id: proven.requirementId,
    verdict: proven.verdict,
    compliance: proven.compliance,
    close_out: proven.closeOut,
    value: proven.value,
    margin: proven.margin?.absolute ?? null,
    percent: proven.margin?.percent ?? null,
    proven,
  };
}

async function writeVerdicts(
  sequelize: Sequelize,
  studyId: string,
  verdicts: readonly VerdictRow[],
  transaction: Transaction,
): Promise<void> {
  await sequelize.query(
    `INSERT INTO verdicts (study_id, requirement_id, verdict, compliance, close_out, value, margin, percent, proven)
     SELECT $1::uuid, x.requirement_id, x.verdict, x.compliance, x.close_out, x.value, x.margin, x.percent, x.proven
       FROM jsonb_to_recordset($2::jsonb) AS x(requirement_id uuid, verdict text, compliance text, close_out text,
            value double precision, margin double precision, percent double precision, proven jsonb)
     ON CONFLICT (study_id, requirement_id) DO UPDATE SET verdict = excluded.verdict, compliance = excluded.compliance,
       close_out = excluded.close_out, value = excluded.value, margin = excluded.margin, percent = excluded.percent, proven = excluded.proven`,
    { bind: [studyId, JSON.stringify(verdicts)], transaction },
  );
}

/** One verdict that moved at a revision, for the margin history. */
export interface HistoryRow {
  readonly requirement_id: string;
  readonly key: string;
  readonly was: string | null;
  readonly verdict: string | null;
  readonly value: number | null;
  readonly margin: number | null;
  readonly percent: number | null;
}

/** Adds the verdicts that moved at this revision to the margin history. */
export async function writeHistory(
  sequelize: Sequelize,
  studyId: string,
  revision: number,
  history: readonly HistoryRow[],
  transaction: Transaction,
): Promise<void> {
  if (history.length === 0) return;
  await sequelize.query(
    `INSERT INTO verdict_history (study_id, revision, requirement_id, key, was, verdict, value, margin, percent)
     SELECT $1::uuid, $2::bigint, x.requirement_id, x.key, x.was, x.verdict, x.value, x.margin, x.percent
       FROM jsonb_to_recordset($3::jsonb) AS x(requirement_id uuid, key text, was text, verdict text,
            value double precision, margin double precision, percent double precision)`,
    { bind: [studyId, revision, JSON.stringify(history)], transaction },
  );
}

/** The stored derived state, for the full re-proof to be compared with. */
export interface StoredDerived {
  readonly verdicts: ReadonlyMap<string, Proven>;
  readonly results: ReadonlyMap<string, { readonly value: number | null; readonly failure: object | null }>;
}

/** Reads everything derived that is stored of a study. */
export async function readDerived(
  sequelize: Sequelize,
  studyId: string,
  transaction?: Transaction,
): Promise<StoredDerived> {
  const verdicts = await sequelize.query<{ requirement_id: string; proven: Proven }>(
    'SELECT requirement_id, proven FROM verdicts WHERE study_id = $1',
    {
      bind: [studyId],
      type: QueryTypes.SELECT,
      transaction,
    },
  );
  const results = await sequelize.query<{
    analysis_id: string;
    output: string;
    value: number | null;
    failure: object | null;
  }>('SELECT analysis_id, output, value, failure FROM results WHERE study_id = $1', {
    bind: [studyId],
    type: QueryTypes.SELECT,
    transaction,
  });
  return {
    verdicts: new Map(verdicts.map((row) => [row.requirement_id, row.proven])),
    results: new Map(
      results.map((row) => [`a:${row.analysis_id}.${row.output}`, { value: row.value, failure: row.failure }]),
    ),
  };
}

/** Every output of a proof with its outcome, in the form in which it is stored. */
export function derivedOutcomes(proof: Proof): Map<string, { value: number | null; failure: object | null }> {
  return new Map(
    outputNodes(proof.study)
      .filter((node) => proof.model.has(node))
      .map((node) => {
        const { value, failure } = resultRow(node, proof.model.outcome(node));
        return [node, { value, failure }];
      }),
  );
}
