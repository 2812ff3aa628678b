import { createTransport, type Transporter } from 'nodemailer';
import { QueryTypes, type Sequelize } from 'sequelize';
import type { Logger } from '../platform/logger';

const POLL_MS = 5000;
const LEASE_SECONDS = 90;
const FIRST_WAIT_SECONDS = 30;
const LONGEST_WAIT_SECONDS = 3600;
const MOST_ATTEMPTS = 12;

interface ClaimedMail {
  readonly id: string;
  readonly recipient: string;
  readonly subject: string;
  readonly body: string;
  readonly attempts: number;
}

/** Where mails leave to. */
export interface MailRoute {
  readonly smtpUrl: string;
  readonly from: string;
}

/**
 * Sends what the outbox holds, at least once each and with the same Message-ID every time. Several processes share the
 * work: a mail is leased before it is sent, and comes back by itself when its sender dies.
 */
export class MailSender {
  private readonly transport: Transporter;
  private readonly messageDomain: string;
  private timer: NodeJS.Timeout | null = null;
  private pass: Promise<void> | null = null;
  private again = false;
  private stopping = false;

  constructor(
    private readonly sequelize: Sequelize,
    private readonly logger: Logger,
    private readonly route: MailRoute,
  ) {
    const url = new URL(route.smtpUrl);
    const secure = url.protocol === 'smtps:';
    this.transport = createTransport({
      host: url.hostname,
      port: url.port === '' ? (secure ? 465 : 587) : Number(url.port),
      secure,
      ...(url.username === ''
        ? {}
        : { auth: { user: decodeURIComponent(url.username), pass: decodeURIComponent(url.password) } }),
      connectionTimeout: 10_000,
      greetingTimeout: 10_000,
      socketTimeout: 30_000,
      disableFileAccess: true,
      disableUrlAccess: true,
    });
    this.messageDomain = route.from.split('@')[1] ?? 'localhost.localdomain';
  }

  /** Starts looking into the outbox every few seconds. */
  start(): void {
    this.stopping = false;
    this.timer = setInterval(() => this.wake(), POLL_MS);
    this.timer.unref();
    this.wake();
  }

  /** Looks into the outbox now; called after a transaction that queued a mail. */
  wake(): void {
    if (this.stopping) return;
    if (this.pass !== null) {
      this.again = true;
      return;
    }
    this.pass = this.sendDue()
      .catch((err: unknown) => this.logger.warn({ err }, 'the outbox could not be worked on'))
      .finally(() => {
        this.pass = null;
        if (this.again) {
          this.again = false;
          this.wake();
        }
      });
  }

  /** Stops after the mail that is being sent. */
  async stop(): Promise<void> {
    this.stopping = true;
    if (this.timer !== null) clearInterval(this.timer);
    this.timer = null;
    while (this.pass !== null) await this.pass;
    this.transport.close();
  }

  /** One pass over the outbox. Leaves nothing that is due, unless it is told to stop meanwhile. */
  async sendDue(): Promise<void> {
    while (!this.stopping) {
      const mail = await this.claim();
      if (mail === null) return;
      await this.send(mail);
    }
  }

  private async claim(): Promise<ClaimedMail | null> {
    const [mail] = await this.sequelize.query<ClaimedMail>(
      `UPDATE mails SET attempts = attempts + 1, next_attempt_at = now() + make_interval(secs => $1)
        WHERE id = (SELECT id FROM mails WHERE status = 'queued' AND next_attempt_at <= now()
                     ORDER BY next_attempt_at LIMIT 1 FOR UPDATE SKIP LOCKED)
        RETURNING id, recipient, subject, body, attempts`,
      { bind: [LEASE_SECONDS], type: QueryTypes.SELECT },
    );
    return mail ?? null;
  }

  private async send(mail: ClaimedMail): Promise<void> {
    try {
      await this.transport.sendMail({
        from: { name: 'Deltaproof', address: this.route.from },
        // An object, not text: text could be read as a list of addresses.
        to: { name: '', address: mail.recipient },
        envelope: { from: this.route.from, to: [mail.recipient] },
        messageId: `<${mail.id}@${this.messageDomain}>`,
        subject: mail.subject,
        text: mail.body,
        disableFileAccess: true,
        disableUrlAccess: true,
      });
    } catch (error) {
      await this.noteFailure(mail, error);
      return;
    }
    await this.sequelize.query("UPDATE mails SET status = 'sent', sent_at = now(), body = NULL WHERE id = $1", {
      bind: [mail.id],
    });
  }

  /** A refusal for good (5xx) or too many attempts end it; otherwise the wait doubles. */
  private async noteFailure(mail: ClaimedMail, error: unknown): Promise<void> {
    const { responseCode = 0, code = 'UNKNOWN' } = error as { responseCode?: number; code?: string };
    const failed = responseCode >= 500 || mail.attempts >= MOST_ATTEMPTS;
    const wait = Math.min(FIRST_WAIT_SECONDS * 2 ** (mail.attempts - 1), LONGEST_WAIT_SECONDS);
    await this.sequelize.query(
      `UPDATE mails SET status = $2, next_attempt_at = now() + make_interval(secs => $3), last_error = $4,
              body = CASE WHEN $2 = 'failed' THEN NULL ELSE body END
        WHERE id = $1`,
      { bind: [mail.id, failed ? 'failed' : 'queued', wait, `${code} ${responseCode}`] },
    );
    this.logger.warn({ mail: mail.id, attempts: mail.attempts, code, responseCode, failed }, 'a mail was not taken');
  }
}
