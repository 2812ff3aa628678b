import { signal } from '@angular/core';
import { TestBed } from '@angular/core/testing';
import { Waiting } from './waiting';

describe('Waiting', () => {
  it('says that it reads, then why it could not, with a way to try again', () => {
    const error = signal<{ title: string; detail: string; status: number } | undefined>(undefined);
    let reloads = 0;
    const fixture = TestBed.createComponent(Waiting);
    fixture.componentRef.setInput('state', { loading: () => true, error, reload: () => (reloads += 1) });
    fixture.detectChanges();
    const host: HTMLElement = fixture.nativeElement;
    expect(host.querySelector('[role="status"]')?.textContent).toBe('Reading …');

    error.set({ title: 'The server cannot be reached.', detail: '', status: 0 });
    fixture.detectChanges();
    expect(host.querySelector('[role="alert"]')?.textContent).toContain('cannot be reached');
    host.querySelector('button')?.click();
    expect(reloads).toBe(1);

    error.set({ title: 'Not found', detail: 'There is no VEH-999.', status: 404 });
    fixture.detectChanges();
    expect(host.querySelector('button')).toBeNull();
  });
});
