import { compile } from 'mathjs/number';
import { FORMULA_DIALECT, nameOf, type Study, type StudyFormula } from '../study';

interface Step {
  readonly name: string;
  readonly code: { evaluate(scope: Map<string, number>): unknown };
}

/**
 * The formulas of a cone compiled by mathjs's build for numbers, evaluated one after the other into one scope. The
 * checks are compiled, too, as in the spreadsheet, or left to JavaScript, which is the fastest one could do.
 */
export class CompiledMathjsPeer {
  holding = 0;
  private readonly scope: Map<string, number>;
  private readonly steps: readonly Step[];
  private readonly compiledChecks: readonly Step[];
  private readonly plainChecks: readonly { readonly name: string; readonly atLeast: boolean; readonly limit: number }[];

  constructor(
    formulas: readonly StudyFormula[],
    checks: Study['checks'],
    values: ReadonlyMap<string, number>,
    compileChecks: boolean,
  ) {
    this.scope = new Map(values);
    this.steps = formulas.map((formula) => ({
      name: nameOf(formula.node),
      code: compile(formula.text(FORMULA_DIALECT)),
    }));
    const named = checks.map(({ node, relation, limit }) => ({
      name: nameOf(node),
      atLeast: relation === 'at-least',
      limit,
    }));
    const text = ({ name, atLeast, limit }: (typeof named)[number]): string =>
      `${name} ${atLeast ? '>=' : '<='} ${limit}`;
    this.compiledChecks = compileChecks ? named.map((check) => ({ name: check.name, code: compile(text(check)) })) : [];
    this.plainChecks = compileChecks ? [] : named;
  }

  run(input: number, value: number): void {
    this.scope.set(nameOf(input), value);
    for (const { name, code } of this.steps) this.scope.set(name, code.evaluate(this.scope) as number);
    let holding = 0;
    for (const { code } of this.compiledChecks) if (code.evaluate(this.scope) === true) holding++;
    for (const { name, atLeast, limit } of this.plainChecks) {
      const x = this.scope.get(name) as number;
      if (atLeast ? x >= limit : x <= limit) holding++;
    }
    this.holding = holding;
  }
}
