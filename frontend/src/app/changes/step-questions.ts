import type { ChangeSheet } from '@shared/contract';
import type { Question } from '../ui/ask/ask-dialog';
import { impactSentence, worseSentence } from './impact-words';

/** Asks a member of the board for a vote; a vote against says why. */
export function voteQuestion(sheet: ChangeSheet, vote: 'for' | 'against'): Question {
  return {
    title: `Vote ${vote} ${sheet.key}?`,
    text: `${sheet.title}. Your vote goes on record with your name; you can change it while the request is before the board.`,
    action: vote === 'for' ? 'Vote for' : 'Vote against',
    reason: {
      label: 'Remark',
      hint: vote === 'for' ? '' : 'What speaks against it.',
      required: vote === 'against',
    },
  };
}

/** Asks the chair for a disposition; approval asks for a reason where a verdict would get worse. */
export function decisionQuestion(sheet: ChangeSheet, decision: 'approved' | 'rejected' | 'deferred'): Question {
  const { key, impact } = sheet;
  if (decision === 'approved') {
    const { strong, rest } = impactSentence(impact);
    const worse = impact.turned.filter((move) => impact.worse.includes(move.key)).map(worseSentence);
    const sentences = [`${strong}${rest}`, ...worse.map((sentence) => sentence.strong + sentence.rest)];
    return {
      title: `Approve ${key}?`,
      text: `${sentences.join(' ')} All of its edits are applied at once.`,
      action: 'Approve',
      reason: {
        label: 'Reason',
        hint: worse.length > 0 ? 'Why it is approved although a verdict gets worse.' : '',
        required: worse.length > 0,
      },
    };
  }
  const rejecting = decision === 'rejected';
  return {
    title: `${rejecting ? 'Reject' : 'Defer'} ${key}?`,
    text: rejecting
      ? 'Nothing that it proposes is applied, and it is closed.'
      : 'It goes back to its author, who can edit it and submit it again.',
    action: rejecting ? 'Reject' : 'Defer',
    reason: {
      label: rejecting ? 'Reason' : 'What is awaited',
      hint: rejecting ? 'Why it is rejected.' : 'Which information the board needs before it decides.',
      required: true,
    },
  };
}

/** Asks its author before a request is taken back. */
export function withdrawalQuestion({ key }: ChangeSheet): Question {
  return {
    title: `Withdraw ${key}?`,
    text: 'It stays on record as withdrawn and cannot be submitted again.',
    action: 'Withdraw',
    reason: { label: 'Reason', required: true },
    isFinal: true,
  };
}
