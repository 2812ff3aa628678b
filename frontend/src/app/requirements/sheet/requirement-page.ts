import { ChangeDetectionStrategy, Component, computed, inject, input } from '@angular/core';
import { Router, RouterLink } from '@angular/router';
import type { CommandType, RequirementSheet } from '@shared/contract';
import { load } from '../../core/http/load';
import { UnitPreferences } from '../../core/preferences/unit-preferences';
import { StudyContext } from '../../core/study/study-context';
import { type SheetAction, TitleBlock } from '../../core/title-block';
import { BudgetRibbon } from '../../ui/budget-ribbon/budget-ribbon';
import { dayText } from '../../ui/day/day';
import { limitText } from '../../ui/limit/limit-text';
import { gaugeReading } from '../../ui/margin/gauge-reading';
import { MarginGauge } from '../../ui/margin/margin-gauge';
import { MarginNumber } from '../../ui/margin/margin-number';
import { percentText } from '../../ui/margin/margin-text';
import { ProofLines } from '../../ui/proof/proof-lines';
import { TurningPoints } from '../../ui/turning-point/turning-points';
import { VerdictMark } from '../../ui/verdict/verdict-mark';
import { Waiting } from '../../ui/waiting/waiting';
import { ProposeChange } from '../../core/acts/propose-change';
import { RequirementApi } from '../requirement-api';
import { BudgetActs } from './budget-acts';
import { DeparturesPart } from './departures-part';
import { FlowLinks } from './flow-links';
import { ProcedureActs } from './procedure-acts';
import { stateLine } from './state-line';
import { VerificationActs } from './verification-acts';
import { VerificationsPart } from './verifications-part';

/** One requirement with its proof: what it states, what was computed, how far each input can move, and what it hangs together with. */
@Component({
  selector: 'dp-requirement-page',
  changeDetection: ChangeDetectionStrategy.OnPush,
  imports: [
    BudgetRibbon,
    DeparturesPart,
    FlowLinks,
    MarginGauge,
    MarginNumber,
    ProofLines,
    RouterLink,
    TurningPoints,
    VerdictMark,
    VerificationsPart,
    Waiting,
  ],
  templateUrl: './requirement-page.html',
  styleUrl: './requirement-page.scss',
})
export class RequirementPage {
  /** From the address. */
  readonly key = input('');

  private readonly api = inject(RequirementApi);
  private readonly router = inject(Router);
  private readonly units = inject(UnitPreferences);
  private readonly procedure = inject(ProcedureActs);
  private readonly verifications = inject(VerificationActs);
  private readonly proposals = inject(ProposeChange);
  protected readonly budgets = inject(BudgetActs);
  protected readonly context = inject(StudyContext);

  protected readonly state = load(
    () => {
      const read = this.context.readKey();
      // The key comes with the first check of the router's inputs.
      return read === undefined || this.key() === '' ? undefined : { ...read, key: this.key() };
    },
    ({ key }) => this.api.sheet(key),
    { discard: (previous, next) => previous.study !== next.study || previous.key !== next.key },
  );
  protected readonly show = this.units.show.bind(this.units);
  protected readonly percent = percentText;

  protected readonly stateLine = computed(() => {
    const sheet = this.state.value();
    return sheet === undefined ? '' : stateLine(sheet);
  });
  protected readonly gauge = computed(() => {
    const sheet = this.state.value();
    return sheet === undefined ? null : gaugeReading(sheet);
  });
  protected readonly underGauge = computed(() => {
    const sheet = this.state.value();
    if (!sheet?.limit) return 'No limit is stated.';
    const expanded =
      sheet.expanded === null
        ? ''
        : `, U (k = ${sheet.k}) ${this.show(sheet.expanded, sheet.limit.value.unit, { temperature: 'difference' })}`;
    return `limit ${limitText(sheet.limit, this.show)}${expanded}`;
  });
  protected readonly required = computed(() => {
    const sheet = this.state.value();
    const required = sheet?.required;
    if (!sheet?.limit || !required) return '';
    const margin =
      required.percent === null
        ? this.show(required.absolute, sheet.limit.value.unit, { temperature: 'difference' })
        : percentText(required.percent).replace('+', '');
    return `${margin} required: ${required.definition}. ${required.source}`;
  });
  /** What the per cent is of, where it is not of the limit. */
  protected readonly percentOf = computed(() => {
    const of = this.state.value()?.margin?.percentOf ?? '';
    return of === 'of the limit' ? '' : of;
  });
  protected readonly openItem = computed(() => {
    const item = this.state.value()?.openItem;
    if (!item) return null;
    const person = this.context.head.value()?.members.find((member) => member.id === item.personId)?.name;
    const words = item.kind === 'TBD' ? 'To be determined' : 'To be reviewed';
    return `${words}${item.estimate ? `, estimated ${item.estimate}` : ''}: ${item.action} (${person ?? 'somebody who left'}, by ${dayText(item.due)}). ${item.rationale}`;
  });
  protected readonly turnedBy = computed(() => {
    const turned = this.state.value()?.turnedBy;
    if (!turned) return null;
    return `It was ${turned.baselineVerdict} in the baseline, and was turned by r${turned.revision}${turned.direct ? ', a direct edit' : ''}.`;
  });

  constructor() {
    inject(TitleBlock).register({ name: () => this.key(), actions: () => this.actions() });
  }

  protected may(type: CommandType): boolean {
    return this.state.value()?.may.includes(type) ?? false;
  }

  protected open(key: string): void {
    void this.go(['requirements', key]);
  }

  private actions(): readonly SheetAction[] {
    const sheet = this.state.value();
    if (sheet === undefined) return [];
    const offered = (type: CommandType, label: string, run: () => unknown): SheetAction[] =>
      this.may(type) ? [{ label, run: () => void run() }] : [];
    const steps = [
      ...offered('requirement.withdraw', 'Withdraw', () => this.procedure.withdraw(sheet)),
      ...offered('departure.request', 'Ask for a departure', () => this.procedure.requestDeparture(sheet)),
      ...offered('assessment.lower', 'Lower compliance', () => this.procedure.lower(sheet)),
      ...(sheet.closed === null ? [] : offered('assessment.reopen', 'Reopen', () => this.procedure.reopen(sheet))),
      ...offered('budget.set', sheet.budget === null ? 'Set a budget' : 'Edit the budget', () =>
        this.budgets.set(sheet),
      ),
      ...offered('requirement.create', 'Write one below', () => this.writeBelow()),
      ...(sheet.limit === null
        ? []
        : offered('verification.link', 'Link an analysis', () => this.verifications.link(sheet))),
      ...offered('requirement.return', 'Return to preparation', () => this.procedure.return(sheet)),
      ...offered('requirement.submit', 'Submit for review', () => this.procedure.submit(sheet)),
      ...offered('assessment.close', 'Close out', () => this.procedure.close(sheet)),
    ];
    const main = this.mainAction(sheet);
    return main === null ? steps : [...steps, main];
  }

  private mainAction(sheet: RequirementSheet): SheetAction | null {
    if (this.may('requirement.revise'))
      return {
        label: 'Edit',
        main: true,
        shortcut: 'e',
        run: () => void this.go(['requirements', sheet.key, 'edit']),
      };
    if (sheet.state === 'baselined' && this.may('change.write'))
      return { label: 'Propose a change', main: true, shortcut: 'p', run: () => this.propose(sheet) };
    return null;
  }

  private propose(sheet: RequirementSheet): void {
    void this.proposals.open({
      title: `Change ${sheet.key}: ${sheet.title.charAt(0).toLowerCase()}${sheet.title.slice(1)}`,
      what: `${sheet.key} ${sheet.title}`,
      edits: [],
      then: ['requirements', sheet.key],
    });
  }

  private writeBelow(): void {
    void this.router.navigate(this.context.link('requirements', 'new'), {
      queryParams: { ...this.context.readParams(), parent: this.key() },
    });
  }

  private go(segments: readonly string[]): Promise<boolean> {
    return this.router.navigate(this.context.link(...segments), { queryParams: this.context.readParams() });
  }
}
