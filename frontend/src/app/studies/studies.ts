import { ChangeDetectionStrategy, Component, computed, inject } from '@angular/core';
import { MatDialog } from '@angular/material/dialog';
import { Router, RouterLink } from '@angular/router';
import type { StudySummary } from '@shared/contract';
import { load } from '../core/http/load';
import { roleList } from '../core/study/role-name';
import { TitleBlock } from '../core/title-block';
import { EmptyState } from '../ui/empty-state/empty-state';
import { VerdictMark } from '../ui/verdict/verdict-mark';
import { WORST_FIRST } from '../ui/verdict/verdict-words';
import { Waiting } from '../ui/waiting/waiting';
import { NewStudyDialog } from './new-study-dialog';
import { standing } from './standing';
import { StudiesApi } from './studies-api';

/** The studies a person takes part in, and how each stands. */
@Component({
  selector: 'dp-studies',
  changeDetection: ChangeDetectionStrategy.OnPush,
  imports: [EmptyState, RouterLink, VerdictMark, Waiting],
  template: `
    <section class="sheet">
      <div class="sheet-head"><h1>Studies</h1></div>
      @if (studies.value()) {
        <ul>
          @for (row of rows(); track row.study.key) {
            <li>
              <div>
                <h2>
                  <a [routerLink]="['/studies', row.study.key]">{{ row.study.name }}</a>
                </h2>
                <p class="standing">{{ row.standing }}</p>
                <p class="faint">{{ row.study.summary }}</p>
              </div>
              <div class="counts">
                @for (count of row.counts; track count.verdict) {
                  <span
                    ><dp-verdict-mark [verdict]="count.verdict" /> <span class="mono">{{ count.number }}</span></span
                  >
                }
              </div>
              <p class="facts small faint">
                <span class="mono">r{{ row.study.revision }}</span> · {{ row.facts }}<br />{{ row.roles }}
              </p>
            </li>
          } @empty {
            <dp-empty-state
              title="You take part in no study yet."
              first="Start one with the button below, or ask an administrator to give you a role in one that exists."
            />
          }
        </ul>
      } @else {
        <dp-waiting [state]="studies" />
      }
    </section>
  `,
  styles: `
    ul {
      list-style: none;
      margin: 0;
      padding: 0;
      border-top: 1.5px solid var(--line);
    }
    li {
      display: grid;
      grid-template-columns: minmax(0, 1fr) 170px 260px;
      gap: 8px 40px;
      padding: 20px 0;
      border-bottom: 1px solid var(--hair);
    }
    h2 a {
      color: var(--ink);
    }
    h2 a:hover {
      color: var(--cobalt);
    }
    p {
      margin: 2px 0 0;
      max-width: 70ch;
    }
    .standing {
      font-weight: 560;
    }
    .standing::first-letter {
      text-transform: uppercase;
    }
    .counts > span {
      display: flex;
      justify-content: space-between;
    }
    @media (max-width: 900px) {
      li {
        grid-template-columns: minmax(0, 1fr);
      }
      .counts {
        display: flex;
        flex-wrap: wrap;
        gap: 4px 20px;
      }
      .counts > span {
        gap: 6px;
      }
    }
  `,
})
export class Studies {
  private readonly api = inject(StudiesApi);
  private readonly dialog = inject(MatDialog);
  private readonly router = inject(Router);

  protected readonly studies = load(
    () => 'studies',
    () => this.api.list(),
  );
  protected readonly rows = computed(() =>
    (this.studies.value() ?? []).map((study) => ({
      study,
      standing: standing(study.counts),
      counts: countsOf(study),
      facts: [study.concept, study.phase && `phase ${study.phase}`].filter((fact) => fact !== '').join(' · '),
      roles: study.roles.length === 0 ? 'You have no role here' : `You act as ${roleList(study.roles).toLowerCase()}`,
    })),
  );

  constructor() {
    inject(TitleBlock).register({
      name: () => 'Studies',
      actions: () => [{ label: 'Start a study', main: true, shortcut: 'n', run: () => this.start() }],
    });
  }

  private start(): void {
    this.dialog
      .open<NewStudyDialog, never, string>(NewStudyDialog, { width: '560px' })
      .afterClosed()
      .subscribe((key) => {
        if (key !== undefined) void this.router.navigate(['/studies', key, 'requirements']);
      });
  }
}

function countsOf(study: StudySummary) {
  return WORST_FIRST.map((verdict) => ({ verdict, number: study.counts[verdict] })).filter((count) => count.number > 0);
}
