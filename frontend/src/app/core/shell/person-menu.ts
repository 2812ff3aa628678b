import { ChangeDetectionStrategy, Component, inject } from '@angular/core';
import { MatDialog } from '@angular/material/dialog';
import { MatDivider } from '@angular/material/divider';
import { MatMenu, MatMenuItem, MatMenuTrigger } from '@angular/material/menu';
import { RouterLink } from '@angular/router';
import { ErrorLine } from '../errors/error-line';
import { KeysDialog } from '../keyboard/keys-dialog';
import { Appearance, DENSITIES, type Density, THEMES, type Theme } from '../preferences/appearance';
import { UnitDialog } from '../preferences/unit-dialog';
import { SessionStore } from '../session/session-store';

const THEME_NAMES: Readonly<Record<Theme, string>> = {
  system: 'Light as the system',
  paper: 'Paper',
  blueprint: 'Blueprint',
};
const DENSITY_NAMES: Readonly<Record<Density, string>> = { dense: 'Dense rows', comfortable: 'Comfortable rows' };

/** The signed-in person's own menu: appearance, units, keys, studies, sign out. */
@Component({
  selector: 'dp-person-menu',
  changeDetection: ChangeDetectionStrategy.OnPush,
  imports: [MatDivider, MatMenu, MatMenuItem, MatMenuTrigger, RouterLink],
  template: `
    <button type="button" class="person" [matMenuTriggerFor]="menu">{{ session.person()?.name }}</button>
    <mat-menu #menu="matMenu" xPosition="before">
      <a mat-menu-item routerLink="/">Studies</a>
      @if (session.isAdministrator()) {
        <a mat-menu-item routerLink="/people">People</a>
      }
      @if (session.isDemonstration()) {
        <a mat-menu-item routerLink="/mail">Mail of the demonstration</a>
      }
      <mat-divider />
      @for (theme of themes; track theme) {
        <button
          type="button"
          mat-menu-item
          role="menuitemradio"
          [attr.aria-checked]="appearance.theme() === theme"
          (click)="appearance.theme.set(theme)"
        >
          <span class="tick" aria-hidden="true">{{ appearance.theme() === theme ? '✓' : '' }}</span>
          {{ themeNames[theme] }}
        </button>
      }
      <mat-divider />
      @for (density of densities; track density) {
        <button
          type="button"
          mat-menu-item
          role="menuitemradio"
          [attr.aria-checked]="appearance.density() === density"
          (click)="appearance.density.set(density)"
        >
          <span class="tick" aria-hidden="true">{{ appearance.density() === density ? '✓' : '' }}</span>
          {{ densityNames[density] }}
        </button>
      }
      <mat-divider />
      <button type="button" mat-menu-item (click)="openUnits()">Units …</button>
      <button type="button" mat-menu-item (click)="openKeys()">Keys …</button>
      <mat-divider />
      <button type="button" mat-menu-item (click)="signOut()">Sign out</button>
    </mat-menu>
  `,
  styles: `
    .person {
      min-height: 32px;
      padding: 0 4px;
      border: 0;
      background: none;
      color: var(--ink-2);
      cursor: pointer;
      white-space: nowrap;
    }
    .person:hover {
      color: var(--ink);
    }
    .tick {
      display: inline-block;
      width: 18px;
      color: var(--cobalt);
    }
  `,
})
export class PersonMenu {
  private readonly dialog = inject(MatDialog);
  private readonly line = inject(ErrorLine);
  protected readonly session = inject(SessionStore);
  protected readonly appearance = inject(Appearance);
  protected readonly themes = THEMES;
  protected readonly themeNames = THEME_NAMES;
  protected readonly densities = DENSITIES;
  protected readonly densityNames = DENSITY_NAMES;

  protected openUnits(): void {
    this.dialog.open(UnitDialog);
  }

  protected openKeys(): void {
    this.dialog.open(KeysDialog);
  }

  protected signOut(): void {
    this.session.signOut().catch((error: unknown) => this.line.report(error));
  }
}
