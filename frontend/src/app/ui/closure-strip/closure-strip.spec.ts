import { TestBed } from '@angular/core/testing';
import { ClosureStrip } from './closure-strip';
import { type StripMark } from './strip-mark';

const MARKS: readonly StripMark[] = [
  { key: 'VEH-002', title: 'Keep initial mass', verdict: 'non-compliant', percent: -3.4 },
  { key: 'VEH-001', title: 'Provide total delta-v', verdict: 'short margin', percent: 2.8 },
  { key: 'RAD-002', title: 'Reject waste heat', verdict: 'indeterminate', percent: 0.7 },
  { key: 'PRP-003', title: 'Disposal demand', verdict: 'no evidence', percent: null },
  { key: 'RAD-001', title: 'Hold temperature', verdict: 'compliant', percent: 9.8 },
];

class NoObserver {
  observe(): void {
    return;
  }
  disconnect(): void {
    return;
  }
}

describe('ClosureStrip', () => {
  beforeAll(() => {
    globalThis.ResizeObserver ??= NoObserver as unknown as typeof ResizeObserver;
    (globalThis as { CSS?: unknown }).CSS ??= { escape: (text: string) => text };
  });

  function strip(marks: readonly StripMark[] = MARKS) {
    const fixture = TestBed.createComponent(ClosureStrip);
    fixture.componentRef.setInput('marks', marks);
    const opened: string[] = [];
    fixture.componentInstance.open.subscribe((key) => opened.push(key));
    fixture.detectChanges();
    const host: HTMLElement = fixture.nativeElement;
    const mark = (key: string) => host.querySelector<SVGElement>(`[data-key="${key}"]`);
    return { fixture, host, opened, mark };
  }

  it('shows every requirement once, names the failing ones and explains only the shapes it uses', () => {
    const { host } = strip();
    expect(host.querySelectorAll('.mark')).toHaveLength(MARKS.length);
    expect([...host.querySelectorAll('.name')].map((name) => name.textContent?.trim())).toEqual([
      'VEH-002 keep initial mass',
    ]);
    expect(host.querySelector('p')?.textContent).toContain('Square: non-compliant.');
    expect(host.querySelector('p')?.textContent).not.toContain('not computable');
  });

  it('opens a requirement by click and by key, and walks the marks with the arrows', () => {
    const { fixture, opened, mark } = strip();
    mark('RAD-002')?.dispatchEvent(new MouseEvent('click', { bubbles: true }));
    mark('VEH-001')?.dispatchEvent(new KeyboardEvent('keydown', { key: 'Enter', bubbles: true }));
    expect(opened).toEqual(['RAD-002', 'VEH-001']);
    // From the left: the lane without numbers, then by margin.
    expect(mark('PRP-003')?.getAttribute('tabindex')).toBe('0');
    mark('PRP-003')?.dispatchEvent(new KeyboardEvent('keydown', { key: 'ArrowRight', bubbles: true }));
    fixture.detectChanges();
    expect(mark('VEH-002')?.getAttribute('tabindex')).toBe('0');
    expect(mark('PRP-003')?.getAttribute('tabindex')).toBe('-1');
  });

  it('says key, title, verdict and margin of a mark', () => {
    expect(strip().mark('VEH-002')?.getAttribute('aria-label')).toBe(
      'VEH-002 Keep initial mass: Non-compliant, margin −3.4\u00a0%',
    );
    expect(strip().mark('PRP-003')?.getAttribute('aria-label')).toBe('PRP-003 Disposal demand: No evidence');
  });
});
