import { ChangeDetectionStrategy, Component, computed, input, output } from '@angular/core';

/** A requirement in the head of the matrix. */
export interface DrivenRequirement {
  readonly key: string;
  readonly title: string;
}

/** An input in the rows, with its influence on each requirement of the head, 0 to 1. */
export interface DrivingInput {
  readonly quantityKey: string;
  readonly name: string;
  readonly influence: readonly number[];
}

const LARGEST = 9;

/** What drives it: one dot per input and requirement, its area as large as the input's influence. */
@Component({
  selector: 'dp-influence-dots',
  changeDetection: ChangeDetectionStrategy.OnPush,
  template: `
    <table class="ruled">
      <thead>
        <tr>
          <th scope="col"><span class="only-heard">Input</span></th>
          @for (requirement of requirements(); track requirement.key) {
            <th scope="col" class="dot">
              <button
                type="button"
                class="quiet key"
                [title]="requirement.title"
                (click)="openRequirement.emit(requirement.key)"
              >
                {{ requirement.key }}
              </button>
            </th>
          }
        </tr>
      </thead>
      <tbody>
        @for (row of rows(); track row.quantityKey) {
          <tr>
            <th scope="row">
              <button type="button" class="quiet name" (click)="openQuantity.emit(row.quantityKey)">
                {{ row.name }}
              </button>
            </th>
            @for (dot of row.dots; track $index) {
              <td class="dot">
                @if (dot.radius > 0) {
                  <svg viewBox="-10 -10 20 20" width="20" height="20" aria-hidden="true" focusable="false">
                    <circle [attr.r]="dot.radius" [attr.opacity]="dot.opacity" />
                  </svg>
                }
                <span class="only-heard">{{ dot.spoken }}</span>
              </td>
            }
          </tr>
        }
      </tbody>
    </table>
  `,
  styles: `
    :host {
      display: block;
      max-width: 820px;
      overflow-x: auto;
    }
    .dot {
      position: relative;
      width: 106px;
      text-align: center;
    }
    tbody th {
      height: var(--row);
      padding-block: 2px;
      border-bottom: 1px solid var(--hair);
      font-size: 15px;
      line-height: 22px;
      font-weight: 450;
    }
    .name {
      color: var(--ink);
      text-align: left;
      white-space: normal;
    }
    .key {
      font-size: 13px;
      font-weight: 400;
    }
    svg {
      display: inline-block;
      vertical-align: middle;
    }
    circle {
      fill: var(--cobalt);
    }
    @media (max-width: 720px) {
      .dot {
        width: 74px;
      }
    }
  `,
})
export class InfluenceDots {
  readonly requirements = input.required<readonly DrivenRequirement[]>();
  readonly inputs = input.required<readonly DrivingInput[]>();
  readonly openRequirement = output<string>();
  readonly openQuantity = output<string>();

  protected readonly rows = computed(() =>
    this.inputs().map((row) => ({
      ...row,
      dots: this.requirements().map((_, column) => dot(row.influence[column] ?? 0)),
    })),
  );
}

function dot(influence: number): { readonly radius: number; readonly opacity: number; readonly spoken: string } {
  const share = Math.max(0, Math.min(1, influence));
  // Below a thousandth there is nothing to see, and nothing to say.
  if (share < 0.001) return { radius: 0, opacity: 0, spoken: 'none' };
  return {
    radius: Math.max(0.8, LARGEST * Math.sqrt(share)),
    opacity: Math.max(0.55, Math.sqrt(share)),
    spoken: `${Math.max(1, Math.round(share * 100))} %`,
  };
}
