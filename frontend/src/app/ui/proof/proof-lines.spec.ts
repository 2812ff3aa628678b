import { TestBed } from '@angular/core/testing';
import type { ProofLine } from '@shared/contract';
import { ProofLines } from './proof-lines';

const line = (number: number, more: Partial<ProofLine> = {}): ProofLine => ({
  number,
  label: '',
  symbols: 'v_e = g_0\\,I_{sp}',
  numbers: '9.80665 \\times 6500',
  result: { si: 63_743.2, unit: 'km/s' },
  failure: '',
  analysis: 'AN-014',
  ...more,
});

describe('ProofLines', () => {
  async function proof(inputs: Record<string, unknown>): Promise<HTMLElement> {
    const fixture = TestBed.createComponent(ProofLines);
    for (const [name, value] of Object.entries(inputs)) fixture.componentRef.setInput(name, value);
    fixture.detectChanges();
    await fixture.whenStable();
    // The library arrives with the first formula.
    await import('katex');
    await new Promise((resolve) => setTimeout(resolve));
    return fixture.nativeElement;
  }

  it('numbers the lines and typesets symbols and numbers with the result at the right', async () => {
    const host = await proof({ lines: [line(1), line(2, { result: { si: 39_080, unit: 'km/s' } })] });
    expect([...host.querySelectorAll('.index')].map((index) => index.textContent)).toEqual(['1', '2']);
    expect(host.querySelectorAll('.line .katex')).toHaveLength(4);
    expect(host.querySelectorAll('.result')[1]?.textContent).toMatch(/^39\.1\s?km\/s$/);
  });

  it('ends with the comparison and the verdict', async () => {
    const host = await proof({
      lines: [line(1)],
      comparison: { tex: '39.08 \\ge 38.0', text: 'margin +2.8 %, required +5.0 %' },
      verdict: 'short margin',
    });
    expect(host.querySelector('.comparison')?.textContent).toContain('required +5.0 %');
    expect(host.querySelector('.comparison dp-verdict-mark')?.textContent).toContain('Short margin');
  });

  it('says why a line has no result, and names the analyses only where there are several', async () => {
    const host = await proof({
      lines: [line(1), line(2, { result: null, failure: 'Emissivity has no value', analysis: 'AN-002' })],
    });
    expect(host.querySelector('.failure')?.textContent).toBe('Emissivity has no value');
    expect([...host.querySelectorAll('.of')].map((name) => name.textContent)).toEqual(['AN-014', 'AN-002']);
    expect((await proof({ lines: [line(1)] })).querySelector('.of')).toBeNull();
  });

  it('never follows a link that somebody wrote into a formula', async () => {
    const host = await proof({ lines: [line(1, { symbols: '\\href{javascript:alert(1)}{x}', numbers: '' })] });
    expect(host.querySelector('a')).toBeNull();
  });
});
