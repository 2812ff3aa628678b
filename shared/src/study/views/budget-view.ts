import type { Budget, BudgetShare, BudgetView, Limit, Requirement } from '@shared/contract';
import {
  DIMENSIONLESS,
  describeDimension,
  describeWithArticle,
  multiplyDimensions,
  siUnitOf,
  type Dimension,
} from '@shared/units';
import { isTemperature, knownDimension } from '../analysis-ports';
import { AT_LIMIT } from '../verdict';
import { byKey, type ProofSource } from './verdict-view';

type Rule = Budget['rule'];
type Sense = Budget['sense'];

/** A child that takes a share, with its share's limit value in SI. */
interface Part {
  readonly key: string;
  readonly limit: Limit | null;
  readonly status: BudgetShare['status'];
  readonly row: BudgetShare;
}

/** The budget of a requirement: shares, what they combine to and what is left, in SI at full precision; null without one. */
export function budgetView({ proof: { study } }: ProofSource, requirement: Requirement): BudgetView | null {
  const { budget, limit } = requirement;
  if (!budget || !limit) return null;
  const { rule, sense } = budget;
  const dimension = knownDimension(limit.value.unit);
  const parts: Part[] = [];
  for (const trace of study.find('trace', 'parentId', requirement.id)) {
    const child = study.get('requirement', trace.childId);
    if (trace.share === 'none' || !child || child.state === 'withdrawn') continue;
    const { key, title } = child;
    const row = {
      traceId: trace.id,
      traceVersion: trace.version,
      key,
      title,
      ...shareValue(child.limit, rule, sense, dimension),
      status: trace.share,
    };
    parts.push({ key, limit: child.limit, status: trace.share, row });
  }
  parts.sort(byKey);
  const adopted = parts.filter(({ status }) => status === 'adopted');
  const bound = boundOf(limit, sense);
  const unfit = problemOf(adopted, rule, dimension);
  const allocated = unfit ? null : combine(rule, valuesOf(adopted));
  const reserve = reserveOf(allocated, bound, sense);
  const all = problemOf(parts, rule, dimension) ? null : combine(rule, valuesOf(parts));
  const wrongWay = adopted.find((part) => part.limit && !fits(part.limit, sense));
  return {
    rule,
    sense,
    unit: limit.value.unit,
    difference: limit.temperature === 'difference' && isTemperature(dimension),
    limit: bound,
    shares: parts.map(({ row }) => row),
    allocated,
    reserve,
    reserveIfAdopted: reserveOf(all, bound, sense),
    closes: reserve === null || wrongWay ? null : reserve >= 0,
    problem: unfit || (wrongWay ? wrongWaySentence(wrongWay, sense) : ''),
  };
}

/** The end of a limit that a budget shares out: the upper end is drawn on, the lower end is supplied. */
function boundOf(limit: Limit, sense: Sense): number {
  return sense !== 'contributions' && limit.upper ? limit.upper.si : limit.value.si;
}

function shareValue(
  limit: Limit | null,
  rule: Rule,
  sense: Sense,
  parent: Dimension,
): Pick<BudgetShare, 'value' | 'unit'> {
  if (!limit) return { value: null };
  if (knownDimension(limit.value.unit) === parent) return { value: boundOf(limit, sense) };
  return rule === 'product' ? { value: boundOf(limit, sense), unit: limit.value.unit } : { value: null };
}

function valuesOf(parts: readonly Part[]): number[] {
  return parts.map(({ row }) => row.value ?? NaN);
}

/** Combines shares in SI; null for a rule that says nothing about no shares at all. */
function combine(rule: Rule, values: readonly number[]): number | null {
  if (values.length === 0 && rule !== 'sum' && rule !== 'root-sum-square') return null;
  switch (rule) {
    case 'sum':
      return values.reduce((sum, value) => sum + value, 0);
    case 'product':
      return values.reduce((product, value) => product * value, 1);
    case 'root-sum-square':
      return Math.hypot(...values);
    case 'smallest':
      return Math.min(...values);
    case 'largest':
      return Math.max(...values);
  }
}

/** What is left, in SI: limit − combined where the limit is drawn on, combined − limit where it is supplied; 0 at the limit. */
function reserveOf(combined: number | null, limit: number, sense: Sense): number | null {
  if (combined === null) return null;
  const reserve = sense === 'contributions' ? combined - limit : limit - combined;
  return Math.abs(reserve) <= AT_LIMIT * Math.abs(limit) ? 0 : reserve;
}

/** Why shares cannot be combined, in a sentence; empty when they can. */
function problemOf(parts: readonly Part[], rule: Rule, dimension: Dimension): string {
  const open = parts.filter(({ limit }) => !limit);
  if (open.length > 0) return `${listed(open)} has no limit yet, so its share is not known.`;
  if (rule === 'product') {
    const product = parts.reduce(
      (all, { limit }) => multiplyDimensions(all, knownDimension(limit?.value.unit ?? '')),
      DIMENSIONLESS,
    );
    if (parts.length === 0 || product === dimension) return '';
    return `the shares multiply to ${describeWithArticle(product)}; the budget is of ${describeDimension(dimension)}.`;
  }
  const other = parts.find(({ limit }) => limit && knownDimension(limit.value.unit) !== dimension);
  if (!other?.limit) return '';
  const actual = knownDimension(other.limit.value.unit);
  return `the limit of ${other.key} is ${describeWithArticle(actual)}; the budget is of ${describeDimension(dimension)}, for example in ${siUnitOf(dimension) || 'plain numbers'}.`;
}

function listed(parts: readonly Part[]): string {
  return parts.map(({ key }) => key).join(', ');
}

/** Shares and demands are bounded from above, contributions from below. */
function fits({ relation }: Limit, sense: Sense): boolean {
  return sense === 'contributions' ? relation !== 'at most' : relation !== 'at least';
}

function wrongWaySentence(part: Part, sense: Sense): string {
  return sense === 'contributions'
    ? `${part.key} is an “at most” limit and promises no contribution; state it as “at least”.`
    : `${part.key} is an “at least” limit and bounds no ${sense === 'demands' ? 'demand' : 'share'}; state it as “at most”.`;
}
