import { HttpClient } from '@angular/common/http';
import { ChangeDetectionStrategy, Component, computed, inject, linkedSignal, signal } from '@angular/core';
import { toObservable, toSignal } from '@angular/core/rxjs-interop';
import { MatDialogContent, MatDialogRef, MatDialogTitle } from '@angular/material/dialog';
import { Router } from '@angular/router';
import type { Hit } from '@shared/contract';
import { catchError, debounceTime, distinctUntilChanged, map, of, startWith, switchMap } from 'rxjs';
import { StudyContext } from '../study/study-context';

interface Found {
  readonly query: string;
  readonly hits: readonly Hit[];
  readonly searching: boolean;
  readonly failed: boolean;
}

const NOTHING: Found = { query: '', hits: [], searching: false, failed: false };

/** Finds any item of the study by key or word and goes there. */
@Component({
  selector: 'dp-jump-dialog',
  changeDetection: ChangeDetectionStrategy.OnPush,
  imports: [MatDialogContent, MatDialogTitle],
  template: `
    <h2 mat-dialog-title>Jump to</h2>
    <mat-dialog-content>
      <input
        class="control"
        type="search"
        role="combobox"
        aria-label="Key or word"
        aria-autocomplete="list"
        aria-controls="jump-hits"
        autocomplete="off"
        placeholder="VEH-002, radiator, boil-off …"
        [attr.aria-expanded]="hits().length > 0"
        [attr.aria-activedescendant]="hits().length > 0 ? 'jump-hit-' + chosen() : null"
        [value]="query()"
        (input)="type($event)"
        (keydown)="press($event)"
      />
      <ul id="jump-hits" role="listbox" aria-label="Found" class="hits">
        @for (hit of hits(); track hit.kind + hit.key) {
          <li
            role="option"
            tabindex="-1"
            [id]="'jump-hit-' + $index"
            [attr.aria-selected]="$index === chosen()"
            [class.chosen]="$index === chosen()"
            (click)="go(hit)"
            (keydown.enter)="go(hit)"
          >
            <span class="key">{{ hit.key }}</span>
            <span class="title">{{ hit.title }}</span>
            <span class="faint small">{{ hit.kind }}</span>
          </li>
        }
      </ul>
      <p class="small faint" role="status">{{ status() }}</p>
    </mat-dialog-content>
  `,
  styles: `
    .hits {
      list-style: none;
      margin: 8px 0 0;
      padding: 0;
      min-height: 180px;
    }
    .hits li {
      display: grid;
      grid-template-columns: 92px 1fr auto;
      gap: 12px;
      align-items: baseline;
      padding: 7px 8px;
      border-bottom: 1px solid var(--hair);
      cursor: pointer;
    }
    .hits li.chosen,
    .hits li:hover {
      background: var(--chosen);
      box-shadow: inset 3px 0 0 var(--cobalt);
    }
    .key {
      color: var(--cobalt);
    }
    .title {
      overflow: hidden;
      text-overflow: ellipsis;
      white-space: nowrap;
    }
    p {
      margin: 8px 0 0;
      min-height: 18px;
    }
  `,
})
export class JumpDialog {
  private readonly http = inject(HttpClient);
  private readonly router = inject(Router);
  private readonly context = inject(StudyContext);
  private readonly dialog = inject<MatDialogRef<JumpDialog>>(MatDialogRef);

  protected readonly query = signal('');
  private readonly found = toSignal(
    toObservable(this.query).pipe(
      map((query) => query.trim()),
      debounceTime(120),
      distinctUntilChanged(),
      switchMap((query) => (query === '' ? of(NOTHING) : this.search(query))),
    ),
    { initialValue: NOTHING },
  );
  protected readonly hits = computed(() => this.found().hits);
  protected readonly chosen = linkedSignal({ source: this.hits, computation: () => 0 });
  protected readonly status = computed(() => {
    const found = this.found();
    if (found.failed) return 'The search could not be made. Try again in a moment.';
    if (found.query === '') return 'Type a key or a word of a title.';
    if (found.searching) return 'Searching …';
    if (found.hits.length === 0) return `Nothing here is called “${found.query}”.`;
    return found.hits.length === 1 ? '1 found' : `${found.hits.length} found`;
  });

  protected type(event: Event): void {
    if (event.target instanceof HTMLInputElement) this.query.set(event.target.value);
  }

  protected press(event: KeyboardEvent): void {
    const count = this.hits().length;
    if (count === 0) return;
    if (event.key === 'ArrowDown') this.chosen.update((index) => (index + 1) % count);
    else if (event.key === 'ArrowUp') this.chosen.update((index) => (index + count - 1) % count);
    else if (event.key === 'Enter') {
      const hit = this.hits()[this.chosen()];
      if (hit !== undefined) this.go(hit);
    } else return;
    event.preventDefault();
  }

  protected go(hit: Hit): void {
    this.dialog.close();
    void this.router.navigateByUrl(this.context.addressOf(hit.route));
  }

  private search(query: string) {
    const searching: Found = { query, hits: this.found().hits, searching: true, failed: false };
    return this.http
      .get<{ hits: readonly Hit[] }>(this.context.api('search'), { params: { q: query, ...this.context.readParams() } })
      .pipe(
        map(({ hits }): Found => ({ query, hits, searching: false, failed: false })),
        catchError(() => of<Found>({ query, hits: [], searching: false, failed: true })),
        startWith(searching),
      );
  }
}
