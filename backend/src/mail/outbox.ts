import { EmailAddress } from '@shared/contract';
import type { Transaction } from 'sequelize';
import { OutgoingMail } from '../models';

export interface Message {
  readonly subject: string;
  readonly text: string;
}

/**
 * Queues a mail to exactly one address in the transaction of what causes it: either both happen or neither.
 * Throws when the address is not a single plain one. Wake the sender after the commit.
 */
export async function queueMail(transaction: Transaction, to: string, message: Message): Promise<void> {
  const recipient = EmailAddress.parse(to);
  const subject = message.subject.replace(/[\p{Cc}\p{Zl}\p{Zp}]+/gu, ' ');
  await OutgoingMail.create(
    { recipient, subject, body: message.text, status: 'queued' },
    // The database's clock fills the dates.
    { transaction, fields: ['id', 'recipient', 'subject', 'body', 'status'] },
  );
}
