import { mkdtempSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { pathToFileURL } from 'node:url';
import type { Dialect, Study, StudyFormula } from '../study';

/** Statements per function: longer ones are left uncompiled by the JavaScript engine. */
const CHUNK = 150;

type Straight = (values: Float64Array) => number;

/**
 * What a person could write by hand at best: the formulas as JavaScript statements over one array, in the right order,
 * and the checks as comparisons counted up. Written to a module file and imported; gives how many checks hold.
 */
export async function straightLine(formulas: readonly StudyFormula[], checks: Study['checks']): Promise<Straight> {
  const dialect: Dialect = {
    ref: (node) => `v[${node}]`,
    call: (fn, argument) => `Math.${fn}(${argument})`,
    power: (base, exponent) => `Math.pow(${base}, ${exponent})`,
  };
  const statements = [
    ...formulas.map((formula) => `v[${formula.node}] = ${formula.text(dialect)};`),
    ...checks.map(
      ({ node, relation, limit }) => `if (v[${node}] ${relation === 'at-least' ? '>=' : '<='} ${limit}) n++;`,
    ),
  ];
  const functions: string[] = [];
  for (let i = 0; i < statements.length; i += CHUNK) {
    functions.push(`function f${i}(v) {\nlet n = 0;\n${statements.slice(i, i + CHUNK).join('\n')}\nreturn n;\n}`);
  }
  const calls = functions.map((_, i) => `f${i * CHUNK}(v)`);
  // Calls in groups, so that no expression grows too long either.
  const groups: string[] = [];
  for (let i = 0; i < calls.length; i += CHUNK) groups.push(`n += ${calls.slice(i, i + CHUNK).join(' + ')};`);
  const source = `${functions.join('\n')}\nexport function run(v) {\nlet n = 0;\n${groups.join('\n')}\nreturn n;\n}\n`;
  const folder = mkdtempSync(join(tmpdir(), 'bench-'));
  try {
    const file = join(folder, 'straight-line.mjs');
    writeFileSync(file, source);
    const loaded = (await import(pathToFileURL(file).href)) as { run: Straight };
    return loaded.run;
  } finally {
    rmSync(folder, { recursive: true, force: true });
  }
}
