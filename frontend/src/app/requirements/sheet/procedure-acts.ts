import { Injectable, inject } from '@angular/core';
import type { Command, Compliance, Departure, RequirementSheet } from '@shared/contract';
import { firstValueFrom } from 'rxjs';
import { Edits } from '../../core/study/edits';
import { Ask } from '../../ui/ask/ask';
import { Acts } from '../../core/acts/acts';
import { AskFields } from '../../core/acts/ask-fields';

const HIGHEST_FIRST: readonly Compliance[] = ['yes', 'partial', 'no', 'not assessed'];

/** Steps of procedure on a requirement: review, withdrawal, departures, lowering and close-out. */
@Injectable({ providedIn: 'root' })
export class ProcedureActs {
  private readonly ask = inject(Ask);
  private readonly askFields = inject(AskFields);
  private readonly acts = inject(Acts);
  private readonly edits = inject(Edits);

  submit({ id, version, key }: RequirementSheet): Promise<unknown> {
    return this.acts.give([{ type: 'requirement.submit', id, version }], `${key} is in review`);
  }

  return({ id, version, key }: RequirementSheet): Promise<unknown> {
    return this.withReason(
      `Return ${key} to preparation?`,
      'Its owner can then edit it again. The reason goes on record.',
      'Return it',
      (reason) => ({ type: 'requirement.return', id, version, reason }),
      `${key} was returned`,
    );
  }

  withdraw({ id, version, key }: RequirementSheet): Promise<unknown> {
    return this.withReason(
      `Withdraw ${key}?`,
      'It stays on record, but nothing is verified against it any more. Its key is not used again.',
      `Withdraw ${key}`,
      (reason) => ({ type: 'requirement.withdraw', id, version, reason }),
      `${key} was withdrawn`,
    );
  }

  close({ id, version, key }: RequirementSheet): Promise<unknown> {
    return this.withReason(
      `Close out ${key}?`,
      'You sign what stands now. The row reopens by itself when what you signed changes.',
      `Close out ${key}`,
      (reason) => ({ type: 'assessment.close', id, version, reason }),
      `${key} was closed out`,
    );
  }

  reopen({ id, version, key }: RequirementSheet): Promise<unknown> {
    return this.withReason(
      `Reopen ${key}?`,
      'The signature no longer counts.',
      'Reopen it',
      (reason) => ({ type: 'assessment.reopen', id, version, reason }),
      `${key} was reopened`,
    );
  }

  expire(departure: Departure): Promise<unknown> {
    const { id, version, key } = departure;
    return this.acts.give([{ type: 'departure.expire', id, version }], `${key} has expired`);
  }

  /** Lowers the compliance below what is computed, or takes that back. */
  async lower(sheet: RequirementSheet): Promise<void> {
    const { id, version, key, computedCompliance } = sheet;
    const lower = HIGHEST_FIRST.slice(HIGHEST_FIRST.indexOf(computedCompliance) + 1);
    await this.askFields.ask({
      title: `Lower the compliance of ${key}`,
      text: `Computed: ${computedCompliance}. A person may lower it with a reason, never raise it.`,
      action: 'Lower it',
      fields: [
        {
          name: 'to',
          label: 'Compliance',
          kind: 'choice',
          choices: [
            ...lower.map((value) => ({ value, label: value })),
            ...(sheet.lowered === null ? [] : [{ value: 'computed', label: `as computed: ${computedCompliance}` }]),
          ],
        },
        { name: 'reason', label: 'Reason', kind: 'text' },
      ],
      send: async (values) => {
        const to = HIGHEST_FIRST.find((one) => one === values['to']) ?? null;
        await this.send({ type: 'assessment.lower', id, version, to, reason: values['reason'] ?? '' }, 'Recorded');
      },
    });
  }

  /** Asks for permission not to meet a baselined requirement. */
  async requestDeparture(sheet: RequirementSheet): Promise<void> {
    await this.askFields.ask({
      title: `Ask for a departure from ${sheet.key}`,
      text: 'The chair decides. It is limited to items or in time.',
      action: 'Ask for it',
      fields: [
        {
          name: 'kind',
          label: 'Kind',
          kind: 'choice',
          choices: [
            { value: 'deviation', label: 'deviation: before it is built' },
            { value: 'waiver', label: 'waiver: as it was built' },
          ],
        },
        {
          name: 'class',
          label: 'Class',
          kind: 'choice',
          choices: [
            { value: 'major', label: 'major' },
            { value: 'minor', label: 'minor' },
          ],
        },
        { name: 'title', label: 'Title', kind: 'line' },
        { name: 'reason', label: 'Reason', kind: 'text' },
        { name: 'effectivity', label: 'Limited to', kind: 'line', optional: true, hint: 'Items: flight model 1 only' },
        { name: 'expires', label: 'Expires on', kind: 'day', optional: true },
      ],
      send: async (values) => {
        const command: Command = {
          type: 'departure.request',
          requirementId: sheet.id,
          kind: values['kind'] === 'waiver' ? 'waiver' : 'deviation',
          class: values['class'] === 'minor' ? 'minor' : 'major',
          title: values['title'] ?? '',
          reason: values['reason'] ?? '',
          effectivity: values['effectivity'] ?? '',
          expires: values['expires'] ? values['expires'] : null,
        };
        await this.send(command, 'The departure was asked for');
      },
    });
  }

  async decideDeparture(departure: Departure): Promise<void> {
    const { id, version, key } = departure;
    await this.askFields.ask({
      title: `Decide on ${key}`,
      text: `${departure.title}. ${departure.reason}`,
      action: 'Decide',
      fields: [
        {
          name: 'decision',
          label: 'Decision',
          kind: 'choice',
          choices: [
            { value: 'in force', label: 'grant it' },
            { value: 'refused', label: 'refuse it' },
          ],
        },
        { name: 'reason', label: 'Reason', kind: 'text' },
      ],
      send: async (values) => {
        const decision = values['decision'] === 'refused' ? 'refused' : 'in force';
        const reason = values['reason'] ?? '';
        await this.send({ type: 'departure.decide', id, version, decision, reason }, `${key} is ${decision}`);
      },
    });
  }

  private async send(command: Command, done: string): Promise<void> {
    this.acts.tell(await firstValueFrom(this.edits.give([command])), done);
  }

  private async withReason(
    title: string,
    text: string,
    action: string,
    command: (reason: string) => Command,
    done: string,
  ): Promise<void> {
    const answer = await this.ask.ask({ title, text, action, reason: { label: 'Reason', required: true } });
    if (answer !== undefined) await this.acts.give([command(answer.reason)], done);
  }
}
