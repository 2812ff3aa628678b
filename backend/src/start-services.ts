import { LedgerTableFeed } from './live/ledger-feed';
import { LiveStreams } from './live/live-streams';
import { RevisionListener } from './live/revision-listener';
import { MailCatcher } from './mail/mail-catcher';
import { MailSender } from './mail/mail-sender';
import { createAuthenticator } from './middleware/authenticate';
import { Throttles } from './middleware/throttles';
import { BackgroundWork } from './platform/background-work';
import type { Config } from './platform/config';
import { assertDurable, type Database } from './platform/database';
import type { Logger } from './platform/logger';
import { PasswordHasher } from './platform/password-hashing';
import { readOrMakeSecrets } from './platform/secrets';
import type { Services } from './services';
import { EditService } from './study/edit-service';
import { Standpoints } from './study/standpoints';
import { StudyStore } from './study/study-store';

/** Starts everything that handlers work with. Throws a StartRefusal for a database that cannot be relied on. */
export async function startServices(config: Config, logger: Logger, database: Database): Promise<Services> {
  const secrets = readOrMakeSecrets(config.dataDirectory);
  const { sequelize, pool } = database;
  if (!config.allowUnsafeDatabase) await assertDurable(sequelize);
  const revisions = new RevisionListener(config.databaseUrl, sequelize, logger);
  await revisions.start();
  const mailCatcher = config.smtpUrl === null ? new MailCatcher(logger) : null;
  const smtpUrl = config.smtpUrl ?? `smtp://127.0.0.1:${await mailCatcher?.start()}`;
  const mailSender = new MailSender(sequelize, logger, { smtpUrl, from: config.mailFrom });
  mailSender.start();
  const passwords = new PasswordHasher(config.passwordHashing);
  const ledgerFeed = new LedgerTableFeed(sequelize);
  const studies = new StudyStore(sequelize);
  return {
    ...database,
    config,
    secrets,
    logger,
    passwords,
    authenticator: createAuthenticator(sequelize, passwords, config.sessionLimits),
    throttles: new Throttles(pool, config.signIn, config.requestsPerMinute),
    mailSender,
    mailCatcher,
    revisions,
    ledgerFeed,
    streams: new LiveStreams(revisions, ledgerFeed, logger),
    background: new BackgroundWork(logger),
    studies,
    edits: new EditService(studies),
    standpoints: new Standpoints(studies, sequelize),
  };
}

/** Stops everything in the order in which it depends on each other; the database stays open. */
export async function stopServices(services: Services): Promise<void> {
  services.streams.stop();
  await services.background.settled();
  await services.mailSender.stop();
  await services.mailCatcher?.stop();
  await services.revisions.stop();
}
