import { Injectable, inject } from '@angular/core';
import type { BudgetShare, Command, RequirementLink, RequirementSheet } from '@shared/contract';
import { firstValueFrom } from 'rxjs';
import { Edits } from '../../core/study/edits';
import { StudyContext } from '../../core/study/study-context';
import { Ask } from '../../ui/ask/ask';
import { Acts } from '../../core/acts/acts';
import { AskFields } from '../../core/acts/ask-fields';
import { ProposeChange } from '../../core/acts/propose-change';

const RULES = ['sum', 'product', 'root-sum-square', 'smallest', 'largest'] as const;
const SENSES = ['shares', 'demands', 'contributions'] as const;
const RULE_WORDS: Readonly<Record<(typeof RULES)[number], string>> = {
  sum: 'they add up',
  product: 'they multiply',
  'root-sum-square': 'root of the sum of squares',
  smallest: 'the smallest counts',
  largest: 'the largest counts',
};
const SENSE_WORDS: Readonly<Record<(typeof SENSES)[number], string>> = {
  shares: 'shares of this limit',
  demands: 'demands drawn on it',
  contributions: 'contributions that supply it',
};

/** What is done to budgets and the flow-down around a requirement. */
@Injectable({ providedIn: 'root' })
export class BudgetActs {
  private readonly ask = inject(Ask);
  private readonly askFields = inject(AskFields);
  private readonly acts = inject(Acts);
  private readonly edits = inject(Edits);
  private readonly proposals = inject(ProposeChange);
  private readonly context = inject(StudyContext);

  /** Says how the limit is shared out among the children, or that it is not. */
  async set(sheet: RequirementSheet): Promise<void> {
    await this.askFields.ask({
      title: `Budget of ${sheet.key}`,
      text: 'How the limit is shared out among what it flows down to. A share counts once it is adopted.',
      action: 'Set the budget',
      fields: [
        {
          name: 'rule',
          label: 'How shares combine',
          kind: 'choice',
          value: sheet.budget?.rule ?? 'sum',
          choices: [
            ...RULES.map((value) => ({ value, label: `${value}: ${RULE_WORDS[value]}` })),
            ...(sheet.budget === null ? [] : [{ value: 'none', label: 'no budget any more' }]),
          ],
          refusedAs: ['budget', 'budget.rule'],
        },
        {
          name: 'sense',
          label: 'What they are to the limit',
          kind: 'choice',
          value: sheet.budget?.sense ?? 'shares',
          choices: SENSES.map((value) => ({ value, label: `${value}: ${SENSE_WORDS[value]}` })),
          refusedAs: ['budget.sense'],
          shownIf: (values) => values['rule'] !== 'none',
        },
      ],
      send: async (values) => {
        const rule = RULES.find((one) => one === values['rule']);
        const sense = SENSES.find((one) => one === values['sense']) ?? 'shares';
        const answer = await firstValueFrom(
          this.edits.give([
            {
              type: 'budget.set',
              id: sheet.id,
              version: sheet.version,
              budget: rule === undefined ? null : { rule, sense },
            },
          ]),
        );
        this.acts.tell(answer, `The budget of ${sheet.key} was set`);
      },
    });
  }

  /** Proposes the limit as a share of the parent's budget, or takes the proposal back. */
  propose(sheet: RequirementSheet, parent: RequirementLink, share: 'none' | 'proposed'): Promise<unknown> {
    const done =
      share === 'proposed'
        ? `${sheet.key} is proposed as a share of ${parent.key}`
        : `${sheet.key} is no longer proposed as a share of ${parent.key}`;
    return this.acts.give(
      [{ type: 'budget.propose', id: parent.traceId ?? '', version: parent.traceVersion, share }],
      done,
    );
  }

  /** Adopts a share: at once in preparation and in a draft, by a change request where the parent is baselined. */
  async adopt(
    sheet: RequirementSheet,
    share: Pick<BudgetShare, 'key' | 'title' | 'traceId' | 'traceVersion'>,
  ): Promise<void> {
    const command = { type: 'budget.adopt', id: share.traceId, version: share.traceVersion } as const satisfies Command;
    if (sheet.state !== 'baselined' || this.context.standpoint().kind === 'draft') {
      await this.acts.give([command], `${share.key} is a share of ${sheet.key}`);
      return;
    }
    await this.proposals.open({
      title: `Adopt ${share.key} into the budget of ${sheet.key}`,
      what: `${sheet.key} is baselined and takes ${share.key} ${share.title} into its budget`,
      edits: [command],
    });
  }

  /** Links the requirement below another parent. */
  async linkParent(
    sheet: RequirementSheet,
    others: readonly { readonly id: string; readonly key: string; readonly title: string }[],
  ): Promise<void> {
    await this.askFields.ask({
      title: `Link ${sheet.key} below a parent`,
      text: `${sheet.key} ${sheet.title}`,
      action: 'Link it',
      fields: [
        {
          name: 'parentId',
          label: 'Parent',
          kind: 'choice',
          choices: [
            { value: '', label: 'choose' },
            ...others.map(({ id, key, title }) => ({ value: id, label: `${key} ${title}` })),
          ],
          refusedAs: ['childId'],
        },
      ],
      send: async (values) => {
        const command: Command = { type: 'trace.link', parentId: values['parentId'] ?? '', childId: sheet.id };
        this.acts.tell(await firstValueFrom(this.edits.give([command])), `${sheet.key} was linked`);
      },
    });
  }

  async unlink(sheet: RequirementSheet, parent: RequirementLink): Promise<void> {
    const answer = await this.ask.ask({
      title: `Unlink ${sheet.key} from ${parent.key}?`,
      text: `It no longer flows down from ${parent.key}, and no share of it counts there.`,
      action: `Unlink from ${parent.key}`,
    });
    if (answer === undefined) return;
    await this.acts.give(
      [{ type: 'trace.unlink', id: parent.traceId ?? '', version: parent.traceVersion }],
      `${sheet.key} was unlinked from ${parent.key}`,
    );
  }
}
