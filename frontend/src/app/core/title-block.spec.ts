import { EnvironmentInjector, createEnvironmentInjector, runInInjectionContext, signal } from '@angular/core';
import { TestBed } from '@angular/core/testing';
import { TitleBlock } from './title-block';

describe('TitleBlock', () => {
  it('shows the newest page, main action last, and the one below again when it goes', () => {
    const block = TestBed.inject(TitleBlock);
    const page = createEnvironmentInjector([], TestBed.inject(EnvironmentInjector));
    const sheet = createEnvironmentInjector([], TestBed.inject(EnvironmentInjector));
    const run = (): void => undefined;
    runInInjectionContext(page, () => {
      block.register({
        actions: () => [
          { label: 'Write', main: true, run },
          { label: 'Import', run },
        ],
      });
    });
    expect(block.actions().map((action) => action.label)).toEqual(['Import', 'Write']);
    const name = signal('VEH-001');
    runInInjectionContext(sheet, () => block.register({ name }));
    expect([block.sheetName(), block.actions()]).toEqual(['VEH-001', []]);
    name.set('VEH-002');
    expect(block.sheetName()).toBe('VEH-002');
    sheet.destroy();
    expect([block.sheetName(), block.actions().length]).toEqual([undefined, 2]);
  });
});
