import katex from 'katex';
import { nameTex } from './name-tex';
import { parseFormula } from './parse';
import { formulaTex, formulaTexWithValues } from './tex';

function tex(text: string): string {
  const result = parseFormula(text);
  if (!result.ok) throw new Error(result.error.message);
  return formulaTex(result.formula);
}

describe('nameTex', () => {
  it.each([
    ['I_sp', 'I_{sp}'],
    ['g_0', 'g_{0}'],
    ['eps', '\\varepsilon'],
    ['sigma', '\\sigma'],
    ['eta_T', '\\eta_{T}'],
    ['rho', '\\rho'],
    ['Delta_v', '\\Delta v'],
    ['delta_v_LEO', '\\Delta v_{LEO}'],
    ['T1', 'T_{1}'],
    ['m_dot', '\\dot{m}'],
    ['m_dot_p', '\\dot{m}_{p}'],
    ['mdot', '\\dot{m}'],
    ['thrust', '\\mathrm{thrust}'],
    ['a_b_c', 'a_{b,c}'],
    ['x_', 'x'],
    ['_', '?'],
    ['\\href{javascript:1}{x}', '\\mathrm{hrefjavascript1x}'],
  ])('%s', (name, expected) => {
    expect(nameTex(name)).toBe(expected);
  });
});

describe('formulaTex', () => {
  it.each([
    ['I_sp * g_0 * log(m_0 / m_f)', 'I_{sp} \\cdot g_{0} \\cdot \\ln\\left(\\frac{m_{0}}{m_{f}}\\right)'],
    ['(P / A)^(1/4)', '\\left(\\frac{P}{A}\\right)^{1/4}'],
    ['x^2', 'x^{2}'],
    ['(a + b) * c', '\\left(a + b\\right) \\cdot c'],
    ['a - (b - c)', 'a - \\left(b - c\\right)'],
    ['a - b + c', 'a - b + c'],
    ['-(a + b)', '-\\left(a + b\\right)'],
    ['(-x)^2', '\\left(-x\\right)^{2}'],
    ['a * -b', 'a \\cdot \\left(-b\\right)'],
    ['a / (b * c)', '\\frac{a}{b \\cdot c}'],
    ['(a^b)^c', '\\left(a^{b}\\right)^{c}'],
    ['sin(x)^2', '\\left(\\sin\\left(x\\right)\\right)^{2}'],
    ['sqrt(1 - b^2)', '\\sqrt{1 - b^{2}}'],
    ['cbrt(x)', '\\sqrt[3]{x}'],
    ['1.5e-8 * x', '1.5 \\cdot 10^{-8} \\cdot x'],
    ['1e3^2', '\\left(10^{3}\\right)^{2}'],
    ['hypot(a + 1, b)', '\\sqrt{\\left(a + 1\\right)^{2} + b^{2}}'],
    ['log1p(x)', '\\ln\\left(1 + x\\right)'],
    ['2 * expm1(x)', '2 \\cdot \\left(\\exp\\left(x\\right) - 1\\right)'],
    ['a >= b ? a : b', '\\begin{cases} a & \\text{if } a \\ge b \\\\ b & \\text{otherwise} \\end{cases}'],
    ['(a < b) * c', '\\left(a < b\\right) \\cdot c'],
  ])('%s', (text, expected) => {
    expect(tex(text)).toBe(expected);
  });

  it('puts values in place of names, in parentheses where they would be misread', () => {
    const parsed = parseFormula('v^2 / n + a - b');
    if (!parsed.ok) throw new Error('refused');
    const values = new Map([
      ['v', '3\\,\\mathrm{km/s}'],
      ['n', '2'],
      ['a', '-1'],
      ['b', '-4'],
    ]);
    expect(formulaTexWithValues(parsed.formula, (name) => values.get(name) ?? '')).toBe(
      '\\frac{\\left(3\\,\\mathrm{km/s}\\right)^{2}}{2} + \\left(-1\\right) - \\left(-4\\right)',
    );
  });

  it('is TeX that KaTeX sets without trust', () => {
    const texts = [
      'hypot(Delta_v, 2) + abs(x) * floor(y) / ceil(z) - round(eta_T)^2',
      'a < b <= c ? min(a, b) : atan2(asin(x), acosh(y)) ^ log10(z)',
      'expm1(-x) - log2(sign(mdot)) + cbrt(omega_0)',
    ];
    for (const text of texts) {
      expect(() =>
        katex.renderToString(tex(text), { trust: false, strict: 'error', throwOnError: true }),
      ).not.toThrow();
    }
  });
});
