import type { Model } from '@shared/engine';
import { keptMemory, lineOf, onceTime, typicalTimes, type Line } from '../measure';
import { inputWithCone, modelOf, specOf } from '../ours';
import { CompiledMathjsPeer } from '../peers/compiled-mathjs';
import { SpreadsheetPeer } from '../peers/hyperformula';
import { straightLine } from '../peers/straight-line';
import { layeredStudy, nameOf, startValue, type Study } from '../study';

const WHAT_IFS = 100;

/** An input of the layered study with what is reached from it, and what its lines of the table are called. */
interface Cone {
  readonly title: string;
  readonly input: number;
  readonly nodes: readonly number[];
  readonly checks: number;
  /** Least ratios to the spreadsheet and to mathjs. */
  readonly leastSpreadsheet: number;
  readonly leastMathjs?: number;
}

/** The figures of the layered study: building, memory, cones, what-ifs, full evaluation. */
export async function layeredGroup(): Promise<Line[]> {
  const study = layeredStudy();
  // Parsing, checking, compiling and first evaluation; nothing of the study has been parsed before.
  const ourBuild = onceTime(() => modelOf(specOf(study)));
  const spec = specOf(study);
  const ourMemory = keptMemory(() => modelOf(spec));
  const model = ourMemory.result;
  const cones = [
    coneOf(study, model, 1000, study.inputs.slice(800, 860), { leastSpreadsheet: 200, leastMathjs: 25 }),
    coneOf(study, model, 10, study.inputs.slice(-60), { leastSpreadsheet: 60 }),
  ] as const;

  // The spreadsheet comes last: its heap would slow the garbage collection of the others.
  const others: Line[] = [...whatIfLines(model, cones[0]), ...(await fullLines(study, model))];
  for (const cone of cones) others.push(...(await coneLines(study, model, cone)));

  const theirBuild = onceTime(() => new SpreadsheetPeer(study));
  const sheet = theirBuild.result;
  const lines = cones.map((cone) => spreadsheetLine(model, sheet, cone));
  sheet.close();
  const theirMemory = keptMemory(() => new SpreadsheetPeer(study));
  theirMemory.result.close();

  const build = 'build the layered study: read, check, compile, evaluate';
  const memory = lineOf(
    'memory',
    'memory of the layered study without formula text (MB)',
    ourMemory.mb,
    theirMemory.mb,
    'HyperFormula',
  );
  return [
    ...lines,
    ...others,
    lineOf('build', build, ourBuild.ms, theirBuild.ms, 'HyperFormula', 1),
    { ...memory, target: 'ours ≤ 10 MB', met: ourMemory.mb <= 10 },
  ];
}

function coneOf(
  study: Study,
  model: Model,
  size: number,
  inputs: readonly number[],
  least: Pick<Cone, 'leastSpreadsheet' | 'leastMathjs'>,
): Cone {
  const { input, cone } = inputWithCone(model, inputs, size);
  const inside = new Set(cone);
  const checks = study.checks.filter(({ node }) => inside.has(node)).length;
  const title = `one edit, cone of ${size.toLocaleString('en')} (${cone.length} formulas, ${checks} checks)`;
  return { title, input, nodes: cone, checks, ...least };
}

/** The value an input is set to at the i-th edit: two in turn, so that every edit is one. */
function edited(input: number, i: number): number {
  return startValue(input) + (i % 2 === 0 ? 0.001 : 0.002);
}

function edit(model: Model, input: number): (i: number) => void {
  const name = nameOf(input);
  return (i) => model.set(new Map([[name, edited(input, i)]]));
}

/** Against the peers that are told the cone and its order, which we find ourselves. */
async function coneLines(study: Study, model: Model, cone: Cone): Promise<Line[]> {
  const { title, input } = cone;
  const inside = new Set(cone.nodes);
  const formulas = study.formulas.filter(({ node }) => inside.has(node));
  const checks = study.checks.filter(({ node }) => inside.has(node));
  const values = allValues(study, model);
  const byName = new Map([...values].map((value, node) => [nameOf(node), value]));
  const compiled = new CompiledMathjsPeer(formulas, checks, byName, true);
  const mixed = new CompiledMathjsPeer(formulas, checks, byName, false);
  const run = await straightLine(formulas, checks);
  const [ours = 0, all = 0, some = 0, straight = 0] = typicalTimes([
    edit(model, input),
    (i) => compiled.run(input, edited(input, i)),
    (i) => mixed.run(input, edited(input, i)),
    (i) => {
      values[input] = edited(input, i);
      run(values);
    },
  ]);
  return [
    lineOf('cone', title, ours, all, 'compiled mathjs numbers', cone.leastMathjs),
    lineOf('cone', title, ours, some, 'the same, checks in JavaScript'),
    lineOf('cone', title, ours, straight, 'straight-line JavaScript'),
  ];
}

function spreadsheetLine(model: Model, sheet: SpreadsheetPeer, cone: Cone): Line {
  const { title, input } = cone;
  const [ours = 0, theirs = 0] = typicalTimes([edit(model, input), (i) => sheet.set(input, edited(input, i))]);
  // Both engines must say the same, or the comparison would be of different work.
  edit(model, input)(0);
  sheet.set(input, edited(input, 0));
  for (const node of cone.nodes) {
    const value = model.values([nameOf(node)])[0] as number;
    if (Math.abs(value - sheet.get(node)) > 1e-12 * Math.abs(value))
      throw new Error(`The engines differ at ${nameOf(node)}`);
  }
  return lineOf('cone', title, ours, theirs, 'HyperFormula', cone.leastSpreadsheet);
}

function whatIfLines(model: Model, cone: Cone): Line[] {
  const name = nameOf(cone.input);
  const [incremental = 0, whatIf = 0] = typicalTimes([
    (i) => model.set(new Map([[name, 1.5 + (i % WHAT_IFS) / 1000]])),
    (i) => model.whatIf(new Map([[name, 1.1 + (i % WHAT_IFS) / 1000]]), (changed) => changed.length),
  ]);
  const each = lineOf(
    'what-if',
    '100 what-ifs on the cone of 1,000, each',
    whatIf,
    incremental,
    'one incremental edit',
  );
  return [{ ...each, target: 'ratio ≥ 1/1.5', met: each.ratio >= 1 / 1.5 }];
}

async function fullLines(study: Study, model: Model): Promise<Line[]> {
  const values = allValues(study, model);
  const straight = await straightLine(study.formulas, study.checks);
  const [ours = 0, theirs = 0] = typicalTimes([() => model.recompute(), () => straight(values)]);
  const name = 'full evaluation, 20,000 formulas and 50,000 checks';
  return [{ ...lineOf('full', name, ours, theirs, 'straight-line JavaScript'), target: 'ours ≤ 4 ms', met: ours <= 4 }];
}

function allValues(study: Study, model: Model): Float64Array {
  return model.values([...study.inputs, ...study.formulas.map(({ node }) => node)].map(nameOf));
}
