import { TestBed } from '@angular/core/testing';
import { EmptyState } from './empty-state';

describe('EmptyState', () => {
  it('says what is not there and what to do first', () => {
    const fixture = TestBed.createComponent(EmptyState);
    fixture.componentRef.setInput('title', 'No analyses yet.');
    fixture.componentRef.setInput('first', 'Write a formula or take a method.');
    fixture.detectChanges();
    const host: HTMLElement = fixture.nativeElement;
    expect(host.querySelector('h2')?.textContent).toBe('No analyses yet.');
    expect(host.querySelector('p')?.textContent).toBe('Write a formula or take a method.');
  });
});
