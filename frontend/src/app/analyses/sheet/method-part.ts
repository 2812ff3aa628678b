import { ChangeDetectionStrategy, Component, computed, inject, input, linkedSignal } from '@angular/core';
import { NgTemplateOutlet } from '@angular/common';
import { RouterLink } from '@angular/router';
import type { AnalysisSheet } from '@shared/contract';
import type { MethodPort } from '@shared/methods';
import { describeDimension, prettyUnit, siUnitOf, unitOf } from '@shared/units';
import { UnitPreferences } from '../../core/preferences/unit-preferences';
import { StudyContext } from '../../core/study/study-context';
import { Tex } from '../../ui/proof/tex';
import { type Source, sourceId } from '../text/sources';
import { AnalysisEditor } from './analysis-editor';
import { BindPicker } from './bind-picker';
import { renumbered, repeatedPorts, withoutItem } from './method-items';
import { refusalAt } from './refusals';

/** A method of the library with its inputs, each bound to something of its dimension. */
@Component({
  selector: 'dp-method-part',
  changeDetection: ChangeDetectionStrategy.OnPush,
  imports: [BindPicker, NgTemplateOutlet, RouterLink, Tex],
  templateUrl: './method-part.html',
  styleUrl: './method-part.scss',
})
export class MethodPart {
  private readonly units = inject(UnitPreferences);
  protected readonly context = inject(StudyContext);
  protected readonly editor = inject(AnalysisEditor);
  readonly sheet = input<AnalysisSheet>();

  /** How many repeated items stand on the sheet; those bound, and those that were added. */
  private readonly added = linkedSignal<number, number>({
    source: () => this.boundItems(),
    computation: (bound, previous) => Math.max(bound, previous?.value ?? 0),
  });
  private readonly boundItems = computed(() => {
    const group = this.editor.method()?.group;
    const names = this.editor.text().inputs.map(({ name }) => name);
    return group === undefined ? 0 : repeatedPorts(group, names);
  });
  protected readonly items = computed(() => Math.max(this.added(), this.editor.method()?.group?.atLeast ?? 0));
  protected readonly rows = computed(() => (this.editor.method()?.inputs ?? []).map((port) => this.rowOf(port)));
  protected readonly groups = computed(() => {
    const group = this.editor.method()?.group;
    if (group === undefined) return [];
    return Array.from({ length: this.items() }, (_, index) => ({
      number: index + 1,
      rows: group.ports.map((port) =>
        this.rowOf({
          ...port,
          name: `${port.name}_${index + 1}`,
          tex: `{${port.tex}}_{${index + 1}}`,
          label: `${port.label} ${index + 1}`,
        }),
      ),
    }));
  });
  protected readonly mayAdd = computed(() => this.items() < (this.editor.method()?.group?.atMost ?? 0));
  protected readonly mayTake = computed(() => this.items() > (this.editor.method()?.group?.atLeast ?? 0));

  protected addItem(): void {
    this.added.set(this.items() + 1);
  }

  protected removeItem(number: number): void {
    const group = this.editor.method()?.group;
    if (group === undefined) return;
    const items = this.items();
    this.editor.set({ inputs: renumbered(withoutItem(this.editor.text().inputs, group, number), group, number) });
    this.added.set(items - 1);
  }

  private rowOf(port: MethodPort) {
    const { dimension } = unitOf(port.unit);
    const isTemperature = siUnitOf(dimension) === 'K';
    const index = this.editor.text().inputs.findIndex(({ name }) => name === port.name);
    const bound = this.editor.inputs()[index];
    const stands = this.sheet()?.inputs.find((one) => one.name === port.name);
    const problem = this.editor.problem();
    const isMissing = bound === undefined && port.default === undefined;
    const refused = index < 0 ? '' : refusalAt(problem, `inputs[${index}]`);
    return {
      port,
      bound,
      key: bound?.source?.key ?? stands?.sourceKey ?? '',
      name: bound?.source?.name ?? stands?.label ?? '',
      value: bound?.source === undefined ? '' : this.valueOf(bound.source),
      uncertainty:
        stands?.uncertainty && bound !== undefined && sourceId(stands.from) === sourceId(bound.from)
          ? `± ${this.units.show(stands.uncertainty.halfWidth.si, port.unit, { temperature: 'difference' })}`
          : '',
      needs: `${describeDimension(dimension)}${port.unit === '1' || port.unit === '' ? '' : `, such as ${prettyUnit(port.unit)}`}`,
      otherwise: port.default === undefined ? '' : this.units.show(port.default, port.unit),
      // Only what has the dimension, and for temperatures what is of the same kind, can be bound.
      sources: this.editor
        .sources()
        .filter(
          (source) =>
            source.dimension === dimension &&
            (!isTemperature || 'analysisId' in source.from || source.temperature === (port.temperature ?? 'absolute')),
        ),
      message: refused || refusalAt(problem, `inputs.${port.name}`) || (isMissing && problem ? 'Bind this input.' : ''),
    };
  }

  private valueOf(source: Source): string {
    return source.si === null ? '—' : this.units.show(source.si, source.unit, { temperature: source.temperature });
  }
}
