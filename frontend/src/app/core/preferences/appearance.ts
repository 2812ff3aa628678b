import { DOCUMENT, Injectable, effect, inject } from '@angular/core';
import { storedSignal } from '../stored-signal';

/** Light "paper", dark "blueprint", or as the system is set. */
export const THEMES = ['system', 'paper', 'blueprint'] as const;
export type Theme = (typeof THEMES)[number];

/** Rows of 36 px or of 44 px. */
export const DENSITIES = ['dense', 'comfortable'] as const;
export type Density = (typeof DENSITIES)[number];

/** How the pages look to this person on this device. */
@Injectable({ providedIn: 'root' })
export class Appearance {
  private readonly root = inject(DOCUMENT).documentElement;
  readonly theme = storedSignal<Theme>('deltaproof.theme', 'system', (stored) =>
    THEMES.find((theme) => theme === stored),
  );
  readonly density = storedSignal<Density>('deltaproof.density', 'dense', (stored) =>
    DENSITIES.find((density) => density === stored),
  );

  constructor() {
    effect(() => {
      const theme = this.theme();
      if (theme === 'system') delete this.root.dataset['theme'];
      else this.root.dataset['theme'] = theme;
      this.root.dataset['density'] = this.density();
    });
  }
}
