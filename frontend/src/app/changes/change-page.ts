import { BreakpointObserver } from '@angular/cdk/layout';
import { ChangeDetectionStrategy, Component, computed, effect, inject, input, signal } from '@angular/core';
import { toSignal } from '@angular/core/rxjs-interop';
import { MatDialog } from '@angular/material/dialog';
import type { ChangeSheet, EditSummary } from '@shared/contract';
import { firstValueFrom, map } from 'rxjs';
import { load } from '../core/http/load';
import { UnitPreferences } from '../core/preferences/unit-preferences';
import { NOW } from '../core/study/standpoint';
import { StudyContext } from '../core/study/study-context';
import { TitleBlock } from '../core/title-block';
import { Ask } from '../ui/ask/ask';
import { dayText } from '../ui/day/day';
import { KeyLink } from '../ui/key-link/key-link';
import { SectionCaption } from '../ui/section-caption/section-caption';
import { Waiting } from '../ui/waiting/waiting';
import { AddEdit } from './add-edit/add-edit';
import { BoardVotes } from './board-votes';
import { type ChangeStep, changeActions } from './change-actions';
import { ChangeSteps } from './change-steps';
import { ChangeWordsForm } from './change-words-form';
import { ChangesApi } from './changes-api';
import { ImpactMoves } from './impact-moves';
import { impactSentence, worseSentence } from './impact-words';
import { ProposedEdits } from './proposed-edits';
import { ReferDialog, type ReferQuestion } from './refer-dialog';
import { decisionQuestion, voteQuestion, withdrawalQuestion } from './step-questions';

/** One change request: what it proposes, why, what approval would do to every verdict, and what the board said. */
@Component({
  selector: 'dp-change-page',
  changeDetection: ChangeDetectionStrategy.OnPush,
  imports: [AddEdit, BoardVotes, ChangeWordsForm, ImpactMoves, KeyLink, ProposedEdits, SectionCaption, Waiting],
  providers: [ChangeSteps],
  templateUrl: './change-page.html',
  styleUrl: './change-page.scss',
})
export class ChangePage {
  private readonly api = inject(ChangesApi);
  private readonly ask = inject(Ask);
  private readonly dialog = inject(MatDialog);
  private readonly units = inject(UnitPreferences);
  protected readonly steps = inject(ChangeSteps);
  protected readonly context = inject(StudyContext);

  /** Key of the change request, from the address. */
  readonly key = input.required<string>();

  protected readonly sheet = load(
    () => {
      const place = this.context.readKey();
      return place && { ...place, key: this.key() };
    },
    ({ key }) => this.api.sheet(key),
    { discard: (previous, next) => previous.key !== next.key || previous.study !== next.study },
  );
  private readonly isNarrow = toSignal(
    inject(BreakpointObserver)
      .observe('(max-width: 720px)')
      .pipe(map(({ matches }) => matches)),
    { initialValue: false },
  );
  protected readonly form = signal<'none' | 'words' | 'add'>('none');

  protected readonly facts = computed(() => {
    const sheet = this.sheet.value();
    if (sheet === undefined) return '';
    const due = sheet.due ? [`decision due ${dayText(sheet.due)}`] : [];
    return [sheet.state, `class ${sheet.class}`, `raised by ${sheet.author.name}`, ...due].join(' · ');
  });
  protected readonly isApproved = computed(() => this.sheet.value()?.state === 'approved');
  protected readonly impactCaption = computed(() => {
    const sheet = this.sheet.value();
    const would =
      sheet?.state === 'approved'
        ? 'What approval did'
        : sheet?.state === 'rejected'
          ? 'What approval would have done'
          : 'What approval would do';
    return `${would} · re-proved on r${sheet?.impact.revision ?? ''}`;
  });
  protected readonly sentence = computed(() => {
    const sheet = this.sheet.value();
    return sheet && impactSentence(sheet.impact, this.isApproved());
  });
  protected readonly worse = computed(() => {
    const sheet = this.sheet.value();
    if (sheet === undefined || this.isDecided(sheet)) return [];
    return sheet.impact.turned.filter(({ key }) => sheet.impact.worse.includes(key)).map(worseSentence);
  });
  protected readonly conflicts = computed(() =>
    (this.sheet.value()?.summaries ?? []).filter(({ conflict }) => conflict !== ''),
  );
  protected readonly budgets = computed(() =>
    (this.sheet.value()?.impact.budgets ?? []).map((budget) => ({
      ...budget,
      to: this.context.link('requirements', budget.key),
      was: this.reserve(budget.before, budget.unit),
      is: this.reserve(budget.after, budget.unit),
      overrun: budget.after !== null && budget.after < 0,
    })),
  );
  protected readonly disposition = computed(() => {
    const disposition = this.sheet.value()?.disposition;
    if (!disposition) return null;
    const { decision, person, at, revision, reason } = disposition;
    const where = revision === null ? '' : `, r${revision}`;
    return { line: `${capital(decision)} by ${person.name} on ${dayText(at)}${where}.`, reason };
  });
  private readonly draft = computed<'closed' | 'open' | 'here'>(() => {
    const standpoint = this.context.standpoint();
    if (standpoint.kind === 'draft' && standpoint.key === this.key()) return 'here';
    return this.context.head.value()?.drafts.some(({ key }) => key === this.key()) ? 'open' : 'closed';
  });

  constructor() {
    // A decided request has no draft any more to look from.
    effect(() => {
      const sheet = this.sheet.value();
      if (sheet !== undefined && this.isDecided(sheet) && this.draft() === 'here') void this.context.lookFrom(NOW);
    });
    inject(TitleBlock).register({
      name: () => this.key(),
      actions: () => {
        const sheet = this.sheet.value();
        if (sheet === undefined) return [];
        // On a phone the vote fills the bar; the standpoint there leads to the draft all the same.
        const draft = this.isNarrow() && sheet.may.includes('change.vote') ? 'closed' : this.draft();
        const situation = { me: this.context.head.value()?.me.id, draft } as const;
        return changeActions(sheet, situation).map(({ step, label, main, reason }) => ({
          label,
          run: () => void this.take(step),
          ...(main ? { main } : {}),
          ...(reason === undefined ? {} : { disabled: true, reason }),
        }));
      },
    });
  }

  protected mayRebase(sheet: ChangeSheet): boolean {
    return sheet.may.includes('change.rebase');
  }

  protected mayDrop(sheet: ChangeSheet): boolean {
    return sheet.may.includes('change.drop');
  }

  protected async rebase(sheet: ChangeSheet): Promise<void> {
    const restarts = sheet.state === 'draft' || sheet.state === 'deferred' ? '' : ' The board then assesses it afresh.';
    const answer = await this.ask.ask({
      title: 'Take the current versions?',
      text: `Every proposed edit is put on what stands now; votes given so far fall away.${restarts}`,
      action: 'Take the current versions',
    });
    if (answer !== undefined)
      await this.steps.give(sheet, (version) => ({ type: 'change.rebase', id: sheet.id, version }));
  }

  protected async drop(sheet: ChangeSheet, edit: EditSummary): Promise<void> {
    await this.steps.give(sheet, (version) => ({ type: 'change.drop', id: sheet.id, version, index: edit.index }));
  }

  private async take(step: ChangeStep): Promise<void> {
    const sheet = this.sheet.value();
    if (sheet === undefined) return;
    const { id } = sheet;
    switch (step) {
      case 'edit':
        return this.form.update((form) => (form === 'words' ? 'none' : 'words'));
      case 'add':
        return this.form.update((form) => (form === 'add' ? 'none' : 'add'));
      case 'look':
        return this.context.lookFrom(this.draft() === 'here' ? NOW : { kind: 'draft', key: sheet.key });
      case 'submit':
        this.form.set('none');
        await this.steps.give(sheet, (version) => ({ type: 'change.submit', id, version }));
        return;
      case 'assess':
        await this.steps.give(sheet, (version) => ({ type: 'change.assess', id, version }));
        return;
      case 'refer':
        return this.refer(sheet);
      case 'withdraw': {
        const answer = await this.ask.ask(withdrawalQuestion(sheet));
        if (answer) await this.steps.give(sheet, (version) => ({ type: 'change.withdraw', id, version, ...answer }));
        return;
      }
      case 'for':
      case 'against':
        return this.vote(sheet, step);
      case 'defer':
        return this.decide(sheet, 'deferred');
      case 'reject':
        return this.decide(sheet, 'rejected');
      case 'approve':
        return this.decide(sheet, 'approved');
    }
  }

  private async refer(sheet: ChangeSheet): Promise<void> {
    const answer = await firstValueFrom(
      this.dialog
        .open<ReferDialog, ReferQuestion, { readonly due: string | null }>(ReferDialog, {
          data: { key: sheet.key, due: sheet.due },
          width: '520px',
        })
        .afterClosed(),
    );
    if (answer)
      await this.steps.give(sheet, (version) => ({ type: 'change.refer', id: sheet.id, version, due: answer.due }));
  }

  private async vote(sheet: ChangeSheet, vote: 'for' | 'against'): Promise<void> {
    const answer = await this.ask.ask(voteQuestion(sheet, vote));
    if (answer === undefined) return;
    const remark = answer.reason;
    await this.steps.give(sheet, (version) => ({ type: 'change.vote', id: sheet.id, version, vote, remark }));
  }

  private async decide(sheet: ChangeSheet, decision: 'approved' | 'rejected' | 'deferred'): Promise<void> {
    const answer = await this.ask.ask(decisionQuestion(sheet, decision));
    if (answer === undefined) return;
    const { reason } = answer;
    await this.steps.give(sheet, (version) => ({ type: 'change.dispose', id: sheet.id, version, decision, reason }));
  }

  private isDecided({ state }: ChangeSheet): boolean {
    return state === 'approved' || state === 'rejected' || state === 'withdrawn';
  }

  private reserve(si: number | null, unit: string): string {
    return si === null ? 'none' : this.units.show(si, unit, { temperature: 'difference' });
  }
}

function capital(text: string): string {
  return text.charAt(0).toUpperCase() + text.slice(1);
}
