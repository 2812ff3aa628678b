import type { AddressInfo } from 'node:net';
import { SMTPServer, type SMTPServerOptions } from 'smtp-server';
import { createTestApp, type TestApp } from '../../test/app';
import { OutgoingMail } from '../models';
import { MailSender } from './mail-sender';
import { queueMail } from './outbox';

let testApp: TestApp;
beforeAll(async () => {
  testApp = await createTestApp();
  // Each test runs a sender of its own against a server of its own.
  await testApp.services.mailSender.stop();
});
afterAll(() => testApp.close());
afterEach(() => OutgoingMail.destroy({ where: {} }));

interface Taken {
  readonly recipients: string[];
  readonly raw: string;
}

/** Runs `work` with a mail server that behaves as told; gives what it has taken. */
async function withServer(
  behaviour: Partial<SMTPServerOptions>,
  work: (sender: MailSender, taken: Taken[]) => Promise<void>,
): Promise<void> {
  const taken: Taken[] = [];
  const server = new SMTPServer({
    authOptional: true,
    disabledCommands: ['AUTH', 'STARTTLS'],
    onData: (stream, session, done) => {
      let raw = '';
      stream.on('data', (chunk: Buffer) => (raw += chunk.toString()));
      stream.on('end', () => {
        taken.push({ recipients: session.envelope.rcptTo.map(({ address }) => address), raw });
        done();
      });
    },
    ...behaviour,
  });
  server.on('error', () => undefined);
  await new Promise<void>((resolve) => server.listen(0, '127.0.0.1', resolve));
  const { port } = server.server.address() as AddressInfo;
  const { sequelize, logger } = testApp.services;
  const sender = new MailSender(sequelize, logger, {
    smtpUrl: `smtp://127.0.0.1:${port}`,
    from: 'deltaproof@example.org',
  });
  try {
    await work(sender, taken);
  } finally {
    await sender.stop();
    await new Promise<void>((resolve) => server.close(resolve));
  }
}
const queue = (to: string, subject = 'Subject', text = 'Text'): Promise<void> =>
  testApp.services.sequelize.transaction((transaction) => queueMail(transaction, to, { subject, text }));
const mail = (): Promise<OutgoingMail> => OutgoingMail.findOne({ rejectOnEmpty: true });
/** One pass over the outbox. */
const pass = (sender: MailSender): Promise<void> => sender.sendDue();
const refusal = (code: number): Error => Object.assign(new Error('no'), { responseCode: code });

it('reaches exactly one recipient, and leaves no text behind', async () => {
  await withServer({}, async (sender, taken) => {
    await queue('ivy@example.org', 'Invitation', 'The link');
    await pass(sender);
    expect(taken.map(({ recipients }) => recipients)).toEqual([['ivy@example.org']]);
    expect(taken[0]?.raw).toContain('The link');
    expect(await mail()).toMatchObject({ status: 'sent', body: null, attempts: 1, sentAt: expect.any(Date) });
  });
});

it.each([
  '"b@example.org, evil"@example.org',
  'a@example.org, b@example.org',
  'a@example.org\r\nRCPT TO:<b@example.org>',
  'Ivy <a@example.org>',
  '',
])('refuses to queue a mail to %j', async (address) => {
  await expect(queue(address)).rejects.toThrow();
  expect(await OutgoingMail.count()).toBe(0);
});

it('keeps line breaks in a subject from becoming headers', async () => {
  await withServer({}, async (sender, taken) => {
    await queue('ivy@example.org', 'Hello\r\nBcc: evil@example.org');
    await pass(sender);
    expect(taken[0]?.recipients).toEqual(['ivy@example.org']);
    expect(taken[0]?.raw).not.toMatch(/^Bcc:/m);
  });
});

it('is not queued when what caused it fails', async () => {
  const { sequelize } = testApp.services;
  await expect(
    sequelize.transaction(async (transaction) => {
      await queueMail(transaction, 'ivy@example.org', { subject: 'x', text: 'x' });
      throw new Error('the cause failed');
    }),
  ).rejects.toThrow('the cause failed');
  expect(await OutgoingMail.count()).toBe(0);
});

it('waits and tries again when the server is busy, with the same Message-ID', async () => {
  let refuse = true;
  await withServer(
    { onRcptTo: (_address, _session, done) => done(refuse ? refusal(451) : undefined) },
    async (sender, taken) => {
      await queue('ivy@example.org');
      await pass(sender);
      const waiting = await mail();
      expect(waiting).toMatchObject({ status: 'queued', attempts: 1, body: 'Text' });
      const seconds = (waiting.nextAttemptAt.getTime() - Date.now()) / 1000;
      expect(seconds).toBeGreaterThan(25);
      expect(seconds).toBeLessThan(35);
      refuse = false;
      await OutgoingMail.update({ nextAttemptAt: new Date(0) }, { where: {} });
      await pass(sender);
      expect(taken).toHaveLength(1);
      expect(taken[0]?.raw).toContain(`Message-ID: <${waiting.id}@example.org>`);
      expect(await mail()).toMatchObject({ status: 'sent', attempts: 2 });
    },
  );
});

it('gives up at once when refused for good, and after twelve attempts otherwise', async () => {
  await withServer({ onRcptTo: (_address, _session, done) => done(refusal(550)) }, async (sender) => {
    await queue('gone@example.org');
    await pass(sender);
    expect(await mail()).toMatchObject({ status: 'failed', attempts: 1, body: null });
  });
  await OutgoingMail.destroy({ where: {} });
  await withServer({ onRcptTo: (_address, _session, done) => done(refusal(451)) }, async (sender) => {
    await queue('slow@example.org');
    await OutgoingMail.update({ attempts: 11 }, { where: {} });
    await pass(sender);
    expect(await mail()).toMatchObject({ status: 'failed', attempts: 12 });
  });
});

it('stays queued while nothing listens', async () => {
  const { sequelize, logger } = testApp.services;
  const sender = new MailSender(sequelize, logger, { smtpUrl: 'smtp://127.0.0.1:1', from: 'deltaproof@example.org' });
  await queue('ivy@example.org');
  await pass(sender);
  expect(await mail()).toMatchObject({
    status: 'queued',
    attempts: 1,
    lastError: expect.stringMatching(/^E(SOCKET|CONNECTION|CONNREFUSED) 0$/),
  });
});

it('is sent once by two senders at work', async () => {
  await withServer({}, async (sender, taken) => {
    for (let count = 0; count < 10; count += 1) await queue(`p${count}@example.org`);
    await withServer({}, async (other, takenByOther) => {
      await Promise.all([pass(sender), pass(other)]);
      const all = [...taken, ...takenByOther].flatMap(({ recipients }) => recipients);
      expect(all.toSorted()).toEqual(Array.from({ length: 10 }, (_, index) => `p${index}@example.org`));
    });
  });
});
