import { ChangeDetectionStrategy, Component, computed, inject } from '@angular/core';
import { Control, Field } from '../../ui/field/field';
import { AnalysisEditor } from './analysis-editor';
import { refusalAt } from './refusals';

/** Results brought in from outside, each with the document it stands in. */
@Component({
  selector: 'dp-results-part',
  changeDetection: ChangeDetectionStrategy.OnPush,
  imports: [Control, Field],
  template: `
    <h2 class="caption" id="results">Results</h2>
    <ul class="rows" aria-labelledby="results">
      @for (row of rows(); track row.result.id) {
        <li>
          @if (editor.isOpen()) {
            <div class="fields">
              <dp-field label="Symbol" [error]="row.refused('name')">
                <input
                  dpControl
                  class="mono"
                  #name
                  [value]="row.result.name"
                  (input)="editor.setResult(row.result.id, { name: name.value })"
                />
              </dp-field>
              <dp-field label="What it is" optional [error]="row.refused('label')">
                <input
                  dpControl
                  #label
                  [value]="row.result.label"
                  (input)="editor.setResult(row.result.id, { label: label.value })"
                />
              </dp-field>
              <dp-field label="Value" hint="With its unit" [error]="row.refused('value')">
                <input
                  dpControl
                  class="mono"
                  #value
                  [value]="row.result.value"
                  (input)="editor.setResult(row.result.id, { value: value.value })"
                />
              </dp-field>
              <dp-field label="Half-width, k = 2" optional [error]="row.refused('uncertainty')">
                <input
                  dpControl
                  class="mono"
                  #width
                  [value]="row.result.halfWidth"
                  (input)="editor.setResult(row.result.id, { halfWidth: width.value })"
                />
              </dp-field>
              <dp-field label="Document" hint="Where it stands, with issue" [error]="row.refused('document')">
                <input
                  dpControl
                  #document
                  [value]="row.result.document"
                  (input)="editor.setResult(row.result.id, { document: document.value })"
                />
              </dp-field>
            </div>
            <button type="button" class="quiet small" (click)="editor.removeResult(row.result.id)">
              Remove<span class="only-heard"> result {{ row.result.name }}</span>
            </button>
          } @else {
            <span class="mono">{{ row.result.name }} = {{ row.result.value }}</span>
            @if (row.result.halfWidth) {
              <span class="mono faint"> ± {{ row.result.halfWidth }}</span>
            }
            {{ row.result.label }} <span class="faint">{{ row.result.document }}</span>
          }
        </li>
      }
    </ul>
    @if (editor.isOpen()) {
      <button type="button" class="quiet" (click)="editor.addResult()">Add a result</button>
    }
  `,
  styles: `
    .fields {
      display: grid;
      grid-template-columns: repeat(auto-fit, minmax(150px, 1fr));
      gap: 8px 12px;
    }
  `,
})
export class ResultsPart {
  protected readonly editor = inject(AnalysisEditor);
  protected readonly rows = computed(() => {
    const problem = this.editor.problem();
    return this.editor.text().results.map((result, index) => ({
      result,
      refused: (field: string) => refusalAt(problem, `results[${index}].${field}`),
    }));
  });
}
