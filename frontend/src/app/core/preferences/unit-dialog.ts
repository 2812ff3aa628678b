import { ChangeDetectionStrategy, Component, inject } from '@angular/core';
import { MatButton } from '@angular/material/button';
import { MatDialogActions, MatDialogClose, MatDialogContent, MatDialogTitle } from '@angular/material/dialog';
import { prettyUnit } from '@shared/units';
import { AS_ENTERED, UNIT_CHOICES, type UnitChoice } from './unit-choices';
import { UnitPreferences } from './unit-preferences';

/** Where a person chooses the units that numbers are shown in. */
@Component({
  selector: 'dp-unit-dialog',
  changeDetection: ChangeDetectionStrategy.OnPush,
  imports: [MatButton, MatDialogActions, MatDialogClose, MatDialogContent, MatDialogTitle],
  template: `
    <h2 mat-dialog-title>Units you read in</h2>
    <mat-dialog-content>
      <p class="small faint">
        Numbers are kept in SI units with what was typed beside them. You can always type any unit of the right
        dimension.
      </p>
      <div class="list">
        @for (choice of choices; track choice.id) {
          <label [attr.for]="'unit-' + choice.id">{{ choice.label }}</label>
          <select class="control mono" [id]="'unit-' + choice.id" (change)="choose(choice, $event)">
            @for (unit of choice.units; track unit) {
              <option [value]="unit" [selected]="unit === units.preferred(choice)">{{ pretty(unit) }}</option>
            }
          </select>
        }
      </div>
    </mat-dialog-content>
    <mat-dialog-actions align="end">
      <button type="button" matButton="filled" mat-dialog-close>Done</button>
    </mat-dialog-actions>
  `,
  styles: `
    .list {
      display: grid;
      grid-template-columns: 1fr 150px;
      gap: 8px 24px;
      align-items: center;
    }
  `,
})
export class UnitDialog {
  protected readonly units = inject(UnitPreferences);
  protected readonly choices = UNIT_CHOICES;

  protected pretty(unit: string): string {
    return unit === AS_ENTERED ? unit : prettyUnit(unit);
  }

  protected choose(choice: UnitChoice, event: Event): void {
    if (event.target instanceof HTMLSelectElement) this.units.prefer(choice, event.target.value);
  }
}
