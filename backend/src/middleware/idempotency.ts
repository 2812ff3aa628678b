import { createHash } from 'node:crypto';
import { QueryTypes, type Sequelize, type Transaction, UniqueConstraintError } from 'sequelize';
import * as z from 'zod';
import { ProblemError } from './problems';

/** One write as its sender named it. The digest binds the name to what was asked, so that it cannot mean two things. */
export interface IdempotencyKey {
  readonly key: string;
  readonly personId: string;
  readonly studyId: string | null;
  readonly requestDigest: string;
}

export interface RememberedAnswer {
  readonly status: number;
  /** Absent for an answer without content. */
  readonly body?: unknown;
}

/** Thrown when the same write was committed by another request meanwhile; the answer is then recalled, nothing is applied. */
export class AlreadyAnswered extends Error {}

const Key = z.uuid();

/** Keys whose answer was kept while their request was being served. */
const remembered = new WeakSet<IdempotencyKey>();

/** Reads the Idempotency-Key header; throws a problem when it is missing or no UUID. */
export function readIdempotencyKey(
  header: string | undefined,
  who: { readonly personId: string; readonly studyId: string | null },
  asked: { readonly method: string; readonly path: string; readonly body: unknown },
): IdempotencyKey {
  if (header === undefined || !Key.safeParse(header).success) {
    throw new ProblemError(
      400,
      'idempotency-key-missing',
      'Idempotency-Key needed',
      'Every write needs the header Idempotency-Key with a fresh UUID, repeated when the same write is sent again.',
      { fields: [{ field: 'Idempotency-Key', value: header, message: 'is not a UUID', expected: 'a UUID' }] },
    );
  }
  const text = JSON.stringify([asked.method, asked.path, asked.body ?? null]);
  return { key: header.toLowerCase(), ...who, requestDigest: createHash('sha256').update(text).digest('hex') };
}

/** The answer once given to this key, or null; throws 422 when the key was used for another request. */
export async function recalledAnswer(
  sequelize: Sequelize,
  idempotency: IdempotencyKey,
  transaction?: Transaction,
): Promise<RememberedAnswer | null> {
  const [row] = await sequelize.query<{ request_digest: string; status: number; body: unknown }>(
    'SELECT request_digest, status, body FROM idempotency_keys WHERE person_id = $1 AND key = $2',
    { bind: [idempotency.personId, idempotency.key], type: QueryTypes.SELECT, transaction },
  );
  if (row === undefined) return null;
  if (row.request_digest !== idempotency.requestDigest) {
    throw new ProblemError(
      422,
      'idempotency-key-reused',
      'Idempotency-Key used before',
      'This Idempotency-Key was used for another request. Use a fresh UUID for every new write.',
    );
  }
  return { status: row.status, body: row.body };
}

/**
 * Keeps the answer in the transaction of the write, so that a repeated request gets it again and applies nothing.
 * Throws AlreadyAnswered when another request with the key was faster: let it pass through, the write rolls back.
 */
export async function rememberAnswer(
  transaction: Transaction,
  idempotency: IdempotencyKey,
  answer: RememberedAnswer,
): Promise<void> {
  try {
    await transactionOwner(transaction).query(
      `INSERT INTO idempotency_keys (person_id, key, study_id, request_digest, status, body)
       VALUES ($1, $2, $3, $4, $5, $6::jsonb)`,
      {
        bind: [
          idempotency.personId,
          idempotency.key,
          idempotency.studyId,
          idempotency.requestDigest,
          answer.status,
          answer.body === undefined ? null : JSON.stringify(answer.body),
        ],
        transaction,
      },
    );
  } catch (error) {
    if (error instanceof UniqueConstraintError) throw new AlreadyAnswered('the same write was answered meanwhile');
    throw error;
  }
  remembered.add(idempotency);
}

/** Whether the handler has kept the answer itself, in the transaction of its write. */
export function wasRemembered(idempotency: IdempotencyKey): boolean {
  return remembered.has(idempotency);
}

/** Sequelize's types leave out the instance that every transaction carries. */
function transactionOwner(transaction: Transaction): Sequelize {
  return (transaction as unknown as { sequelize: Sequelize }).sequelize;
}
