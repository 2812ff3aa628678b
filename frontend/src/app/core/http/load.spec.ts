import { signal } from '@angular/core';
import { TestBed } from '@angular/core/testing';
import { Subject } from 'rxjs';
import { load } from './load';

describe('load', () => {
  function setup(discard?: (previous: string, next: string) => boolean) {
    const key = signal<string | undefined>(undefined);
    const reads: { key: string; answer: Subject<string> }[] = [];
    const read = (asked: string): Subject<string> => {
      const answer = new Subject<string>();
      reads.push({ key: asked, answer });
      return answer;
    };
    const state = TestBed.runInInjectionContext(() => load(() => key(), read, discard ? { discard } : {}));
    const ask = (next: string | undefined): void => {
      key.set(next);
      TestBed.tick();
    };
    return { state, reads, ask };
  }

  it('reads nothing without a key, then the newest key only', () => {
    const { state, reads, ask } = setup();
    TestBed.tick();
    expect(reads).toHaveLength(0);
    expect(state.loading()).toBe(false);
    ask('r1');
    ask('r2');
    reads[1]?.answer.next('two');
    // The answer to the key that is no longer asked for comes too late.
    reads[0]?.answer.next('one');
    expect(state.value()).toBe('two');
    expect(state.loading()).toBe(false);
  });

  it('keeps the value on screen while a newer one is read and when that fails', () => {
    const { state, reads, ask } = setup();
    ask('r1');
    reads[0]?.answer.next('one');
    ask('r2');
    expect([state.value(), state.loading()]).toEqual(['one', true]);
    reads[1]?.answer.error(new Error('gone'));
    expect(state.value()).toBe('one');
    expect(state.error()?.detail).toBe('gone');
    state.reload();
    TestBed.tick();
    reads[2]?.answer.next('three');
    expect([state.value(), state.error()]).toEqual(['three', undefined]);
  });

  it('never shows one item under the key of another', () => {
    const { state, reads, ask } = setup(() => true);
    ask('VEH-001');
    reads[0]?.answer.next('delta-v');
    ask('VEH-002');
    expect(state.value()).toBeUndefined();
    expect(state.loading()).toBe(true);
  });
});
