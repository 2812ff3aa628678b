import type { Command, Patch, Verdict } from '@shared/contract';
import { canonicalJson, digestText } from '@shared/study';
import { QueryTypes, type Sequelize, type Transaction } from 'sequelize';

/** Head of a chain without entries. */
export const CHAIN_START = '0'.repeat(64);

export interface LedgerEntry {
  readonly revision: number;
  readonly personId: string;
  readonly at: string;
  readonly summary: string;
  readonly why: string;
  readonly commands: readonly Command[];
  readonly patch: Patch;
  readonly moved: readonly { readonly key: string; readonly from: Verdict | null; readonly to: Verdict | null }[];
  readonly previous: string;
  readonly digest: string;
}

/** What the digest of an entry covers: everything entered, and nothing derived. */
function contentOf(entry: Omit<LedgerEntry, 'digest' | 'moved'>): string {
  const { revision, personId, at, summary, why, commands, patch, previous } = entry;
  return canonicalJson({ revision, personId, at, summary, why, commands, patch, previous });
}

/** Adds an entry to the chain of a study; the caller holds the study's row lock. Returns the new head. */
export async function appendEntry(
  sequelize: Sequelize,
  studyId: string,
  entry: Omit<LedgerEntry, 'digest'>,
  transaction: Transaction,
): Promise<string> {
  const content = contentOf(entry);
  const digest = digestText(content);
  await sequelize.query(
    `INSERT INTO ledger (study_id, revision, person_id, at, summary, why, commands, patch, moved, previous, digest, content)
     VALUES ($1, $2, $3, $4, $5, $6, $7::jsonb, $8::jsonb, $9::jsonb, $10, $11, $12)`,
    {
      bind: [
        studyId,
        entry.revision,
        entry.personId,
        entry.at,
        entry.summary,
        entry.why,
        JSON.stringify(entry.commands),
        JSON.stringify(entry.patch),
        JSON.stringify(entry.moved),
        entry.previous,
        digest,
        content,
      ],
      transaction,
    },
  );
  return digest;
}

interface Row {
  readonly revision: string;
  readonly person_id: string;
  readonly at: Date;
  readonly summary: string;
  readonly why: string;
  readonly commands: Command[];
  readonly patch: Patch;
  readonly moved: LedgerEntry['moved'];
  readonly previous: string;
  readonly digest: string;
}

function entryOf(row: Row): LedgerEntry {
  const { person_id, at, revision, ...rest } = row;
  return { ...rest, revision: Number(revision), personId: person_id, at: at.toISOString() };
}

/** Entries with from < revision ≤ to, oldest first. */
export async function entriesBetween(
  sequelize: Sequelize,
  studyId: string,
  from: number,
  to: number,
  transaction?: Transaction,
): Promise<LedgerEntry[]> {
  const rows = await sequelize.query<Row>(
    `SELECT revision, person_id, at, summary, why, commands, patch, moved, previous, digest
       FROM ledger WHERE study_id = $1 AND revision > $2 AND revision <= $3 ORDER BY revision`,
    { bind: [studyId, from, to], type: QueryTypes.SELECT, transaction },
  );
  return rows.map(entryOf);
}

/** Entries before a revision, newest first. */
export async function entriesBefore(
  sequelize: Sequelize,
  studyId: string,
  before: number,
  limit: number,
): Promise<LedgerEntry[]> {
  const rows = await sequelize.query<Row>(
    `SELECT revision, person_id, at, summary, why, commands, patch, moved, previous, digest
       FROM ledger WHERE study_id = $1 AND revision < $2 ORDER BY revision DESC LIMIT $3`,
    { bind: [studyId, before, limit], type: QueryTypes.SELECT },
  );
  return rows.map(entryOf);
}

/** What a check of the chain found: the first entry that does not follow from the one before it, or none. */
export interface ChainCheck {
  readonly entries: number;
  readonly head: string;
  readonly broken: { readonly revision: number; readonly why: string } | null;
}

/** Checks the whole chain of a study: every digest against its content, every link, no gap, and the head against the study's. */
export async function checkChain(sequelize: Sequelize, studyId: string): Promise<ChainCheck> {
  const rows = await sequelize.query<Row & { content: string }>(
    `SELECT revision, person_id, at, summary, why, commands, patch, moved, previous, digest, content
       FROM ledger WHERE study_id = $1 ORDER BY revision`,
    { bind: [studyId], type: QueryTypes.SELECT },
  );
  const [study] = await sequelize.query<{ revision: string; ledger_head: string | null }>(
    'SELECT revision, ledger_head FROM studies WHERE id = $1',
    {
      bind: [studyId],
      type: QueryTypes.SELECT,
    },
  );
  let head = CHAIN_START;
  let expected = 1;
  for (const row of rows) {
    const revision = Number(row.revision);
    const broken = (why: string): ChainCheck => ({ entries: rows.length, head, broken: { revision, why } });
    if (revision !== expected) return broken(`revision ${expected} is missing`);
    if (row.previous !== head) return broken('it does not follow from the entry before it');
    if (digestText(row.content) !== row.digest) return broken('its content does not have its digest');
    if (contentOf(entryOf(row)) !== row.content) return broken('its columns do not say what its content says');
    head = row.digest;
    expected += 1;
  }
  if (Number(study?.revision ?? 0) !== rows.length || (study?.ledger_head ?? CHAIN_START) !== head) {
    return {
      entries: rows.length,
      head,
      broken: { revision: expected, why: 'the study stands at another revision or head than its last entry' },
    };
  }
  return { entries: rows.length, head, broken: null };
}
