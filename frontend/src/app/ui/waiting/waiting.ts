import { ChangeDetectionStrategy, Component, computed, input } from '@angular/core';

/** The part of a ViewState that this sign needs. */
export interface WaitingState {
  readonly loading: () => boolean;
  readonly error: () => { readonly title: string; readonly detail: string; readonly status: number } | undefined;
  reload(): void;
}

/** Stands where a value will be: reading, or why it could not be read with a way to try again. */
@Component({
  selector: 'dp-waiting',
  changeDetection: ChangeDetectionStrategy.OnPush,
  template: `
    @if (error(); as problem) {
      <div class="note bad" role="alert">
        <strong>{{ problem.title }}</strong> {{ problem.detail }}
        @if (problem.status !== 404) {
          <button type="button" class="quiet" (click)="state().reload()">Try again</button>
        }
      </div>
    } @else {
      <p class="faint" role="status">{{ label() }}</p>
    }
  `,
  styles: `
    :host {
      display: block;
      padding: 8px 0;
    }
    p {
      margin: 0;
      animation: appear 0.2s 0.3s both;
    }
    @keyframes appear {
      from {
        opacity: 0;
      }
    }
  `,
})
export class Waiting {
  readonly state = input.required<WaitingState>();
  readonly label = input('Reading …');
  protected readonly error = computed(() => this.state().error());
}
