/**
 * Texts that must never become a formula, by what they try. Used by tests only; kept as data so that other layers
 * (queries, imports) can be tried with the same texts.
 */
export const HOSTILE_FORMULAS: Readonly<Record<string, readonly string[]>> = {
  'names of the language': [
    'constructor', 'prototype', '__proto__', 'toString', 'valueOf', 'hasOwnProperty', 'isPrototypeOf', '__defineGetter__',
    '__lookupSetter__', 'propertyIsEnumerable', 'toLocaleString', 'arguments', '__dirname', 'constructor(1)', 'toString()',
    'valueOf(1)', '__proto__ + 1', 'hasOwnProperty(x)', '1 + constructor', 'constructor(constructor)',
  ],
  'parts of objects': [
    'x.y', 'x.constructor', 'a.b.c', 'cos.constructor("return process")()', 'x["y"]', "x['constructor']", 'sqrt.x',
    'x.__proto__.y', '(1).constructor', 'x .y', 'x. y', 'sin.transform', 'x?.y', '1..toString()', 'x.toString()',
  ],
  'assignments and definitions': [
    'x = 1', 'f(x) = x^2', 'x := 1', 'x += 1', 'a = b = 2', 'sqrt(x) = 2', 'x.y = 1', 'x[1] = 2', 'pi = 3', 'f() = 1',
    '(x = 2) + x', 'f(f) = f(f)', 'x == 1 = 2', 'sin = cos', 'x = (y = 2)', 'f(x) = x; f(2)',
  ],
  'lists, ranges, objects': [
    '[1, 2, 3]', '[1:3]', '1:3', '0:1e9', '1:2:10', 'x[1]', 'x[1:2]', '[[1, 2], [3, 4]]', '{a: 1}', '{}', '{"a": 1}.a',
    'a:b', '[]', 'range(0, 1e9)', 'sum(1:1e7)', 'zeros(6000, 6000)', 'ones(1e5, 1e5)', 'x ? 1', 'x : 1', 'max([1, 2])',
    '{a: {b: 1}}', '[1; 2]', 'identity(1e4)', ':', '1:', '(1:3)', 'sqrt(1:3)',
  ],
  'text and comments': [
    '"text"', "'text'", '`text`', '"a" + 1', 'concat("a", "b")', '1 # comment', '# comment', '1 // 2', '/* 1 */', '"',
    "'", 'eval("1")', 'parse("1 + 1")', 'evaluate("1")', 'x\'', "x''", '\\', '1 \\ 2', 'format(1/3, 1e9)', '"\\u0041"',
  ],
  'several statements': ['1; 2', '1\n2', 'a;', ';', '1\r\n2', '(1; 2)', '1 \n + 2', '\n', 'a\u2028b', 'a\u2029b', '1,2', ',', '1,'],
  'other operators': [
    'x!', '5!', '170!', 'x % 2', '5%', '10 % 3', 'x and y', 'x or y', 'not x', 'x xor y', 'x & y', 'x | y', '~x', 'x << 2',
    'x >> 2', 'x >>> 2', 'x .* y', 'x ./ y', 'x .^ y', 'x mod 2', 'x to y', '5 cm to inch', 'x in y', '2 ** 3', 'x <> y',
    '!x', 'x && y', 'x || y', 'x => y', 'x -> y', 'x ?? y', '@x', '$x', 'x@y', 'x === y', 'x !== y', 'x |> y',
  ],
  'silent multiplication and units': [
    '2x', '2 x', 'a b', '5 cm', '(2)(3)', '2(3)', '(a)b', '(a)2', '6 500', '5 m/s', '3 kg', '0x10', '0b11', '0o7', '1e',
    '2 sqrt(4)', 'sqrt(4) 2', 'f(x)(y)', 'sqrt(4)(2)', '5 degC', '1.2.3', '1e5.5', 'sqrt(2)sqrt(2)', '10i', '1_000',
  ],
  'values without a finite number': [
    'Infinity', '-Infinity', 'NaN', 'null', 'undefined', 'true', 'false', '1e400', '1e-400', '-1e999', '1e309', '5e-325',
    'uninitialized', '1e99999999', '0.000e-5 + 2e-999', '1e400 - 1e400', 'end', 'x == true',
  ],
  'functions that are not on the list': [
    'import(1)', 'createUnit(1)', 'config(1)', 'typed(1)', 'parser()', 'help(sin)', 'compile(1)', 'factorial(1e5)',
    'gamma(1e5)', 'bignumber(2)^bignumber(1e9)', 'nthRoots(1, 5e6)', 'setPowerset(1)', 'random()', 'derivative(x, x)',
    'simplify(x)', 'rationalize(x)', 'reviver(1)', 'chain(1)', 'print(1)', 'map(1, 2)', 'forEach(1, 2)', 'filter(1, 2)',
    'unit(5)', 'complex(1, 2)', 'fraction(1, 3)', 'f(x)', 'x(2)', 'Function(1)', 'eval(1)', 'require(1)', 'process(1)',
    'fetch(1)', 'SQRT(4)', 'Math(1)', 'ln(2)', 'pow(2, 3)', 'if(1, 2, 3)', 'while(1)', 'resolve(x)', 'equal(1, 2)',
  ],
  'wrong arguments': ['sqrt()', 'sqrt(1, 2)', 'log(1, 2)', 'min(1)', 'max()', 'atan2(1)', 'sqrt', 'sin + 1', 'exp exp', 'min', 'abs(,)', 'abs(1,)'],
  'broken syntax': [
    '', ' ', '\t', '(', ')', '()', '(1', '1)', '((1)', '1 +', '* 2', '1 + * 2', '1 */ 2', '+', '-', '^', '^2', '2^', '?', '1 ?', '1 ? 2',
    '1 ? 2 :', '? 1 : 2', '<', '1 <', '< 1', '1 < < 2', ')(', '.', '..', '1 + ()', '(,)', '1 + (2,3)',
  ],
  'hidden and foreign characters': [
    'a\u200bb', '\u202e1 + 2', 'x\u0000', '\u0000', '\ufeff1', 'a\u00adb', '\u03b1 + 1', '\u0430 + 1', '\uff11 + 1', '\u0661',
    '\ud800', '\u{1d465}', 'x\u0301', '\u221ax', 'x\u00b2', '\u221e', '1\u066b5', '\u2215', 'a\u2062b', '<script>', '\u00bd', '\u007f',
  ],
};

/** Texts that make an unguarded parser work hard: deep, long, or both. */
export function heavyFormulas(): string[] {
  return [
    '('.repeat(400) + '1' + ')'.repeat(400),
    '('.repeat(31) + '1' + ')'.repeat(31),
    '-'.repeat(1999) + '1',
    '1' + '+1'.repeat(999),
    '1' + '^1'.repeat(21),
    '1?'.repeat(400) + '1' + ':1'.repeat(400),
    'sqrt('.repeat(300) + '1' + ')'.repeat(300),
    'sqrt('.repeat(31) + '1' + ')'.repeat(31),
    '1<'.repeat(900) + '1',
    'a'.repeat(2001),
    '9'.repeat(2000),
    '1'.repeat(400),
    ' '.repeat(2001),
    '+-'.repeat(900) + '1',
    '((((1)))'.repeat(200),
    'min(' + '1,'.repeat(500) + '1)',
    '1e'.repeat(900),
    '.'.repeat(2000),
    '[['.repeat(900),
    `0.${'0'.repeat(400)}1`,
  ];
}
