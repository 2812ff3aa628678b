import { TestBed } from '@angular/core/testing';
import { VERDICTS } from '@shared/contract';
import { VerdictMark } from './verdict-mark';
import { WORST_FIRST } from './verdict-words';

describe('VerdictMark', () => {
  it('draws a different mark for each verdict and says its word', () => {
    const drawings = VERDICTS.map((verdict) => {
      const fixture = TestBed.createComponent(VerdictMark);
      fixture.componentRef.setInput('verdict', verdict);
      fixture.detectChanges();
      const host: HTMLElement = fixture.nativeElement;
      expect(host.textContent?.trim().toLowerCase()).toBe(verdict);
      return host.querySelector('path')?.getAttribute('d');
    });
    expect(new Set(drawings).size).toBe(VERDICTS.length);
  });

  it('keeps the word for screen readers where it is not shown', () => {
    const fixture = TestBed.createComponent(VerdictMark);
    fixture.componentRef.setInput('verdict', 'no evidence');
    fixture.componentRef.setInput('showWord', false);
    fixture.detectChanges();
    const word: HTMLElement | null = fixture.nativeElement.querySelector('.word');
    expect(word?.textContent).toBe('No evidence');
    expect(word?.classList).toContain('only-heard');
  });

  it('orders every verdict once, worst first', () => {
    expect([...WORST_FIRST].sort()).toEqual([...VERDICTS].sort());
    expect(WORST_FIRST[0]).toBe('non-compliant');
    expect(WORST_FIRST.at(-1)).toBe('compliant');
  });
});
