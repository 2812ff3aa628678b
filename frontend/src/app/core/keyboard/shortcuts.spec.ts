import { EnvironmentInjector, createEnvironmentInjector, runInInjectionContext } from '@angular/core';
import { TestBed } from '@angular/core/testing';
import { Shortcuts } from './shortcuts';

describe('Shortcuts', () => {
  const press = (key: string, more: KeyboardEventInit = {}, on: EventTarget = document.body): void => {
    on.dispatchEvent(new KeyboardEvent('keydown', { key, bubbles: true, cancelable: true, ...more }));
  };

  function setup() {
    localStorage.clear();
    const shortcuts = TestBed.inject(Shortcuts);
    const page = createEnvironmentInjector([], TestBed.inject(EnvironmentInjector));
    const done: string[] = [];
    const offer = (keys: string): void =>
      runInInjectionContext(page, () =>
        shortcuts.register([{ keys, label: keys, group: 'Test', run: () => done.push(keys) }]),
      );
    return { shortcuts, page, done, offer };
  }

  it('runs a key until its page goes', () => {
    const { page, done, offer } = setup();
    offer('n');
    press('n');
    page.destroy();
    press('n');
    expect(done).toEqual(['n']);
  });

  it('leaves single characters to whoever is typing, but not held keys', () => {
    const { done, offer } = setup();
    offer('n');
    offer('Ctrl+k');
    const box = document.body.appendChild(document.createElement('input'));
    press('n', {}, box);
    press('k', { ctrlKey: true }, box);
    box.remove();
    expect(done).toEqual(['Ctrl+k']);
  });

  it('can be told to ignore single characters everywhere', () => {
    const { shortcuts, done, offer } = setup();
    offer('?');
    shortcuts.singleKeys.set(false);
    press('?');
    expect(done).toEqual([]);
  });
});
