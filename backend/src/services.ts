import type { LedgerFeed } from './live/ledger-feed';
import type { LiveStreams } from './live/live-streams';
import type { RevisionListener } from './live/revision-listener';
import type { MailCatcher } from './mail/mail-catcher';
import type { MailSender } from './mail/mail-sender';
import type { Throttles } from './middleware/throttles';
import type { Authenticator } from './middleware/authenticate';
import type { BackgroundWork } from './platform/background-work';
import type { Config } from './platform/config';
import type { Database } from './platform/database';
import type { Logger } from './platform/logger';
import type { PasswordHasher } from './platform/password-hashing';
import type { Secrets } from './platform/secrets';
import type { EditService } from './study/edit-service';
import type { Standpoints } from './study/standpoints';
import type { StudyStore } from './study/study-store';

/** What handlers work with; made once at start-up and passed in every call. */
export interface Services extends Database {
  readonly config: Config;
  readonly secrets: Secrets;
  readonly logger: Logger;
  readonly passwords: PasswordHasher;
  readonly authenticator: Authenticator;
  readonly throttles: Throttles;
  readonly mailSender: MailSender;
  /** Keeps the mails of a demonstration; null where mails really leave. */
  readonly mailCatcher: MailCatcher | null;
  readonly revisions: RevisionListener;
  readonly streams: LiveStreams;
  readonly ledgerFeed: LedgerFeed;
  readonly background: BackgroundWork;
  /** Studies in memory, validated by their revision. */
  readonly studies: StudyStore;
  /** The one way in for changes. */
  readonly edits: EditService;
  /** The one way out for reads. */
  readonly standpoints: Standpoints;
}
