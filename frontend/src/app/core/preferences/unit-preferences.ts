import { Injectable, computed } from '@angular/core';
import type { Shown } from '@shared/contract';
import { type TemperatureKind, formatSi, fromSi, parseUnit, prettyUnit } from '@shared/units';
import { storedSignal } from '../stored-signal';
import { AS_ENTERED, SUMMARY_CHOICES, UNIT_CHOICES, type UnitChoice } from './unit-choices';

export interface ShowOptions {
  readonly digits?: number;
  readonly temperature?: TemperatureKind;
  readonly withUnit?: boolean;
}

type Preferences = Readonly<Record<string, string>>;

/** In which units this person reads numbers on this device. */
@Injectable({ providedIn: 'root' })
export class UnitPreferences {
  private readonly preferences = storedSignal<Preferences>('deltaproof.units', {}, readPreferences);
  private readonly byDimension = new Map(UNIT_CHOICES.map((choice) => [dimensionKey(choice.unit), choice]));

  /** "km/s · t · MW", for the header. */
  readonly summary = computed(() =>
    UNIT_CHOICES.filter((choice) => SUMMARY_CHOICES.some((id) => id === choice.id)).map((choice) =>
      prettyUnit(this.preferred(choice)),
    ),
  );

  /** The unit preferred for a choice, or "as entered". */
  preferred(choice: UnitChoice): string {
    return this.preferences()[choice.id] ?? choice.units[0] ?? AS_ENTERED;
  }

  prefer(choice: UnitChoice, unit: string): void {
    this.preferences.update((preferences) => ({ ...preferences, [choice.id]: unit }));
  }

  /**
   * The unit in which to show an SI value whose author thinks in `unit`. The preferred one, unless it would make the
   * number awkward (a 5 g bolt in tonnes) or the seconds of a specific impulse into years.
   */
  unitFor(si: number, unit: string): string {
    const choice = this.byDimension.get(dimensionKey(unit));
    if (choice === undefined) return unit;
    const preferred = this.preferred(choice);
    if (preferred === AS_ENTERED || (choice.id === 'time' && unit === 's')) return unit;
    const parsed = parseUnit(preferred);
    if (!parsed.ok) return unit;
    const size = Math.abs(fromSi(si, parsed.unit));
    return si === 0 || (size >= 0.1 && size < 1_000_000) ? preferred : unit;
  }

  /** An SI value in words: "39.1 km/s". */
  show(si: number, unit: string, options: ShowOptions = {}): string {
    return formatSi(si, this.unitFor(si, unit), options);
  }

  /** A value of a read model in words; "—" where there is none. */
  shown(value: Shown | null, options: ShowOptions = {}): string {
    if (value === null) return '—';
    return this.show(value.si, value.unit, {
      ...(value.difference ? { temperature: 'difference' as const } : {}),
      ...options,
    });
  }
}

function dimensionKey(unit: string): string {
  const parsed = parseUnit(unit);
  return parsed.ok ? parsed.unit.dimension.key : `unknown unit ${unit}`;
}

function readPreferences(stored: unknown): Preferences | undefined {
  if (typeof stored !== 'object' || stored === null) return undefined;
  const entries = Object.entries(stored).filter((entry): entry is [string, string] =>
    UNIT_CHOICES.some((choice) => choice.id === entry[0] && choice.units.some((unit) => unit === entry[1])),
  );
  return Object.fromEntries(entries);
}
