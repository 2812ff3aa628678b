import {
  ChangeDetectionStrategy,
  Component,
  ElementRef,
  ViewEncapsulation,
  effect,
  inject,
  input,
} from '@angular/core';

/** A formula typeset by KaTeX. The library is loaded with the first formula; until then the source stands there. */
@Component({
  selector: 'dp-tex',
  changeDetection: ChangeDetectionStrategy.OnPush,
  template: '',
  styleUrl: './tex.scss',
  // KaTeX builds its own elements; its style sheet must reach them.
  encapsulation: ViewEncapsulation.None,
})
export class Tex {
  readonly tex = input.required<string>();
  readonly display = input(false);
  private readonly host = inject<ElementRef<HTMLElement>>(ElementRef).nativeElement;

  constructor() {
    effect((onCleanup) => {
      const tex = this.tex();
      const displayMode = this.display();
      let isCurrent = true;
      onCleanup(() => (isCurrent = false));
      if (this.host.childElementCount === 0) this.host.textContent = tex;
      void import('katex').then(({ default: katex }) => {
        // Formulas come from people: nothing in them may link, load or grow without bounds.
        if (isCurrent) {
          katex.render(tex, this.host, {
            displayMode,
            throwOnError: false,
            trust: false,
            maxExpand: 100,
            maxSize: 20,
            strict: false,
          });
        }
      });
    });
  }
}
