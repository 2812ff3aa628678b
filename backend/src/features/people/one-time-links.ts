import { createHash, randomBytes } from 'node:crypto';
import { QueryTypes, type Sequelize, type Transaction } from 'sequelize';
import { ProblemError } from '../../middleware/problems';
import type { TokenPurpose } from '../../models/one-time-token';

const VALID_SECONDS: Readonly<Record<TokenPurpose, number>> = {
  invite: 72 * 3600,
  reset: 30 * 60,
  'first-administrator': 72 * 3600,
};

/** Makes a link's code (32 random bytes) for a person and voids earlier ones of the same purpose; only its digest is kept. */
export async function issueToken(
  sequelize: Sequelize,
  transaction: Transaction,
  purpose: TokenPurpose,
  personId: string | null,
): Promise<string> {
  const token = randomBytes(32).toString('base64url');
  await voidTokens(sequelize, transaction, purpose, personId);
  await sequelize.query(
    `INSERT INTO tokens (digest, purpose, person_id, expires_at)
     VALUES ($1, $2, $3, now() + make_interval(secs => $4))`,
    { bind: [digestOf(token), purpose, personId, VALID_SECONDS[purpose]], transaction },
  );
  return token;
}

/** Uses a code up; of two uses at once exactly one gets through. Throws link-not-valid for unknown, used and expired ones alike. */
export async function useToken(
  sequelize: Sequelize,
  transaction: Transaction,
  purposes: readonly TokenPurpose[],
  token: string,
): Promise<{ readonly purpose: TokenPurpose; readonly personId: string | null }> {
  const [row] = await sequelize.query<{ purpose: TokenPurpose; person_id: string | null }>(
    `UPDATE tokens SET used_at = now()
      WHERE digest = $1 AND purpose = ANY($2) AND used_at IS NULL AND expires_at > now()
      RETURNING purpose, person_id`,
    { bind: [digestOf(token), [...purposes]], transaction, type: QueryTypes.SELECT },
  );
  if (row === undefined) throw new LinkNotValid();
  return { purpose: row.purpose, personId: row.person_id };
}

/** Voids what is still open of a purpose. */
export async function voidTokens(
  sequelize: Sequelize,
  transaction: Transaction,
  purpose: TokenPurpose,
  personId: string | null,
): Promise<void> {
  await sequelize.query(
    `UPDATE tokens SET used_at = now()
      WHERE purpose = $1 AND person_id IS NOT DISTINCT FROM $2::uuid AND used_at IS NULL`,
    { bind: [purpose, personId], transaction },
  );
}

/** 410: one answer for every way in which a one-time link can be of no use. */
export class LinkNotValid extends ProblemError {
  constructor() {
    super(
      410,
      'link-not-valid',
      'Link not valid',
      'This link has been used, has expired or was never given. Ask for a new one.',
    );
  }
}

function digestOf(token: string): string {
  return createHash('sha256').update(token).digest('hex');
}
