import { ChangeDetectionStrategy, Component, computed, inject, input } from '@angular/core';
import type { Departure, RequirementSheet } from '@shared/contract';
import { SessionStore } from '../../core/session/session-store';
import { dayText } from '../../ui/day/day';
import { ProcedureActs } from './procedure-acts';

/** Departures from a requirement, and how its row of the compliance matrix stands: lowered, closed, reopened. */
@Component({
  selector: 'dp-departures-part',
  changeDetection: ChangeDetectionStrategy.OnPush,
  template: `
    <h2 class="caption">Compliance</h2>
    <dl class="facts">
      <dt>Computed</dt>
      <dd>{{ sheet().computedCompliance }}{{ sheet().basis ? ', ' + sheet().basis : '' }}</dd>
      @if (sheet().lowered; as lowered) {
        <dt>Lowered to</dt>
        <dd>
          {{ lowered.to }}
          <div class="small faint">{{ lowered.person.name }}, {{ day(lowered.at) }}: {{ lowered.reason }}</div>
        </dd>
      }
      <dt>Close-out</dt>
      <dd>
        {{ sheet().closeOut }}
        @if (sheet().closed; as closed) {
          <div class="small faint">signed by {{ closed.person.name }}, {{ day(closed.at) }}: {{ closed.reason }}</div>
        }
      </dd>
      @for (departure of sheet().departures; track departure.id) {
        <dt class="key">{{ departure.key }}</dt>
        <dd>
          {{ departure.title }}
          <div class="small faint">{{ about(departure) }}</div>
          <div class="acts no-print">
            @if (mayDecide(departure)) {
              <button type="button" class="quiet small" (click)="acts.decideDeparture(departure)">
                Decide<span class="only-heard"> on {{ departure.key }}</span>
              </button>
            }
            @if (departure.state === 'in force' && may('departure.expire')) {
              <button type="button" class="quiet small" (click)="acts.expire(departure)">
                It has expired<span class="only-heard">: {{ departure.key }}</span>
              </button>
            }
          </div>
        </dd>
      }
    </dl>
  `,
  styles: `
    :host {
      display: block;
    }
    h2 {
      margin-bottom: 4px;
    }
    .acts {
      margin-left: -4px;
    }
  `,
})
export class DeparturesPart {
  readonly sheet = input.required<RequirementSheet>();
  protected readonly acts = inject(ProcedureActs);
  protected readonly day = dayText;
  private readonly me = inject(SessionStore).person;
  private readonly allowed = computed(() => this.sheet().may);

  protected may(type: RequirementSheet['may'][number]): boolean {
    return this.allowed().includes(type);
  }

  protected mayDecide(departure: Departure): boolean {
    return departure.state === 'requested' && departure.requestedBy !== this.me()?.id && this.may('departure.decide');
  }

  protected about(departure: Departure): string {
    const until = departure.expires === null ? '' : `until ${dayText(departure.expires)}`;
    const decided = departure.decision === null ? '' : departure.decision.reason;
    return [`${departure.class} ${departure.kind}, ${departure.state}`, departure.effectivity, until, decided]
      .filter((part) => part !== '')
      .join(' · ');
  }
}
