import { ChangeDetectionStrategy, Component, computed, inject, input } from '@angular/core';
import { RouterLink } from '@angular/router';
import type { RequirementLink, RequirementSheet } from '@shared/contract';
import { firstValueFrom } from 'rxjs';
import { ErrorLine } from '../../core/errors/error-line';
import { StudyContext } from '../../core/study/study-context';
import { VerdictMark } from '../../ui/verdict/verdict-mark';
import { RequirementApi } from '../requirement-api';
import { BudgetActs } from './budget-acts';

/** What a requirement flows down from and to, with the shares between them. */
@Component({
  selector: 'dp-flow-links',
  changeDetection: ChangeDetectionStrategy.OnPush,
  imports: [RouterLink, VerdictMark],
  template: `
    <h2 class="caption">Flow-down</h2>
    <ul>
      @for (row of rows(); track row.link.id + row.link.depth) {
        <li [class.here]="row.link.here" [style.--depth]="row.link.depth">
          <div class="line">
            <span class="words">
              <a
                class="key"
                [routerLink]="context.link('requirements', row.link.key)"
                [queryParams]="context.readParams()"
                [attr.aria-current]="row.link.here ? 'page' : null"
                >{{ row.link.key }}</a
              >
              {{ row.link.title }}
            </span>
            <dp-verdict-mark [verdict]="row.link.verdict" [showWord]="false" />
          </div>
          @if (row.share) {
            <div class="small faint">{{ row.share }}</div>
          }
          @if (row.mayPropose || row.mayTakeBack || row.mayUnlink || row.mayAdopt) {
            <div class="acts no-print">
              @if (row.mayPropose) {
                <button type="button" class="quiet small" (click)="acts.propose(sheet(), row.link, 'proposed')">
                  Propose as share<span class="only-heard"> of {{ row.link.key }}</span>
                </button>
              }
              @if (row.mayTakeBack) {
                <button type="button" class="quiet small" (click)="acts.propose(sheet(), row.link, 'none')">
                  Take the proposal back<span class="only-heard"> from {{ row.link.key }}</span>
                </button>
              }
              @if (row.mayAdopt) {
                <button type="button" class="quiet small" (click)="adopt(row.link)">
                  Adopt share<span class="only-heard"> {{ row.link.key }}</span>
                </button>
              }
              @if (row.mayUnlink) {
                <button type="button" class="quiet small" (click)="acts.unlink(sheet(), row.link)">
                  Unlink<span class="only-heard"> from {{ row.link.key }}</span>
                </button>
              }
            </div>
          }
        </li>
      }
    </ul>
    @if (may('trace.link')) {
      <button type="button" class="quiet small no-print" (click)="linkParent()">Link below another parent</button>
    }
  `,
  styles: `
    :host {
      display: block;
    }
    ul {
      list-style: none;
      margin: 8px 0 4px;
      padding: 0;
    }
    li {
      margin-left: calc(var(--depth) * 18px);
      padding: 3px 0;
    }
    li.here {
      padding-left: 8px;
      margin-left: calc(var(--depth) * 18px - 10px);
      border-left: 2px solid var(--line);
    }
    .line {
      display: flex;
      justify-content: space-between;
      gap: 12px;
    }
    .acts {
      margin-left: -4px;
    }
  `,
})
export class FlowLinks {
  readonly sheet = input.required<RequirementSheet>();

  private readonly api = inject(RequirementApi);
  private readonly line = inject(ErrorLine);
  protected readonly acts = inject(BudgetActs);
  protected readonly context = inject(StudyContext);

  protected readonly rows = computed(() => {
    const links = this.sheet().flowDown;
    const here = links.findIndex((link) => link.here);
    return links.map((link, index) => {
      const isParent = index < here && link.traceId !== null;
      const isChild = index > here;
      const isLimited = this.sheet().limit !== null;
      return {
        link,
        share: shareText(link, isParent, this.sheet().key),
        mayPropose: isParent && link.share === 'none' && isLimited && this.may('budget.propose'),
        mayTakeBack: isParent && link.share === 'proposed' && this.may('budget.propose'),
        mayUnlink: isParent && this.may('trace.unlink'),
        mayAdopt: isChild && link.share === 'proposed' && this.sheet().budget !== null && this.mayAdopt(),
      };
    });
  });

  protected may(type: RequirementSheet['may'][number]): boolean {
    return this.sheet().may.includes(type);
  }

  protected adopt(link: RequirementLink): void {
    void this.acts.adopt(this.sheet(), { ...link, traceId: link.traceId ?? '' });
  }

  protected async linkParent(): Promise<void> {
    try {
      const { rows } = await firstValueFrom(this.api.flowDown());
      const linked = new Set(this.sheet().flowDown.map((link) => link.id));
      const others = [...new Map(rows.map((row) => [row.id, row])).values()].filter((row) => !linked.has(row.id));
      await this.acts.linkParent(this.sheet(), others);
    } catch (error) {
      this.line.report(error);
    }
  }

  /** At once where the budget may be edited; where it is baselined by a change request. */
  private mayAdopt(): boolean {
    if (this.may('budget.adopt')) return true;
    return this.sheet().state === 'baselined' && this.may('change.write') && this.context.holds('requirements-owner');
  }
}

function shareText(link: RequirementLink, isParent: boolean, key: string): string {
  if (link.here || link.share === 'none') return '';
  const share = link.share === 'adopted' ? 'adopted share' : 'proposed share';
  return isParent ? `${key} is ${link.share === 'adopted' ? 'an' : 'a'} ${share} of its budget` : share;
}
