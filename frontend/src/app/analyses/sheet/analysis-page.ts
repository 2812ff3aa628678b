import { ChangeDetectionStrategy, Component, computed, effect, inject, input, signal, untracked } from '@angular/core';
import { toSignal } from '@angular/core/rxjs-interop';
import { Router } from '@angular/router';
import type { AnalysisSheet, Command } from '@shared/contract';
import { mayGive } from '@shared/contract/permissions';
import { firstValueFrom } from 'rxjs';
import { Drafts } from '../../core/drafts/drafts';
import { load } from '../../core/http/load';
import { toProblem } from '../../core/http/problem-error';
import { UnitPreferences } from '../../core/preferences/unit-preferences';
import { Edits } from '../../core/study/edits';
import { StudyContext } from '../../core/study/study-context';
import { type SheetAction, TitleBlock } from '../../core/title-block';
import { Acts } from '../../core/acts/acts';
import { ConflictView, type Side } from '../../ui/conflict/conflict-view';
import { ProofLines } from '../../ui/proof/proof-lines';
import { Waiting } from '../../ui/waiting/waiting';
import { AnalysesApi } from '../analyses-api';
import { blank, changedFields, fieldsOf, isAnalysisText, textOf } from '../text/analysis-text';
import { sourcesOf } from '../text/sources';
import { AboutPart } from './about-part';
import { AnalysisActs } from './analysis-acts';
import { conflictFields, withTheirs } from './analysis-conflict';
import { AnalysisEditor } from './analysis-editor';
import { CheckPart } from './check-part';
import { CouldVerify } from './could-verify';
import { InputsPart } from './inputs-part';
import { LinesPart } from './lines-part';
import { MethodPart } from './method-part';
import { ResultsPart } from './results-part';

const PAUSE = 300;
const KINDS = { formula: 'formula', method: 'method of the library', external: 'results from outside' } as const;

/** The sheet of one analysis, or of a new one: written here, computed while typing, linked to what it verifies. */
@Component({
  selector: 'dp-analysis-page',
  changeDetection: ChangeDetectionStrategy.OnPush,
  imports: [
    AboutPart,
    CheckPart,
    ConflictView,
    CouldVerify,
    InputsPart,
    LinesPart,
    MethodPart,
    ProofLines,
    ResultsPart,
    Waiting,
  ],
  providers: [AnalysisEditor],
  templateUrl: './analysis-page.html',
  styleUrl: './analysis-page.scss',
})
export class AnalysisPage {
  /** From the address: key of the analysis, or for a new one its kind and method. */
  readonly key = input<string>();
  readonly kind = input<string>();
  readonly method = input<string>();

  private readonly api = inject(AnalysesApi);
  private readonly edits = inject(Edits);
  private readonly said = inject(Acts);
  private readonly drafts = inject(Drafts);
  private readonly router = inject(Router);
  private readonly units = inject(UnitPreferences);
  private readonly context = inject(StudyContext);
  protected readonly acts = inject(AnalysisActs);
  protected readonly editor = inject(AnalysisEditor);

  protected readonly state = load(
    () => {
      const [read, key] = [this.context.readKey(), this.key()];
      return read && key !== undefined ? { ...read, key } : undefined;
    },
    ({ key }) => this.api.sheet(key),
    {
      discard: (previous, next) =>
        previous.study !== next.study || previous.key !== next.key || previous.at !== next.at,
    },
  );
  private readonly bindable = load(
    () => this.context.readKey(),
    () => this.api.bindable(),
  );
  private readonly tree = load(
    () => this.context.readKey(),
    () => this.api.productTree(),
  );
  private readonly library = toSignal(this.api.library);

  protected readonly isNew = computed(() => this.key() === undefined);
  protected readonly sheet = computed(() => this.state.value());
  protected readonly elements = computed(() => this.tree.value()?.rows ?? []);
  protected readonly show = this.units.show.bind(this.units);
  protected readonly isRestored = signal(false);
  private readonly busy = signal(false);

  protected readonly kindWords = computed(() => KINDS[this.editor.text().kind]);
  protected readonly facts = computed(() => {
    const sheet = this.sheet();
    if (sheet === undefined) return '';
    const verifies = sheet.verifies.length === 0 ? ['verifies nothing yet'] : [];
    const controlled = sheet.controlled ? ['controlled'] : [];
    return [sheet.state, KINDS[sheet.kind], ...controlled, ...verifies, `by ${sheet.author.name}`].join(' · ');
  });
  protected readonly mayLink = computed(() => this.mayGive('verification.link') && !this.editor.isDirty());
  protected readonly conflict = computed(() => {
    const sheet = this.sheet();
    if (this.editor.problem()?.code !== 'stale' || sheet === undefined) return null;
    return conflictFields(textOf(sheet), this.editor.text());
  });
  /** A refusal that stands beside no field of its own. */
  protected readonly unplaced = computed(() => {
    const problem = this.editor.problem();
    if (problem === null || problem.code === 'stale') return null;
    const isPlaced = problem.fields.some(({ field }) =>
      /(^|\.)(name|purpose|elementId|assumptions|lines[[.]|inputs[[.]|results[[.])/.test(field),
    );
    return isPlaced ? null : problem;
  });

  constructor() {
    inject(TitleBlock).register({ name: () => this.key() ?? 'New analysis', actions: () => this.actions() });
    effect(() => this.editor.isOpen.set(this.isNew() ? this.mayGive('analysis.create') : this.mayRevise()));
    effect(() => this.editor.methods.set(this.library()?.methods ?? []));
    effect(() => {
      const [view, library] = [this.bindable.value(), this.library()];
      if (view === undefined || library === undefined) return;
      this.editor.sources.set(sourcesOf(view, library.constants, this.sheet()?.id ?? null));
    });
    effect(() => {
      const [sheet, library, isNew] = [this.sheet(), this.library(), this.isNew()];
      untracked(() => {
        if (sheet !== undefined) this.take(sheet);
        else if (isNew && library !== undefined && !this.isRestored()) this.begin();
      });
    });
    effect((onCleanup) => {
      const [text, isDirty] = [this.editor.text(), this.editor.isDirty()];
      const timer = setTimeout(() => this.keep(text, isDirty), PAUSE);
      onCleanup(() => clearTimeout(timer));
    });
  }

  protected throwAway(): void {
    this.drafts.discard(this.draftKey());
    this.isRestored.set(false);
    const sheet = this.sheet();
    if (sheet === undefined) this.begin();
    else this.editor.fill(sheet);
  }

  protected resolve(chosen: Readonly<Record<string, Side>>): void {
    const sheet = this.sheet();
    if (sheet === undefined) return;
    const theirs = textOf(sheet);
    this.editor.text.set(withTheirs(this.editor.text(), theirs, chosen));
    this.editor.base.set({ id: sheet.id, version: sheet.version, text: theirs });
    this.editor.problem.set(null);
  }

  /** A newer state fills the sheet only as long as nothing has been typed on it. */
  private take(sheet: AnalysisSheet): void {
    const isOther = this.editor.base()?.id !== sheet.id;
    if (!isOther && this.editor.isDirty()) return;
    this.editor.fill(sheet);
    if (!isOther) return;
    const kept = this.kept();
    this.isRestored.set(kept !== null);
    if (kept === null) return;
    this.editor.base.set({ id: sheet.id, version: kept.version, text: textOf(sheet) });
    this.editor.text.set(kept.text);
  }

  /** A new analysis: what was last left here, or an empty one of the kind that the address asks for. */
  private begin(): void {
    const method = this.library()?.methods.find(({ id }) => id === this.method());
    const kind = method !== undefined ? 'method' : this.kind() === 'external' ? 'external' : 'formula';
    const kept = this.kept();
    this.isRestored.set(kept !== null);
    this.editor.base.set(null);
    this.editor.problem.set(null);
    const empty = blank(kind, method === undefined ? null : { id: method.id, version: method.version });
    this.editor.text.set(kept?.text ?? { ...empty, name: method?.name ?? '' });
  }

  private async save(): Promise<void> {
    if (this.busy()) return;
    this.editor.problem.set(null);
    const { lines } = this.editor.text();
    if (lines.length > 1) this.editor.set({ lines: lines.filter((line) => line.text.trim() !== '') });
    if (this.editor.checked().some(({ problem, unitProblem }) => problem !== null || unitProblem !== ''))
      return this.showFirstFault();
    this.busy.set(true);
    try {
      const answer = await firstValueFrom(this.edits.give([this.command()]));
      this.drafts.discard(this.draftKey());
      this.isRestored.set(false);
      const key = this.key() ?? answer.created[0]?.key;
      this.said.tell(answer, `${key ?? 'The analysis'} was saved`);
      this.settle();
      if (this.isNew()) await this.openSaved(key);
    } catch (error) {
      const problem = toProblem(error);
      this.editor.problem.set(problem);
      if (problem.code === 'stale') this.state.reload();
      this.showFirstFault();
    } finally {
      this.busy.set(false);
    }
  }

  private command(): Command {
    const [base, text] = [this.editor.base(), this.editor.text()];
    if (base === null) return { type: 'analysis.create', kind: text.kind, ...fieldsOf(text) };
    return {
      type: 'analysis.revise',
      id: base.id,
      version: base.version,
      changes: changedFields(base.text, text),
    };
  }

  /** What was sent stands now; the sheet that is read next replaces it. */
  private settle(): void {
    const base = this.editor.base();
    if (base !== null) this.editor.base.set({ ...base, version: base.version + 1, text: this.editor.text() });
  }

  private async openSaved(key: string | undefined): Promise<void> {
    const target = key === undefined ? ['analyses'] : ['analyses', key];
    await this.router.navigate(this.context.link(...target), {
      queryParams: this.context.readParams(),
      replaceUrl: true,
    });
  }

  private actions(): readonly SheetAction[] {
    const sheet = this.sheet();
    const isDirty = this.editor.isDirty();
    const actions: SheetAction[] = [];
    if (sheet !== undefined && !isDirty) {
      if (sheet.may.includes('analysis.remove'))
        actions.push({ label: 'Remove', run: () => void this.acts.remove(sheet) });
      if (sheet.may.includes('analysis.check'))
        actions.push({ label: 'Sign the check', run: () => void this.acts.check(sheet) });
      else if (sheet.state === 'draft' && sheet.author.id === this.context.head.value()?.me.id)
        actions.push({ label: 'Ask for a check', run: () => void this.acts.askForCheck(sheet) });
    }
    if (this.editor.isOpen()) {
      if (isDirty) actions.push({ label: 'Throw away', run: () => this.throwAway() });
      else if (this.mayGive('analysis.create'))
        actions.unshift({ label: 'Use a method', run: () => void this.goTo('methods') });
      actions.push({
        label: this.isNew() ? 'Save the analysis' : this.editor.text().kind === 'formula' ? 'Save lines' : 'Save',
        main: true,
        shortcut: 'Ctrl+Enter',
        disabled: this.busy() || (!isDirty && !this.isNew()),
        reason: 'Nothing has been changed.',
        run: () => void this.save(),
      });
    } else if (sheet?.controlled && this.isNow() && this.mayGive('change.write')) {
      actions.push({ label: 'Propose a change', main: true, run: () => void this.acts.propose(sheet) });
    }
    return actions;
  }

  private goTo(page: string): Promise<boolean> {
    return this.router.navigate(this.context.link('analyses', page), { queryParams: this.context.readParams() });
  }

  private mayRevise(): boolean {
    return this.sheet()?.may.includes('analysis.revise') ?? false;
  }

  private isNow(): boolean {
    return this.context.standpoint().kind === 'now';
  }

  private mayGive(type: 'analysis.create' | 'verification.link' | 'change.write'): boolean {
    return this.context.isEditable() && mayGive(this.isNow() ? type : 'change.amend', this.context.roles());
  }

  private keep(text: unknown, isDirty: boolean): void {
    const base = this.editor.base();
    if (isDirty) this.drafts.autosave(this.draftKey(), { version: base?.version ?? 0, text });
    else if (base !== null) this.drafts.discard(this.draftKey());
  }

  private kept() {
    const kept = this.drafts.saved(this.draftKey());
    if (typeof kept !== 'object' || kept === null || !('text' in kept) || !isAnalysisText(kept.text)) return null;
    const version = 'version' in kept && typeof kept.version === 'number' ? kept.version : 0;
    return { version, text: kept.text };
  }

  private draftKey(): string {
    const what = this.key() ?? `new.${this.method() ?? this.kind() ?? ''}`;
    return `analysis.${this.context.study() ?? ''}.${this.context.at() ?? ''}.${what}`;
  }

  private showFirstFault(): void {
    requestAnimationFrame(() => document.querySelector<HTMLElement>('dp-analysis-page [aria-invalid="true"]')?.focus());
  }
}
