import { DestroyRef } from '@angular/core';
import { TestBed } from '@angular/core/testing';
import { FormControl, FormGroup } from '@angular/forms';
import { provideHttpClient } from '@angular/common/http';
import { Drafts } from './drafts';

describe('Drafts', () => {
  beforeEach(() => {
    localStorage.clear();
    jest.useFakeTimers();
    TestBed.configureTestingModule({ providers: [provideHttpClient()] });
  });
  afterEach(() => jest.useRealTimers());

  const form = () => new FormGroup({ title: new FormControl(''), limit: new FormControl('') });

  it('brings back what was typed, even what was wrong, until it is discarded', () => {
    const drafts = TestBed.inject(Drafts);
    const owner = TestBed.inject(DestroyRef);
    const first = form();
    expect(drafts.follow('requirement', first, owner)).toBe(false);
    first.controls.limit.markAsDirty();
    first.controls.limit.setValue('38 kilometres');
    jest.advanceTimersByTime(400);

    const second = form();
    expect(drafts.follow('requirement', second, owner)).toBe(true);
    expect(second.value.limit).toBe('38 kilometres');

    drafts.discard('requirement');
    expect(drafts.saved('requirement')).toBeNull();
  });
});
