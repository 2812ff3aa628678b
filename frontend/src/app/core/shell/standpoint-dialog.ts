import { ChangeDetectionStrategy, Component, computed, inject, signal } from '@angular/core';
import { MatButton } from '@angular/material/button';
import {
  MatDialogActions,
  MatDialogClose,
  MatDialogContent,
  MatDialogRef,
  MatDialogTitle,
} from '@angular/material/dialog';
import type { Standpoint } from '@shared/contract';
import { NOW, standpointParam } from '../study/standpoint';
import { StudyContext } from '../study/study-context';

/** Chooses from where the study is looked at: now, a past revision, a baseline or a draft. */
@Component({
  selector: 'dp-standpoint-dialog',
  changeDetection: ChangeDetectionStrategy.OnPush,
  imports: [MatButton, MatDialogActions, MatDialogClose, MatDialogContent, MatDialogTitle],
  template: `
    <h2 mat-dialog-title>Look from</h2>
    <mat-dialog-content>
      <ul class="rows">
        @for (place of places(); track place.label) {
          <li>
            <button
              type="button"
              class="quiet"
              [attr.aria-current]="place.here ? 'true' : null"
              (click)="lookFrom(place.standpoint)"
            >
              {{ place.label }}
            </button>
            <span class="faint small">{{ place.note }}{{ place.here ? ' · you are here' : '' }}</span>
          </li>
        }
      </ul>
      <form (submit)="lookFromRevision($event)">
        <label for="standpoint-revision">A past revision, 0 to {{ newest() }}</label>
        <input
          id="standpoint-revision"
          class="control mono"
          inputmode="numeric"
          autocomplete="off"
          aria-describedby="standpoint-message"
          [attr.aria-invalid]="message() === '' ? null : true"
          (input)="revisionText.set(value($event))"
        />
        <button matButton="outlined" type="submit">Look</button>
        <p id="standpoint-message" class="message" role="alert">{{ message() }}</p>
      </form>
    </mat-dialog-content>
    <mat-dialog-actions align="end">
      <button type="button" matButton="text" mat-dialog-close>Stay here</button>
    </mat-dialog-actions>
  `,
  styles: `
    li {
      display: flex;
      flex-wrap: wrap;
      align-items: baseline;
      gap: 0 12px;
    }
    form {
      display: grid;
      grid-template-columns: 1fr 110px auto;
      gap: 8px 12px;
      align-items: center;
      margin-top: 16px;
    }
    .message {
      grid-column: 1 / -1;
      margin: 0;
      color: var(--non-compliant);
    }
  `,
})
export class StandpointDialog {
  private readonly context = inject(StudyContext);
  private readonly dialog = inject<MatDialogRef<StandpointDialog>>(MatDialogRef);

  protected readonly revisionText = signal('');
  protected readonly message = signal('');
  protected readonly newest = computed(() => this.context.head.value()?.revision ?? 0);

  protected readonly places = computed(() => {
    const head = this.context.head.value();
    const at = this.context.at();
    const place = (label: string, note: string, standpoint: Standpoint) => ({
      label,
      note,
      standpoint,
      here: standpointParam(standpoint) === at,
    });
    return [
      place(`Now · r${this.newest()}`, 'what stands', NOW),
      ...(head?.baselines ?? []).map((baseline) =>
        place(`Baseline ${baseline.key}`, `${baseline.name}, r${baseline.revision}`, {
          kind: 'baseline',
          key: baseline.key,
        }),
      ),
      ...(head?.drafts ?? []).map((draft) =>
        place(`Draft ${draft.key}`, draft.title, { kind: 'draft', key: draft.key }),
      ),
    ];
  });

  protected value(event: Event): string {
    return event.target instanceof HTMLInputElement ? event.target.value : '';
  }

  protected lookFrom(standpoint: Standpoint): void {
    this.dialog.close();
    void this.context.lookFrom(standpoint);
  }

  protected lookFromRevision(event: Event): void {
    event.preventDefault();
    const text = this.revisionText().trim().replace(/^r/i, '');
    const revision = Number(text);
    if (!/^\d+$/.test(text) || revision > this.newest()) {
      this.message.set(
        `“${this.revisionText()}” is not a revision of this study. Type a whole number from 0 to ${this.newest()}.`,
      );
      return;
    }
    this.lookFrom(revision === this.newest() ? NOW : { kind: 'revision', revision });
  }
}
