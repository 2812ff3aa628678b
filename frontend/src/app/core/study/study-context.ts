import { HttpClient } from '@angular/common/http';
import { Injectable, computed, effect, inject, signal, untracked } from '@angular/core';
import { takeUntilDestroyed } from '@angular/core/rxjs-interop';
import { type ActivatedRouteSnapshot, GuardsCheckEnd, Router, type UrlTree } from '@angular/router';
import type { Role, Standpoint, StudyHead } from '@shared/contract';
import { filter } from 'rxjs';
import { load } from '../http/load';
import { LiveUpdates } from '../live/live-updates';
import { isFrozen, parseStandpoint, standpointParam } from './standpoint';

/** Everything that a read of study content depends on; pass it (or more) as the key of `load`. */
export interface ReadKey {
  readonly study: string;
  /** The `at` query parameter; undefined is now. */
  readonly at: string | undefined;
  readonly revision: number;
}

/** Which study is open, from where it is looked at, at which revision, and in which roles. */
@Injectable({ providedIn: 'root' })
export class StudyContext {
  private readonly http = inject(HttpClient);
  private readonly router = inject(Router);
  private readonly live = inject(LiveUpdates);
  private readonly place = signal<{ study: string | undefined; at: string | undefined }>({
    study: undefined,
    at: undefined,
  });

  /** Key of the open study, from the address; undefined outside a study. */
  readonly study = computed(() => this.place().study);
  readonly standpoint = computed<Standpoint>(() => parseStandpoint(this.place().at));
  readonly at = computed(() => standpointParam(this.standpoint()));

  /** What the title block shows of the study at this standpoint. */
  readonly head = load(
    () => {
      const study = this.study();
      if (study === undefined) return undefined;
      return { study, at: this.at(), heard: isFrozen(this.standpoint()) ? 0 : this.live.revision() };
    },
    ({ study, at }) =>
      this.http.get<StudyHead>(`/api/studies/${encodeURIComponent(study)}`, { params: at ? { at } : {} }),
    { discard: (previous, next) => previous.study !== next.study },
  );

  /** The revision to read at; grows with every accepted edit while looking from now or from a draft. */
  readonly revision = computed(() => {
    const head = this.head.value();
    if (head === undefined) return undefined;
    return isFrozen(this.standpoint()) ? head.standpoint.revision : Math.max(head.revision, this.live.revision());
  });

  /** Undefined until the study is known, so that views read once, with the right revision. */
  readonly readKey = computed<ReadKey | undefined>(() => {
    const study = this.study();
    const revision = this.revision();
    return study === undefined || revision === undefined ? undefined : { study, at: this.at(), revision };
  });

  readonly roles = computed<readonly Role[]>(() => this.head.value()?.roles ?? []);

  /** True when edits can be made from here: now, or an open draft. The server decides; this only spares a refusal. */
  readonly isEditable = computed(() => this.head.value()?.standpoint.editable ?? false);

  constructor() {
    // Comes before the pages of the new address are created, so they find the right study at once, and also where only
    // the standpoint changes, when there is nothing to resolve.
    this.router.events
      .pipe(
        filter((event): event is GuardsCheckEnd => event instanceof GuardsCheckEnd && event.shouldActivate),
        takeUntilDestroyed(),
      )
      .subscribe((event) => {
        const root = event.state.root;
        const next = { study: studyOf(root), at: root.queryParamMap.get('at') ?? undefined };
        const present = this.place();
        if (next.study !== present.study || next.at !== present.at) this.place.set(next);
      });
    effect(() => {
      const study = this.study();
      untracked(() => this.live.follow(study));
    });
  }

  /** True when I hold one of these roles in the open study. */
  holds(...roles: readonly Role[]): boolean {
    return this.roles().some((role) => roles.includes(role));
  }

  /** The address of an API resource of the open study: api('requirements', key) → /api/studies/petrel/requirements/VEH-001. */
  api(...segments: readonly string[]): string {
    return ['/api/studies', this.study() ?? '', ...segments]
      .map((part, index) => (index === 0 ? part : encodeURIComponent(part)))
      .join('/');
  }

  /** Query parameters that name the standpoint, for a read. */
  readParams(): Record<string, string> {
    const at = this.at();
    return at === undefined ? {} : { at };
  }

  /** Router commands for a page of the open study: link('requirements', 'VEH-001'). */
  link(...segments: readonly string[]): string[] {
    return ['/studies', this.study() ?? '', ...segments];
  }

  /** The address for a route that the server names, such as "requirements/VEH-001", seen from the same standpoint. */
  addressOf(route: string): UrlTree {
    const tree = this.router.parseUrl(route.startsWith('/') ? route : this.link(...route.split('/')).join('/'));
    tree.queryParams = { ...tree.queryParams, ...this.readParams() };
    return tree;
  }

  /** Tells that an own edit made this revision, so that every view reads again without waiting for the stream. */
  saw(revision: number): void {
    this.live.saw(revision);
  }

  /** Looks from another standpoint at the same page. */
  async lookFrom(standpoint: Standpoint): Promise<void> {
    await this.router.navigate([], {
      queryParams: { at: standpointParam(standpoint) ?? null },
      queryParamsHandling: 'merge',
    });
  }
}

function studyOf(root: ActivatedRouteSnapshot): string | undefined {
  for (let route: ActivatedRouteSnapshot | null = root; route !== null; route = route.firstChild) {
    const study = route.paramMap.get('study');
    if (study !== null) return study;
  }
  return undefined;
}
