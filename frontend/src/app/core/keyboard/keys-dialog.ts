import { ChangeDetectionStrategy, Component, computed, inject } from '@angular/core';
import { MatButton } from '@angular/material/button';
import { MatDialogActions, MatDialogClose, MatDialogContent, MatDialogTitle } from '@angular/material/dialog';
import { Shortcuts } from './shortcuts';

/** Lists the keys that work on the page that is open. */
@Component({
  selector: 'dp-keys-dialog',
  changeDetection: ChangeDetectionStrategy.OnPush,
  imports: [MatButton, MatDialogActions, MatDialogClose, MatDialogContent, MatDialogTitle],
  template: `
    <h2 mat-dialog-title>Keys</h2>
    <mat-dialog-content>
      @for (group of groups(); track group.name) {
        <h3 class="caption">{{ group.name }}</h3>
        <dl class="facts">
          @for (shortcut of group.shortcuts; track shortcut.keys) {
            <dt>
              @for (key of shortcut.keys.split('+'); track $index) {
                <kbd>{{ key || '+' }}</kbd>{{ $last ? '' : ' ' }}
              }
            </dt>
            <dd>{{ shortcut.label }}</dd>
          }
        </dl>
      }
      <label class="choice">
        <input
          type="checkbox"
          [checked]="shortcuts.singleKeys()"
          (change)="shortcuts.singleKeys.set(!shortcuts.singleKeys())"
        />
        Single-character keys work
      </label>
    </mat-dialog-content>
    <mat-dialog-actions align="end">
      <button type="button" matButton="filled" mat-dialog-close>Done</button>
    </mat-dialog-actions>
  `,
  styles: `
    dl {
      margin-bottom: 20px;
    }
    dt {
      min-width: 130px;
    }
  `,
})
export class KeysDialog {
  protected readonly shortcuts = inject(Shortcuts);
  protected readonly groups = computed(() => {
    const names = [...new Set(this.shortcuts.all().map((shortcut) => shortcut.group))];
    return names.map((name) => ({
      name,
      shortcuts: this.shortcuts.all().filter((shortcut) => shortcut.group === name),
    }));
  });
}
