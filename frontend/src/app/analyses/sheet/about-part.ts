import { ChangeDetectionStrategy, Component, computed, inject, input } from '@angular/core';
import type { ElementRow } from '@shared/contract';
import { Control, Field } from '../../ui/field/field';
import { AnalysisEditor } from './analysis-editor';
import { refusalAt } from './refusals';

/** What an analysis is called, what it is for, where it belongs and what it assumes. */
@Component({
  selector: 'dp-about-part',
  changeDetection: ChangeDetectionStrategy.OnPush,
  imports: [Control, Field],
  template: `
    @if (part() === 'name') {
      <dp-field label="Name" [error]="refused('name')">
        <input dpControl #name [value]="editor.text().name" (input)="editor.set({ name: name.value })" />
      </dp-field>
    } @else {
      <h2 class="caption" id="about">About</h2>
      @if (editor.isOpen()) {
        <div class="form">
          @if (!isNew()) {
            <dp-field label="Name" [error]="refused('name')">
              <input dpControl #name [value]="editor.text().name" (input)="editor.set({ name: name.value })" />
            </dp-field>
          }
          <dp-field label="Purpose" optional [error]="refused('purpose')">
            <textarea
              dpControl
              #purpose
              rows="2"
              [value]="editor.text().purpose"
              (input)="editor.set({ purpose: purpose.value })"
            ></textarea>
          </dp-field>
          <dp-field label="Element" optional [error]="refused('elementId')">
            <select dpControl #element (change)="editor.set({ elementId: element.value })">
              <option value="">none</option>
              @for (row of elements(); track row.id) {
                <option [value]="row.id" [selected]="row.id === editor.text().elementId">
                  {{ row.key }} {{ row.name }}
                </option>
              }
            </select>
          </dp-field>
          <dp-field
            label="Assumptions"
            optional
            hint="What must hold for the result to mean something"
            [error]="refused('assumptions')"
          >
            <textarea
              dpControl
              #assumptions
              rows="3"
              [value]="editor.text().assumptions"
              (input)="editor.set({ assumptions: assumptions.value })"
            ></textarea>
          </dp-field>
        </div>
      } @else {
        <dl class="facts">
          <dt>Purpose</dt>
          <dd>{{ editor.text().purpose || 'not stated' }}</dd>
          <dt>Element</dt>
          <dd>{{ element() }}</dd>
          <dt>Assumptions</dt>
          <dd>{{ editor.text().assumptions || 'none stated' }}</dd>
        </dl>
      }
    }
  `,
  styles: `
    .caption {
      margin-bottom: 8px;
    }
  `,
})
export class AboutPart {
  protected readonly editor = inject(AnalysisEditor);
  readonly elements = input<readonly ElementRow[]>([]);
  /** The name alone, or everything else; the name stands above the lines of a new analysis. */
  readonly part = input<'name' | 'rest'>('rest');
  protected readonly isNew = computed(() => this.editor.base() === null);
  protected readonly element = computed(() => {
    const row = this.elements().find(({ id }) => id === this.editor.text().elementId);
    return row === undefined ? 'none' : `${row.key} ${row.name}`;
  });

  protected refused(field: string): string {
    return refusalAt(this.editor.problem(), field);
  }
}
