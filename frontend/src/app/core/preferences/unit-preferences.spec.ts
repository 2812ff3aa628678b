import { TestBed } from '@angular/core/testing';
import { UNIT_CHOICES } from './unit-choices';
import { UnitPreferences } from './unit-preferences';

describe('UnitPreferences', () => {
  const prefer = (units: UnitPreferences, id: string, unit: string): void => {
    const choice = UNIT_CHOICES.find((candidate) => candidate.id === id);
    if (choice === undefined) throw new Error(`no choice ${id}`);
    units.prefer(choice, unit);
  };
  beforeEach(() => localStorage.clear());

  it('shows numbers in the preferred unit of their dimension', () => {
    const units = TestBed.inject(UnitPreferences);
    expect(units.summary()).toEqual(['km/s', 't', 'MW']);
    expect(units.show(39_100, 'm/s')).toMatch(/^39\.1\s?km\/s$/);
    prefer(units, 'speed', 'm/s');
    expect(units.show(39_100, 'km/s')).toMatch(/^39\u2009100\s?m\/s$/);
  });

  it('keeps the unit as entered where the preferred one would make an awkward number', () => {
    const units = TestBed.inject(UnitPreferences);
    expect(units.unitFor(0.005, 'g')).toBe('g');
    expect(units.unitFor(120_000, 'kg')).toBe('t');
    expect(units.unitFor(2e14, 'TW')).toBe('TW');
  });

  it('never turns a specific impulse into years', () => {
    const units = TestBed.inject(UnitPreferences);
    prefer(units, 'time', 'yr');
    expect(units.unitFor(6500, 's')).toBe('s');
    expect(units.unitFor(1.6e8, 'd')).toBe('yr');
  });

  it('forgets a stored unit that is no choice', () => {
    localStorage.setItem('deltaproof.units', JSON.stringify({ mass: 'stone', speed: 'm/s' }));
    expect(TestBed.inject(UnitPreferences).summary()).toEqual(['m/s', 't', 'MW']);
  });

  it('writes a dash where there is no value', () => {
    expect(TestBed.inject(UnitPreferences).shown(null)).toBe('—');
  });
});
