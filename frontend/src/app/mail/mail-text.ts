import { ChangeDetectionStrategy, Component, computed, input } from '@angular/core';

interface Piece {
  readonly text: string;
  readonly href: string | null;
}

/** The text of a mail with its addresses as links. */
@Component({
  selector: 'dp-mail-text',
  changeDetection: ChangeDetectionStrategy.OnPush,
  template: `@for (piece of pieces(); track $index) {
    @if (piece.href) {
      <a [href]="piece.href">{{ piece.text }}</a>
    } @else {
      {{ piece.text }}
    }
  }`,
  styles: `
    :host {
      display: block;
      max-width: 76ch;
      white-space: pre-wrap;
      overflow-wrap: anywhere;
    }
    a {
      text-decoration: underline;
    }
  `,
})
export class MailText {
  readonly text = input.required<string>();
  protected readonly pieces = computed<readonly Piece[]>(() =>
    this.text()
      .split(/(https?:\/\/[^\s<>"]+)/)
      .filter((text) => text !== '')
      .map((text) => ({ text, href: /^https?:\/\//.test(text) ? text : null })),
  );
}
