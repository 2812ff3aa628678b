import { ChangeDetectionStrategy, Component, inject, input, output } from '@angular/core';
import type { AnalysisSheet } from '@shared/contract';
import { UnitPreferences } from '../../core/preferences/unit-preferences';
import { dayText } from '../../ui/day/day';
import { Tex } from '../../ui/proof/tex';
import { StudyContext } from '../../core/study/study-context';
import { RouterLink } from '@angular/router';

/** Who checked the analysis, what it gives, and what the method at hand says of itself. */
@Component({
  selector: 'dp-check-part',
  changeDetection: ChangeDetectionStrategy.OnPush,
  imports: [RouterLink, Tex],
  template: `
    @if (sheet().kind !== 'formula') {
      <h2 class="caption" id="outputs">Outputs</h2>
      <ul class="rows outputs" aria-labelledby="outputs">
        @for (output of sheet().outputs; track output.name) {
          <li>
            <dp-tex [tex]="output.tex" />
            <span>{{ output.label }}</span>
            <span class="number">{{ units.shown(output.shown) }}</span>
            @if (output.failure) {
              <span class="small failure">{{ output.failure }}</span>
            }
          </li>
        }
      </ul>
    }
    <h2 class="caption" id="check">Check</h2>
    @if (sheet().check; as check) {
      <p class="small">
        {{ check.valid ? 'Checked' : 'Checked before it was changed; the signature no longer covers it. Signed' }} by
        {{ check.person.name }}, {{ day(check.at) }}. {{ check.remark }}
        <span class="mono faint" [attr.title]="check.digest">{{ check.digest.slice(0, 12) }}</span>
      </p>
    } @else {
      <p class="small faint">
        Draft by {{ sheet().author.name }}. Somebody else signs its check; any later edit voids the signature.
      </p>
    }
    @if (sheet().newerMethod; as version) {
      <p class="note">
        Version {{ version }} of the method is out; this analysis pins {{ sheet().method?.version }}.
        @if (mayRevise()) {
          <button type="button" class="quiet" (click)="renew.emit(version)">Move to {{ version }}</button>
        }
      </p>
    }
    @if (sheet().validity || sheet().reference) {
      <h2 class="caption" id="at-hand">Method at hand</h2>
      <p class="small">{{ sheet().validity }}</p>
      <p class="small faint">{{ sheet().reference }}</p>
    }
    @for (caution of sheet().cautions; track caution) {
      <p class="small faint">{{ caution }}</p>
    }
    @for (change of sheet().changePending; track change) {
      <p class="note">
        <a class="key" [routerLink]="context.link('changes', change)">{{ change }}</a> proposes to change it.
      </p>
    }
  `,
  styles: `
    :host {
      display: block;
    }
    h2 {
      margin-bottom: 8px;
    }
    h2:not(:first-child) {
      margin-top: 28px;
    }
    p {
      margin: 4px 0;
    }
    .outputs > li {
      display: grid;
      grid-template-columns: 52px minmax(0, 1fr) auto;
      align-items: baseline;
      gap: 0 10px;
      font-size: 14px;
    }
    .failure {
      grid-column: 2 / -1;
      color: var(--non-compliant);
    }
  `,
})
export class CheckPart {
  protected readonly units = inject(UnitPreferences);
  protected readonly day = dayText;
  protected readonly context = inject(StudyContext);
  readonly sheet = input.required<AnalysisSheet>();
  readonly mayRevise = input(false);
  /** Version of the method to move to. */
  readonly renew = output<string>();
}
