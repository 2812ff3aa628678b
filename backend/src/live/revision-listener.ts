import { Client } from 'pg';
import { QueryTypes, type Sequelize } from 'sequelize';
import type { Logger } from '../platform/logger';

const SHORTEST_WAIT_MS = 100;
const LONGEST_WAIT_MS = 5000;
const PROBE_MS = 30_000;

type RevisionCallback = (revision: number) => void;
/** Called with the person, or with null when anybody's access may have changed unseen. */
type AccessCallback = (personId: string | null) => void;

/**
 * Hears what other server processes commit. The connection is restored by itself; what was announced meanwhile is
 * caught up from the tables, so that a listener may hear of a revision late but never misses the newest.
 */
export class RevisionListener {
  private readonly revisionCallbacks = new Map<string, Set<RevisionCallback>>();
  private readonly accessCallbacks = new Set<AccessCallback>();
  private client: Client | null = null;
  private probe: NodeJS.Timeout | null = null;
  private retry: NodeJS.Timeout | null = null;
  private waitMs = SHORTEST_WAIT_MS;
  private stopped = false;

  constructor(
    private readonly databaseUrl: string,
    private readonly sequelize: Sequelize,
    private readonly logger: Logger,
  ) {}

  /** Connects; resolves once listening. */
  async start(): Promise<void> {
    await this.connect();
  }

  /** Calls back with the newest revision whenever the study gets one; returns the function that ends it. */
  onStudyRevision(studyId: string, callback: RevisionCallback): () => void {
    const callbacks = this.revisionCallbacks.get(studyId) ?? new Set();
    callbacks.add(callback);
    this.revisionCallbacks.set(studyId, callbacks);
    return () => {
      callbacks.delete(callback);
      if (callbacks.size === 0 && this.revisionCallbacks.get(studyId) === callbacks)
        this.revisionCallbacks.delete(studyId);
    };
  }

  /** Calls back whenever sessions or rights changed; returns the function that ends it. */
  onAccessChange(callback: AccessCallback): () => void {
    this.accessCallbacks.add(callback);
    return () => this.accessCallbacks.delete(callback);
  }

  async stop(): Promise<void> {
    this.stopped = true;
    if (this.probe !== null) clearInterval(this.probe);
    if (this.retry !== null) clearTimeout(this.retry);
    const { client } = this;
    this.client = null;
    await client?.end().catch(() => undefined);
  }

  private async connect(): Promise<void> {
    const client = new Client({
      connectionString: this.databaseUrl,
      application_name: 'deltaproof-live',
      keepAlive: true,
      connectionTimeoutMillis: 5000,
    });
    client.on('notification', ({ channel, payload = '' }) => this.hear(channel, payload));
    client.on('error', (err) => this.logger.warn({ err }, 'the listening connection broke'));
    // On a restart of the database the connection may end without an error.
    client.on('end', () => this.reconnectAfter(client));
    try {
      await client.connect();
      await client.query('LISTEN study_revision');
      await client.query('LISTEN access_changed');
      this.client = client;
    } catch (error) {
      await client.end().catch(() => undefined);
      throw error;
    }
    this.waitMs = SHORTEST_WAIT_MS;
    this.probe = setInterval(() => this.probeConnection(client), PROBE_MS);
    this.probe.unref();
  }

  /** A connection that was cut without a word shows only when it is used. */
  private probeConnection(client: Client): void {
    const deadline = setTimeout(() => void client.end().catch(() => undefined), 5000);
    client
      .query('SELECT 1')
      .catch(() => undefined)
      .finally(() => clearTimeout(deadline));
  }

  private reconnectAfter(client: Client): void {
    if (this.stopped || this.client !== client) return;
    this.client = null;
    if (this.probe !== null) clearInterval(this.probe);
    this.scheduleReconnect();
  }

  private scheduleReconnect(): void {
    if (this.stopped) return;
    this.retry = setTimeout(() => {
      this.connect()
        .then(() => this.catchUp())
        .catch((err: unknown) => {
          this.logger.warn({ err }, 'listening could not be resumed yet');
          if (this.client === null) this.scheduleReconnect();
        });
    }, this.waitMs);
    this.retry.unref();
    this.waitMs = Math.min(this.waitMs * 2, LONGEST_WAIT_MS);
  }

  private async catchUp(): Promise<void> {
    for (const callback of [...this.accessCallbacks]) callback(null);
    const rows = await this.sequelize.query<{ id: string; revision: string }>(
      'SELECT id, revision FROM studies WHERE id = ANY($1::uuid[])',
      { bind: [[...this.revisionCallbacks.keys()]], type: QueryTypes.SELECT },
    );
    for (const { id, revision } of rows) this.announce(id, Number(revision));
  }

  private hear(channel: string, payload: string): void {
    // Triggers announce whose sessions or rights changed; a commit of the one path announces `{studyId, revision}`.
    if (channel === 'access_changed') {
      for (const callback of [...this.accessCallbacks]) callback(payload);
      return;
    }
    try {
      const { studyId, revision } = JSON.parse(payload) as { studyId: string; revision: number };
      this.announce(studyId, Number(revision));
    } catch (err) {
      this.logger.warn({ err }, 'an announcement could not be read');
    }
  }

  private announce(studyId: string, revision: number): void {
    for (const callback of [...(this.revisionCallbacks.get(studyId) ?? [])]) callback(revision);
  }
}
