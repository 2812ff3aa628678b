import type { Message } from './outbox';

/** The link of a mail. The code stands after `#`, which browsers send to no server and no log. */
export function oneTimeLink(
  publicUrl: URL,
  page: 'invitation' | 'password-reset' | 'first-administrator',
  token: string,
): string {
  const url = new URL(page, publicUrl.href.endsWith('/') ? publicUrl.href : `${publicUrl.href}/`);
  url.hash = token;
  return url.href;
}

export function invitationMessage(name: string, inviter: string, studies: readonly string[], link: string): Message {
  const where = studies.length === 0 ? '' : ` and given you a part in ${studies.join(', ')}`;
  return {
    subject: 'Invitation to Deltaproof',
    text: [
      `${name},`,
      '',
      `${inviter} has invited you to Deltaproof${where}.`,
      'Choose a password here within 72 hours; the link works once:',
      '',
      link,
      '',
      'If you did not expect this, leave it be: without the link nothing happens.',
    ].join('\n'),
  };
}

export function passwordResetMessage(name: string, link: string): Message {
  return {
    subject: 'Choose a new password for Deltaproof',
    text: [
      `${name},`,
      '',
      'somebody, probably you, asked for a new password. Choose it here within 30 minutes; the link works once:',
      '',
      link,
      '',
      'All open sessions end when the new password is set. If it was not you, leave it be: your password stays as it is.',
    ].join('\n'),
  };
}
