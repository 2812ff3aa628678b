import katex from 'katex';
import { formatNumber } from '@shared/units';
import { numberTex, typedTex, unitTex, valueTex } from './number-tex';

describe('numbers as TeX', () => {
  it.each([
    [6500, '6\\,500'],
    [-4.2, '-4.2'],
    [2e14, '2.0 \\times 10^{14}'],
    [5.6704e-8, '5.67 \\times 10^{-8}'],
  ])('%d', (value, tex) => expect(numberTex(formatNumber(value, 3))).toBe(tex));

  it.each([
    ['120.0', '120.0'],
    ['6500', '6\\,500'],
    ['1 234 567.80', '1\\,234\\,567.80'],
    ['\u22124.2', '-4.2'],
    ['1.5e3', null],
    ['1,000', null],
  ])('keeps the digits of “%s” as typed', (text, tex) => expect(typedTex(text)).toBe(tex));
});

describe('units as TeX', () => {
  it.each([
    ['km/s', '\\mathrm{km/s}'],
    ['W/(m^2 K^4)', '\\mathrm{W/(m^{2}\\,K^{4})}'],
    ['um', '\\mathrm{\\mu{}m}'],
    ['degC', '\\mathrm{^{\\circ}C}'],
    ['%', '\\%'],
    ['1', ''],
    ['', ''],
    ['kohm', '\\mathrm{k\\Omega}'],
    ['g0', '\\mathrm{g_0}'],
    ['m^-2', '\\mathrm{m^{-2}}'],
    ['N*m', '\\mathrm{N{\\cdot}m}'],
  ])('%s', (unit, tex) => {
    expect(unitTex(unit)).toBe(tex);
    expect(() => katex.renderToString(tex, { throwOnError: true, strict: 'error' })).not.toThrow();
  });

  it('follow the number, converted', () => {
    expect(valueTex(39_081.256, 'km/s')).toBe('39.08\\,\\mathrm{km/s}');
    // 300 K = 26.85 °C; a difference of 10 K is one of 10 °C
    expect(valueTex(300, 'degC', { temperature: 'absolute' })).toBe('26.85\\,\\mathrm{^{\\circ}C}');
    expect(valueTex(10, 'degC', { temperature: 'difference' })).toBe('10\\,\\mathrm{^{\\circ}C}');
  });
});
