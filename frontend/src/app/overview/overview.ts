import { ChangeDetectionStrategy, Component, DOCUMENT, computed, inject } from '@angular/core';
import { Router, RouterLink } from '@angular/router';
import { load } from '../core/http/load';
import { UnitPreferences } from '../core/preferences/unit-preferences';
import { StudyContext } from '../core/study/study-context';
import { type SheetAction, TitleBlock } from '../core/title-block';
import { ClosureStrip } from '../ui/closure-strip/closure-strip';
import { EmptyState } from '../ui/empty-state/empty-state';
import { InfluenceDots } from '../ui/influence/influence-dots';
import { KeyLink } from '../ui/key-link/key-link';
import { Waiting } from '../ui/waiting/waiting';
import { closureHeadline, closureSentence } from './closure-words';
import { moveSentence } from './move-words';
import { OverviewApi } from './overview-api';

/** Does the study close, what fails, what drives that, what changed since the baseline, and what waits for me. */
@Component({
  selector: 'dp-overview',
  changeDetection: ChangeDetectionStrategy.OnPush,
  imports: [ClosureStrip, EmptyState, InfluenceDots, KeyLink, RouterLink, Waiting],
  templateUrl: './overview.html',
  styleUrl: './overview.scss',
})
export class Overview {
  private readonly api = inject(OverviewApi);
  private readonly router = inject(Router);
  private readonly units = inject(UnitPreferences);
  private readonly document = inject(DOCUMENT);
  protected readonly context = inject(StudyContext);

  protected readonly overview = load(
    () => this.context.readKey(),
    () => this.api.overview(),
    { discard: (previous, next) => previous.study !== next.study },
  );
  protected readonly name = computed(() => this.context.head.value()?.study.name ?? '');
  protected readonly headline = computed(() => {
    const view = this.overview.value();
    return view === undefined ? '' : closureHeadline(this.name(), view);
  });
  protected readonly sentence = computed(() => {
    const view = this.overview.value();
    return view === undefined ? '' : closureSentence(view);
  });
  protected readonly moves = computed(() =>
    (this.overview.value()?.moves ?? []).map((move) => moveSentence(move, (value) => this.units.shown(value))),
  );
  protected readonly waits = computed(() =>
    (this.overview.value()?.waits ?? []).map((wait) => ({ ...wait, address: this.context.addressOf(wait.route) })),
  );
  protected readonly warnings = computed(() =>
    (this.overview.value()?.warnings ?? []).map((warning) => ({ ...warning, to: this.linkTo(warning.key) })),
  );

  constructor() {
    inject(TitleBlock).register({ actions: () => this.actions() });
  }

  protected openRequirement(key: string): void {
    void this.open('requirements', key);
  }

  protected openQuantity(key: string): void {
    void this.router.navigate(this.context.link('quantities'), {
      queryParams: { ...this.context.readParams(), select: key },
    });
  }

  protected linkTo(key: string): string[] {
    return key.startsWith('AN-') ? this.context.link('analyses', key) : this.context.link('quantities');
  }

  private actions(): readonly SheetAction[] {
    const print: SheetAction = {
      label: 'Print one page',
      run: () => this.document.defaultView?.print(),
    };
    const baseline = this.context.head.value()?.baselineInForce?.key;
    const isThere = this.context.standpoint().kind === 'baseline';
    if (isThere)
      return [print, { label: 'Back to now', main: true, run: () => void this.context.lookFrom({ kind: 'now' }) }];
    if (baseline === undefined)
      return [print, { label: 'Open the requirements', main: true, run: () => void this.open('requirements') }];
    return [
      print,
      {
        label: `Compare with ${baseline}`,
        main: true,
        run: () => void this.context.lookFrom({ kind: 'baseline', key: baseline }),
      },
    ];
  }

  private open(...segments: readonly string[]): Promise<boolean> {
    return this.router.navigate(this.context.link(...segments), { queryParams: this.context.readParams() });
  }
}
