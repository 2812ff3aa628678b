import { Injectable, inject } from '@angular/core';
import { Router } from '@angular/router';
import type { EditCommand } from '@shared/contract';
import { firstValueFrom } from 'rxjs';
import { Edits } from '../study/edits';
import { StudyContext } from '../study/study-context';
import { Acts } from './acts';
import { AskFields } from './ask-fields';
import { type Values } from './fields-dialog';

/** What is to be proposed. Without edits the draft is opened, and every edit made while looking from it goes into it. */
export interface Proposal {
  /** First words of the title, to be completed. */
  readonly title: string;
  /** What it is about, in a sentence of the dialog. */
  readonly what: string;
  readonly edits: readonly EditCommand[];
  /** Page to open in the draft; the change request itself when absent. */
  readonly then?: readonly string[];
}

const NEW = 'new';

/** Puts an edit of something controlled into a change request: a new one, or one that I am writing. */
@Injectable({ providedIn: 'root' })
export class ProposeChange {
  private readonly ask = inject(AskFields);
  private readonly edits = inject(Edits);
  private readonly acts = inject(Acts);
  private readonly router = inject(Router);
  private readonly context = inject(StudyContext);

  /** Asks title and reason, writes, and opens the draft. */
  async open(proposal: Proposal): Promise<void> {
    let written = '';
    const drafts = (this.context.head.value()?.drafts ?? []).filter((draft) => draft.mine && draft.state === 'draft');
    const isNew = (values: Values): boolean => values['into'] === NEW;
    const sent = await this.ask.ask({
      title: 'Propose a change',
      text:
        proposal.edits.length > 0
          ? `${proposal.what}. It goes into a change request, for the board to decide.`
          : `${proposal.what} is baselined. You edit a draft of it; nothing changes until the board approves.`,
      action: proposal.edits.length > 0 ? 'Put it into the request' : 'Open the draft',
      fields: [
        {
          name: 'into',
          label: 'Change request',
          kind: 'choice',
          choices: [
            { value: NEW, label: 'a new one' },
            ...drafts.map((draft) => ({ value: draft.key, label: `${draft.key} ${draft.title}` })),
          ],
        },
        { name: 'title', label: 'Title', kind: 'line', value: proposal.title, shownIf: isNew },
        {
          name: 'reason',
          label: 'Reason',
          kind: 'text',
          hint: 'What is wrong as it stands, and why this helps.',
          shownIf: isNew,
        },
      ],
      send: async (values) => {
        written = await this.write(proposal, values);
      },
    });
    if (!sent) return;
    if (proposal.then === undefined) await this.router.navigate(this.context.link('changes', written));
    else await this.router.navigate(this.context.link(...proposal.then), { queryParams: { at: `draft:${written}` } });
  }

  private async write(proposal: Proposal, values: Values): Promise<string> {
    const into = values['into'] ?? NEW;
    if (into !== NEW) {
      if (proposal.edits.length > 0) {
        const answer = await firstValueFrom(this.edits.give(proposal.edits, { draft: into }));
        this.acts.tell(answer, `Added to ${into}`);
      }
      return into;
    }
    const answer = await firstValueFrom(
      this.edits.give([
        {
          type: 'change.write',
          title: (values['title'] ?? '').trim(),
          reason: (values['reason'] ?? '').trim(),
          due: null,
          edits: [...proposal.edits],
        },
      ]),
    );
    const key = answer.created[0]?.key ?? '';
    this.acts.tell(answer, `${key} was written`);
    return key;
  }
}
