import { proveAll, reprove, type Proof } from '@shared/study';
import { QueryTypes, type Sequelize, Transaction } from 'sequelize';
import { NotFound } from '../middleware/problems';
import { readStudy } from './entity-rows';
import { CHAIN_START, entriesBetween } from './ledger';

/** The study as it stands, proved; kept in memory and validated by its revision. */
export interface Current {
  readonly studyId: string;
  readonly revision: number;
  readonly ledgerHead: string;
  readonly provedAt: string;
  readonly proof: Proof;
}

const MOST_STUDIES = 20;
/** Further behind than this, reading afresh is quicker than catching up. */
const MOST_TO_CATCH_UP = 200;

interface Head {
  readonly revision: string;
  readonly ledger_head: string | null;
  readonly now: Date;
}

/**
 * Studies in memory: a cache per server process that can be thrown away at any moment. Another process's edits are
 * caught up from the ledger. PostgreSQL is the truth: whoever writes holds the row lock of the study.
 */
export class StudyStore {
  private readonly cache = new Map<string, Current>();
  private readonly queues = new Map<string, Promise<unknown>>();

  constructor(readonly sequelize: Sequelize) {}

  /** The study at its newest revision. Throws NotFound when there is none. */
  async now(studyId: string): Promise<Current> {
    const head = await this.head(studyId);
    const cached = this.cache.get(studyId);
    if (cached && cached.revision === Number(head.revision)) return cached;
    return this.inTurn(studyId, async () => {
      const again = await this.head(studyId);
      return this.atHead(studyId, again);
    });
  }

  /** Runs `work` alone in this process for this study: edits and catching up never interleave. */
  inTurn<T>(studyId: string, work: () => Promise<T>): Promise<T> {
    const before = this.queues.get(studyId) ?? Promise.resolve();
    const mine = before.then(work, work);
    const settled = mine.then(
      () => undefined,
      () => undefined,
    );
    this.queues.set(studyId, settled);
    void settled.then(() => {
      if (this.queues.get(studyId) === settled) this.queues.delete(studyId);
    });
    return mine;
  }

  /** Takes the row lock of the study and brings the cache to its revision; call inside `inTurn` with a transaction. */
  async locked(studyId: string, transaction: Transaction): Promise<{ current: Current; at: Date }> {
    const head = await this.head(studyId, transaction, true);
    return { current: await this.atHead(studyId, head, transaction), at: head.now };
  }

  /** Takes over what an edit that was committed has made. */
  publish(current: Current): void {
    this.cache.delete(current.studyId);
    this.cache.set(current.studyId, current);
    for (const id of this.cache.keys()) {
      if (this.cache.size <= MOST_STUDIES) break;
      this.cache.delete(id);
    }
  }

  /** Forgets a study: after a commit whose fate is unknown the rows alone say what holds. */
  forget(studyId: string): void {
    this.cache.delete(studyId);
  }

  private async head(studyId: string, transaction?: Transaction, lock = false): Promise<Head> {
    const [row] = await this.sequelize.query<Head>(
      lock
        ? 'SELECT revision, ledger_head, clock_timestamp() AS now FROM studies WHERE id = $1 FOR UPDATE'
        : 'SELECT revision, ledger_head, clock_timestamp() AS now FROM studies WHERE id = $1',
      { bind: [studyId], type: QueryTypes.SELECT, transaction },
    );
    if (!row) throw new NotFound();
    return row;
  }

  private async atHead(studyId: string, head: Head, transaction?: Transaction): Promise<Current> {
    const revision = Number(head.revision);
    const cached = this.cache.get(studyId);
    if (cached?.revision === revision) return cached;
    const caughtUp =
      cached && revision > cached.revision && revision - cached.revision <= MOST_TO_CATCH_UP
        ? await this.catchUp(cached, revision, transaction)
        : null;
    if (!caughtUp) return this.readAfresh(studyId, transaction);
    const current = {
      studyId,
      revision,
      ledgerHead: head.ledger_head ?? CHAIN_START,
      provedAt: head.now.toISOString(),
      proof: caughtUp,
    };
    this.publish(current);
    return current;
  }

  private async catchUp(cached: Current, revision: number, transaction?: Transaction): Promise<Proof | null> {
    const entries = await entriesBetween(this.sequelize, cached.studyId, cached.revision, revision, transaction);
    if (entries.length !== revision - cached.revision) return null;
    let { proof } = cached;
    for (const { patch } of entries) {
      const fork = proof.study.fork();
      fork.absorb(patch);
      const reproof = reprove(proof, fork, fork.patch());
      proof.study.absorb(patch);
      proof = reproof.publish();
    }
    return proof;
  }

  private async readAfresh(studyId: string, transaction?: Transaction): Promise<Current> {
    const read = async (within: Transaction): Promise<Current> => {
      const head = await this.head(studyId, within, transaction !== undefined);
      const study = await readStudy(studyId, within);
      if (!study) throw new NotFound();
      return {
        studyId,
        revision: Number(head.revision),
        ledgerHead: head.ledger_head ?? CHAIN_START,
        provedAt: head.now.toISOString(),
        proof: proveAll(study),
      };
    };
    // Rows of many tables must be of one revision: outside an edit, which holds the lock, a repeatable read gives that.
    const current = transaction
      ? await read(transaction)
      : await this.sequelize.transaction({ isolationLevel: Transaction.ISOLATION_LEVELS.REPEATABLE_READ }, read);
    this.publish(current);
    return current;
  }
}
