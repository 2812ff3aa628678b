import { ChangeDetectionStrategy, ChangeDetectorRef, Component, ElementRef, computed, inject } from '@angular/core';
import { UnitPreferences } from '../../core/preferences/unit-preferences';
import { Tex } from '../../ui/proof/tex';
import type { CheckedLine } from '../text/check-lines';
import type { Source } from '../text/sources';
import { AnalysisEditor } from './analysis-editor';
import { lineRefusal } from './refusals';

const OFFERED = 3;

/** The numbered lines of a formula analysis: typed at the left, typeset in the middle, computed at the right while typing. */
@Component({
  selector: 'dp-lines-part',
  changeDetection: ChangeDetectionStrategy.OnPush,
  imports: [Tex],
  templateUrl: './lines-part.html',
  styleUrl: './lines-part.scss',
})
export class LinesPart {
  private readonly units = inject(UnitPreferences);
  private readonly host = inject<ElementRef<HTMLElement>>(ElementRef).nativeElement;
  private readonly changes = inject(ChangeDetectorRef);
  protected readonly editor = inject(AnalysisEditor);

  protected readonly rows = computed(() => {
    const checked = this.editor.checked();
    const problem = this.editor.problem();
    return this.editor.text().lines.map((line, index) => {
      const said = checked[index];
      const refused = lineRefusal(problem, index);
      const message = said?.problem?.message || said?.unitProblem || refused;
      return {
        line,
        number: index + 1,
        tex: said?.tex ?? '',
        shown: this.shown(said),
        message,
        failure: message === '' ? (said?.failure ?? '') : '',
        pieces: piecesOf(line.text, said?.problem ?? null),
        offers: said?.missing ? this.offersFor(said.missing) : [],
        missing: said?.missing ?? '',
      };
    });
  });

  protected type(id: number, text: string): void {
    // A line stays one line, whatever is pasted.
    this.editor.setLine(id, { text: text.replace(/\s*\n\s*/g, ' ') });
  }

  protected press(event: KeyboardEvent, id: number): void {
    if (event.ctrlKey || event.metaKey) return;
    if (event.key === 'Enter') {
      event.preventDefault();
      this.add(id);
    } else if (event.altKey && (event.key === 'ArrowUp' || event.key === 'ArrowDown')) {
      event.preventDefault();
      this.move(id, event.key === 'ArrowUp' ? -1 : 1);
    } else if (event.key === 'Backspace' && this.textOf(id) === '' && this.rows().length > 1) {
      event.preventDefault();
      const at = this.rows().findIndex((row) => row.line.id === id);
      const above = this.rows()[at - 1]?.line.id ?? this.rows()[at + 1]?.line.id;
      this.editor.removeLine(id);
      if (above !== undefined) this.focus(above);
    }
  }

  protected add(below?: number): void {
    this.focus(this.editor.addLine(below));
  }

  protected move(id: number, by: -1 | 1): void {
    this.editor.moveLine(id, by);
    this.focus(id);
  }

  protected bind(source: Source, name: string, id: number): void {
    this.editor.addInput(source, name);
    this.focus(id);
  }

  /** What a name that is bound to nothing most likely means: what carries it as its symbol. */
  private offersFor(name: string): readonly Source[] {
    return this.editor
      .sources()
      .filter(({ symbol }) => symbol === name)
      .slice(0, OFFERED);
  }

  private shown(line: CheckedLine | undefined): string {
    if (!line?.result) return '—';
    const { si, unit, temperature } = line.result;
    return this.units.show(si, unit, { temperature });
  }

  private textOf(id: number): string {
    return this.editor.text().lines.find((line) => line.id === id)?.text ?? '';
  }

  private focus(id: number): void {
    // At once, so that what is typed next goes into the line that was just added.
    this.changes.detectChanges();
    this.host.querySelector<HTMLElement>(`[data-line="${id}"]`)?.focus();
  }
}

/** The typed text in three pieces, the refused range in the middle; at least one character is marked. */
export function piecesOf(
  text: string,
  range: { readonly from: number; readonly to: number } | null,
): readonly [string, string, string] {
  if (range === null) return [text, '', ''];
  const to = Math.min(text.length, Math.max(range.to, range.from + 1));
  const from = Math.max(0, Math.min(range.from, to - 1));
  return [text.slice(0, from), text.slice(from, to), text.slice(to)];
}
