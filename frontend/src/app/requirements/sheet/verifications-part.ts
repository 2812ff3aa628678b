import { ChangeDetectionStrategy, Component, computed, inject, input } from '@angular/core';
import { RouterLink } from '@angular/router';
import type { RequirementSheet, VerificationView } from '@shared/contract';
import { UnitPreferences } from '../../core/preferences/unit-preferences';
import { StudyContext } from '../../core/study/study-context';
import { MarginNumber } from '../../ui/margin/margin-number';
import { VerdictMark } from '../../ui/verdict/verdict-mark';
import { VerificationActs } from './verification-acts';

/** How a requirement is verified, what each way says, and what can be done about it. */
@Component({
  selector: 'dp-verifications-part',
  changeDetection: ChangeDetectionStrategy.OnPush,
  imports: [MarginNumber, RouterLink, VerdictMark],
  template: `
    <h2 class="caption" id="verifications">Verified by</h2>
    <ul class="rows">
      @for (row of rows(); track row.one.id) {
        <li>
          <div class="what">
            <div>
              @if (row.one.analysisKey; as key) {
                <a class="key" [routerLink]="context.link('analyses', key)" [queryParams]="context.readParams()">{{
                  key
                }}</a>
                {{ row.one.analysisName }} <span class="mono faint">{{ row.one.output }}</span>
              } @else {
                <span class="method">{{ row.one.method }}</span>
              }
              @if (row.one.deciding && rows().length > 1) {
                <span class="small strong">decides</span>
              }
            </div>
            <div class="small faint">{{ row.plan }}</div>
            @if (row.one.finding; as finding) {
              <div class="small">
                {{ finding.met ? 'Met' : 'Not met' }} according to {{ finding.document
                }}{{ finding.issue ? ', ' + finding.issue : '' }}, recorded by {{ row.one.person?.name }}.
                {{ finding.note }}
              </div>
            }
            @if (row.one.verdict.reason) {
              <div class="small reason">{{ row.one.verdict.reason }}</div>
            }
          </div>
          <div class="says">
            <span class="mono">{{ row.value }}</span>
            <dp-margin-number
              [margin]="row.one.verdict.margin"
              [unit]="sheet().limit?.value?.unit ?? ''"
              [show]="show"
            />
            <dp-verdict-mark [verdict]="row.one.verdict.verdict" />
          </div>
          <div class="acts no-print">
            @if (row.mayRecord) {
              <button type="button" class="quiet" (click)="acts.record(sheet(), row.one)">Record a finding</button>
            }
            @if (may('verification.revise')) {
              @if (!row.one.deciding && rows().length > 1) {
                <button type="button" class="quiet" (click)="acts.decide(row.one)">
                  Let it decide<span class="only-heard">: {{ row.name }}</span>
                </button>
              }
              <button type="button" class="quiet" (click)="acts.revise(sheet(), row.one)">
                Edit<span class="only-heard"> how it is verified by {{ row.name }}</span>
              </button>
            }
            @if (may('verification.unlink')) {
              <button type="button" class="quiet" (click)="acts.unlink(sheet(), row.one)">
                Unlink<span class="only-heard"> {{ row.name }}</span>
              </button>
            }
          </div>
        </li>
      } @empty {
        <li class="faint">
          Nothing yet: no evidence.
          {{ sheet().limit ? 'Link an analysis whose output can be compared with the limit.' : '' }}
        </li>
      }
    </ul>
    @if (may('verification.link')) {
      <div class="actions-row no-print">
        @if (sheet().limit) {
          <button type="button" class="quiet" (click)="acts.link(sheet())">Link an analysis</button>
        }
        <button type="button" class="quiet" (click)="acts.link(sheet(), 'test')">Plan another method</button>
      </div>
    }
  `,
  styles: `
    :host {
      display: block;
    }
    h2 {
      margin-bottom: 8px;
    }
    li {
      display: grid;
      grid-template-columns: minmax(0, 1fr) auto;
      gap: 2px 24px;
    }
    .method::first-letter {
      text-transform: uppercase;
    }
    .says {
      display: flex;
      flex-wrap: wrap;
      gap: 4px 20px;
      justify-content: flex-end;
      align-items: baseline;
    }
    .acts {
      grid-column: 1 / -1;
      margin-left: -4px;
    }
    .acts:empty {
      display: none;
    }
    .reason {
      color: var(--ink-2);
    }
    .actions-row {
      margin: 8px 0 0 -4px;
    }
    @media (max-width: 720px) {
      li {
        grid-template-columns: minmax(0, 1fr);
      }
      .says {
        justify-content: flex-start;
      }
    }
  `,
})
export class VerificationsPart {
  readonly sheet = input.required<RequirementSheet>();

  private readonly units = inject(UnitPreferences);
  protected readonly acts = inject(VerificationActs);
  protected readonly context = inject(StudyContext);
  protected readonly show = this.units.show.bind(this.units);

  protected readonly rows = computed(() =>
    this.sheet().verifications.map((one) => ({
      one,
      name: one.analysisKey ?? one.method,
      plan: planText(one),
      value: one.verdict.value === null ? '' : this.units.shown(one.verdict.value),
      mayRecord: this.may('verification.record') && (one.method !== 'analysis' || this.sheet().limit === null),
    })),
  );

  protected may(type: RequirementSheet['may'][number]): boolean {
    return this.sheet().may.includes(type);
  }
}

function planText(one: VerificationView): string {
  const level = one.level === '' ? '' : `${one.level} level`;
  return [one.analysisKey === null ? '' : one.method, level, one.stage, one.gate, one.criterion]
    .filter((part) => part !== '')
    .join(' · ');
}
