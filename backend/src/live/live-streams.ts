import type { StudyEvent } from '@shared/contract';
import type { Response } from 'express';
import type { Logger } from '../platform/logger';
import type { LedgerFeed } from './ledger-feed';
import type { RevisionListener } from './revision-listener';

const HEARTBEAT_MS = 20_000;
const MOST_UNSENT_BYTES = 1_000_000;
/** A client further behind than this reads the study anew, which is cheaper than the events between. */
const MOST_MISSED = 2000;
const STREAMS_PER_PERSON = 20;

export interface StreamRequest {
  readonly response: Response;
  readonly personId: string;
  readonly studyId: string;
  /** The study's revision when the stream was opened. */
  readonly revision: number;
  /** The last revision that the client has seen, when it reconnects. */
  readonly lastSeen: number | null;
  /** Whether the session still stands and the person is still a member. */
  readonly mayStillRead: () => Promise<boolean>;
}

/** All open live streams of this server process. */
export class LiveStreams {
  private readonly open = new Set<LiveStream>();
  private readonly stopListening: () => void;

  constructor(
    private readonly revisions: RevisionListener,
    private readonly feed: LedgerFeed,
    private readonly logger: Logger,
  ) {
    this.stopListening = revisions.onAccessChange((personId) => {
      for (const stream of this.open) if (personId === null || stream.personId === personId) stream.checkAccess();
    });
  }

  /** Answers a request with a stream of the study's events until the client goes or loses its right to it. */
  start(request: StreamRequest): void {
    const own = [...this.open].filter((stream) => stream.personId === request.personId);
    if (own.length >= STREAMS_PER_PERSON) own[0]?.end();
    const stream = new LiveStream(request, this.feed, this.logger);
    this.open.add(stream);
    const stopListening = this.revisions.onStudyRevision(request.studyId, (revision) => stream.advanceTo(revision));
    request.response.once('close', () => {
      stopListening();
      stream.end();
      this.open.delete(stream);
    });
    stream.begin();
  }

  /** Ends every stream, for shutting down; clients reconnect elsewhere with the last revision they saw. */
  stop(): void {
    this.stopListening();
    for (const stream of this.open) stream.end();
  }
}

/** One client's stream. Events leave in order of revision, each once. */
class LiveStream {
  readonly personId: string;
  private sent: number;
  private target: number;
  private pumping = false;
  private ended = false;
  private readonly heartbeat: NodeJS.Timeout;

  constructor(
    private readonly request: StreamRequest,
    private readonly feed: LedgerFeed,
    private readonly logger: Logger,
  ) {
    this.personId = request.personId;
    this.target = request.revision;
    this.sent = request.lastSeen ?? request.revision;
    this.heartbeat = setInterval(() => {
      this.write(': still here\n\n');
      this.checkAccess();
    }, HEARTBEAT_MS);
    this.heartbeat.unref();
  }

  begin(): void {
    const { response, revision, lastSeen } = this.request;
    response.status(200).set({
      'Content-Type': 'text/event-stream; charset=utf-8',
      'Cache-Control': 'no-store, no-transform',
      'X-Accel-Buffering': 'no',
    });
    response.flushHeaders();
    this.write('retry: 2000\n\n');
    const missed = revision - this.sent;
    if (missed < 0 || missed > MOST_MISSED) {
      this.sent = revision;
      this.write(`event: reset\nid: ${revision}\ndata: ${JSON.stringify({ revision })}\n\n`);
      return;
    }
    // The id stays behind when events are still to follow: a cut in between must not skip them.
    const id = lastSeen === null ? `id: ${revision}\n` : '';
    this.write(`event: revision\n${id}data: ${JSON.stringify({ revision })}\n\n`);
    this.advanceTo(revision);
  }

  /** Sends what lies between the last event sent and the given revision. */
  advanceTo(revision: number): void {
    this.target = Math.max(this.target, revision);
    if (this.pumping || this.ended || this.target <= this.sent) return;
    this.pumping = true;
    this.pump()
      .catch((err: unknown) => {
        this.logger.warn({ err }, 'a live stream ended because the ledger could not be read');
        this.end();
      })
      .finally(() => {
        this.pumping = false;
        // A revision may have been announced between the last look and here.
        this.advanceTo(this.target);
      });
  }

  checkAccess(): void {
    this.request
      .mayStillRead()
      .then((may) => {
        if (!may) this.end();
      })
      .catch(() => this.end());
  }

  end(): void {
    if (this.ended) return;
    this.ended = true;
    clearInterval(this.heartbeat);
    this.request.response.end();
  }

  private async pump(): Promise<void> {
    while (this.sent < this.target && !this.ended) {
      const events = await this.feed.eventsSince(this.request.studyId, this.sent);
      if (events.length === 0) throw new Error('an announced revision has no ledger entry');
      for (const event of events) this.send(event);
    }
  }

  private send(event: StudyEvent): void {
    this.write(`event: revision\nid: ${event.revision}\ndata: ${JSON.stringify(event)}\n\n`);
    this.sent = event.revision;
  }

  /** A client that does not read is cut off, not buffered without end; it can resume where it stopped. */
  private write(text: string): void {
    if (this.ended) return;
    this.request.response.write(text);
    if (this.request.response.writableLength > MOST_UNSENT_BYTES) this.end();
  }
}
