import { ChangeDetectionStrategy, Component, computed, inject, input } from '@angular/core';
import { RouterLink } from '@angular/router';
import type { AnalysisSheet, InputView } from '@shared/contract';
import { nameTex } from '@shared/formula';
import { UnitPreferences } from '../../core/preferences/unit-preferences';
import { StudyContext } from '../../core/study/study-context';
import { Tex } from '../../ui/proof/tex';
import { type Source, sourceId } from '../text/sources';
import { AnalysisEditor } from './analysis-editor';
import { BindPicker } from './bind-picker';
import { refusalAt } from './refusals';

/** The inputs of a formula analysis: symbol, what it is bound to, value and uncertainty; bound, renamed and removed here. */
@Component({
  selector: 'dp-inputs-part',
  changeDetection: ChangeDetectionStrategy.OnPush,
  imports: [BindPicker, RouterLink, Tex],
  template: `
    <h2 class="caption" id="inputs">Inputs</h2>
    <ul class="rows" aria-labelledby="inputs">
      @for (row of rows(); track row.input.id) {
        <li>
          <div class="line">
            <dp-tex class="symbol" [tex]="row.tex" />
            <span class="words">
              {{ row.label }}
              @if (row.route; as route) {
                <a class="key" [routerLink]="route" [queryParams]="row.query">{{ row.key }}</a>
              } @else {
                <span class="small faint">constant</span>
              }
            </span>
            <span class="number">{{ row.value }}</span>
            <span class="number faint half">{{ row.uncertainty }}</span>
          </div>
          @if (row.message) {
            <p class="message">{{ row.message }}</p>
          }
          @if (editor.isOpen()) {
            <div class="acts small">
              <label>
                <span class="only-heard">Symbol of input {{ row.input.name }}</span>
                <input
                  #name
                  class="plain mono"
                  spellcheck="false"
                  autocomplete="off"
                  [value]="row.input.name"
                  (change)="editor.renameInput(row.input, name.value.trim())"
                />
              </label>
              <dp-bind-picker
                class="rebind"
                placeholder="Bind to something else"
                [label]="'Bind ' + row.input.name + ' to something else'"
                [sources]="editor.sources()"
                (choose)="editor.bind(row.input.name, $event.from)"
              />
              <button type="button" class="quiet" (click)="editor.removeInput(row.input.name)">
                Remove<span class="only-heard"> input {{ row.input.name }}</span>
              </button>
            </div>
          }
        </li>
      } @empty {
        <li class="faint">
          {{ editor.isOpen() ? 'None yet. Add what the lines read: a quantity, an output or a constant.' : 'None.' }}
        </li>
      }
    </ul>
    @if (editor.isOpen()) {
      <dp-bind-picker
        class="add"
        label="Add an input"
        placeholder="Add an input: key, symbol or word"
        [sources]="free()"
        (choose)="editor.addInput($event)"
      />
    }
  `,
  styleUrl: './inputs-part.scss',
})
export class InputsPart {
  private readonly units = inject(UnitPreferences);
  private readonly context = inject(StudyContext);
  protected readonly editor = inject(AnalysisEditor);
  /** The analysis as it stands, for uncertainties and failures; undefined for a new one. */
  readonly sheet = input<AnalysisSheet>();

  protected readonly free = computed(() => {
    const bound = new Set(this.editor.text().inputs.map(({ from }) => sourceId(from)));
    return this.editor.sources().filter(({ from }) => !bound.has(sourceId(from)));
  });
  protected readonly rows = computed(() => {
    const problem = this.editor.problem();
    return this.editor.inputs().map(({ source, ...bound }, index) => {
      const stands = this.sheet()?.inputs.find((one) => sourceId(one.from) === sourceId(bound.from));
      return {
        input: bound,
        tex: nameTex(bound.name),
        label: source?.name ?? stands?.label ?? 'what it was bound to is gone',
        key: source?.key ?? stands?.sourceKey ?? '',
        route: this.routeOf(source),
        query: this.queryOf(source),
        value: this.valueOf(source, stands),
        uncertainty: this.uncertaintyOf(stands),
        message: refusalAt(problem, `inputs[${index}]`) || (source === undefined ? (stands?.failure ?? '') : ''),
      };
    });
  });

  private valueOf(source: Source | undefined, stands: InputView | undefined): string {
    if (source === undefined) return this.units.shown(stands?.shown ?? null);
    return source.si === null ? '—' : this.units.show(source.si, source.unit, { temperature: source.temperature });
  }

  private uncertaintyOf(stands: InputView | undefined): string {
    if (!stands?.uncertainty || stands.shown === null) return '';
    return `± ${this.units.show(stands.uncertainty.halfWidth.si, stands.shown.unit, { temperature: 'difference' })}`;
  }

  private routeOf(source: Source | undefined): string[] | null {
    if (source === undefined || source.group === 'Constants') return null;
    if (source.group === 'Quantities') return this.context.link('quantities');
    return this.context.link('analyses', source.key.split(' ')[0] ?? '');
  }

  private queryOf(source: Source | undefined): Record<string, string> {
    const select: Record<string, string> = source?.group === 'Quantities' ? { select: source.key } : {};
    return { ...this.context.readParams(), ...select };
  }
}
