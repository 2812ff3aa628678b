import { ChangeDetectionStrategy, Component, computed, inject, input, signal } from '@angular/core';
import { MatDialog } from '@angular/material/dialog';
import { RouterLink } from '@angular/router';
import { Mark } from '../../ui/mark/mark';
import { UnitDialog } from '../preferences/unit-dialog';
import { UnitPreferences } from '../preferences/unit-preferences';
import { SessionStore } from '../session/session-store';
import { StudyContext } from '../study/study-context';
import { PersonMenu } from './person-menu';
import { SECTIONS, sectionOf } from './sections';

/** The top edge: our mark, the section tabs of the open study, units and person. On phones a "Sections" list. */
@Component({
  selector: 'dp-shell-header',
  changeDetection: ChangeDetectionStrategy.OnPush,
  imports: [Mark, PersonMenu, RouterLink],
  templateUrl: './shell-header.html',
  styleUrl: './shell-header.scss',
  host: { role: 'banner', '(keydown.escape)': 'open.set(false)' },
})
export class ShellHeader {
  private readonly dialog = inject(MatDialog);
  protected readonly session = inject(SessionStore);
  protected readonly context = inject(StudyContext);
  protected readonly units = inject(UnitPreferences);

  /** The present address, to mark the section that is open. */
  readonly url = input.required<string>();

  protected readonly sections = SECTIONS;
  protected readonly here = computed(() => sectionOf(this.url()));
  protected readonly open = signal(false);

  protected openUnits(): void {
    this.dialog.open(UnitDialog);
  }
}
