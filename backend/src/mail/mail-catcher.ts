import type { DemonstrationMail } from '@shared/contract';
import { simpleParser } from 'mailparser';
import type { AddressInfo } from 'node:net';
import { SMTPServer } from 'smtp-server';
import type { Logger } from '../platform/logger';

const KEPT = 200;
const LARGEST_MAIL = 256 * 1024;

/** A mail server on loopback that keeps the last mails in memory instead of delivering them. */
export class MailCatcher {
  private readonly kept: DemonstrationMail[] = [];
  private received = 0;
  private readonly server: SMTPServer;

  constructor(logger: Logger) {
    this.server = new SMTPServer({
      authOptional: true,
      disabledCommands: ['AUTH', 'STARTTLS'],
      size: LARGEST_MAIL,
      disableReverseLookup: true,
      onData: (stream, session, done) => {
        const to = session.envelope.rcptTo.map((recipient) => recipient.address);
        simpleParser(stream).then(
          (mail) => {
            this.keep(to, mail.subject ?? '', mail.text ?? '');
            done();
          },
          (error: unknown) => done(error as Error),
        );
      },
    });
    this.server.on('error', (err) => logger.warn({ err }, 'the mail catcher failed'));
  }

  /** Starts listening on a free loopback port; returns the port. */
  async start(): Promise<number> {
    await new Promise<void>((resolve) => this.server.listen(0, '127.0.0.1', () => resolve()));
    return (this.server.server.address() as AddressInfo).port;
  }

  /** Mails kept, newest first. `to` is the envelope, that is to say where the mail would really have gone. */
  mails(): readonly DemonstrationMail[] {
    return this.kept;
  }

  async stop(): Promise<void> {
    await new Promise<void>((resolve) => this.server.close(() => resolve()));
  }

  private keep(to: string[], subject: string, text: string): void {
    this.received += 1;
    this.kept.unshift({ id: String(this.received), to, subject, text, at: new Date().toISOString() });
    this.kept.length = Math.min(this.kept.length, KEPT);
  }
}
