import type { OverviewView, Quantity, Requirement, Verdict } from '@shared/contract';
import { quantityNode } from '../model';
import { decidingNode, inputQuantities, shownQuantity, turningPointOf } from './turning-points';
import { byKey, provenOf, type ProofSource } from './verdict-view';

const REQUIREMENTS_SHOWN = 6;
const INPUTS_SHOWN = 8;
const MOVES_PER_REQUIREMENT = 2;
/** How many failing requirements are looked at for moves; a study that does not close names its worst. */
const REQUIREMENTS_MOVED = 12;
/** How many inputs of one are tried: those that drive it most locally, whose moves are the shortest. */
const INPUTS_TRIED = 12;

/** Verdicts that a computed value stands behind and that are not held with margin, worst first. */
const THIN: readonly Verdict[] = ['non-compliant', 'indeterminate', 'short margin'];

/** Requirements whose computed value does not hold with margin, worst first: by verdict, then by margin, then by key. */
export function thinRequirements(source: ProofSource, inForce: readonly Requirement[]): Requirement[] {
  const rank = ({ id }: Requirement): number => THIN.indexOf(provenOf(source, id).verdict);
  const percent = ({ id }: Requirement): number => provenOf(source, id).margin?.percent ?? 0;
  return inForce
    .filter((requirement) => rank(requirement) >= 0 && decidingNode(source, requirement) !== null)
    .sort((a, b) => rank(a) - rank(b) || percent(a) - percent(b) || byKey(a, b));
}

/**
 * Which inputs drive the worst requirements. The influence of an input on a requirement is its first-order share of the
 * change of the output, |∂y/∂x · x|; each requirement's influences add up to 1 over all of its inputs.
 */
export function driversOf(source: ProofSource, thin: readonly Requirement[]): OverviewView['drivers'] {
  const shown = thin.slice(0, REQUIREMENTS_SHOWN);
  const columns = shown.map((requirement) => influences(source, requirement));
  const totals = new Map<Quantity, number>();
  for (const column of columns)
    for (const [quantity, share] of column) totals.set(quantity, (totals.get(quantity) ?? 0) + share);
  const strongest = [...totals]
    .sort(([a, x], [b, y]) => y - x || byKey(a, b))
    .slice(0, INPUTS_SHOWN)
    .map(([quantity]) => quantity);
  return {
    requirements: shown.map(({ id, key, title }) => ({ key, title, verdict: provenOf(source, id).verdict })),
    inputs: strongest.map((quantity) => ({
      quantityKey: quantity.key,
      symbol: quantity.symbol,
      name: quantity.name,
      influence: columns.map((column) => column.get(quantity) ?? 0),
    })),
  };
}

function influences(source: ProofSource, requirement: Requirement): Map<Quantity, number> {
  const { model } = source.proof;
  const node = decidingNode(source, requirement);
  const weights = new Map<Quantity, number>();
  if (!node) return weights;
  let total = 0;
  for (const quantity of inputQuantities(source, requirement)) {
    const slope = model.derivative(node, quantityNode(quantity.id));
    const weight = slope === null ? 0 : Math.abs(slope * (quantity.value?.si ?? 0));
    if (!(weight > 0) || !Number.isFinite(weight)) continue;
    weights.set(quantity, weight);
    total += weight;
  }
  for (const [quantity, weight] of weights) weights.set(quantity, weight / total);
  return weights;
}

/**
 * For each requirement that fails or is short of margin, the two inputs that alone would have to move least for it to
 * hold: to the required margin where one applies, else to the limit. Measured by the factor between now and then.
 */
export function movesOf(source: ProofSource, thin: readonly Requirement[]): OverviewView['moves'] {
  return thin
    .filter(({ id }) => provenOf(source, id).verdict !== 'indeterminate')
    .slice(0, REQUIREMENTS_MOVED)
    .flatMap((requirement) => {
      const tried = [...influences(source, requirement)].sort(([, x], [, y]) => y - x).slice(0, INPUTS_TRIED);
      return tried
        .flatMap(([quantity]) => moveOf(source, requirement, quantity) ?? [])
        .sort((a, b) => a.effort - b.effort || a.quantityKey.localeCompare(b.quantityKey))
        .slice(0, MOVES_PER_REQUIREMENT)
        .map(({ effort: _effort, ...move }) => move);
    });
}

function moveOf(
  source: ProofSource,
  requirement: Requirement,
  quantity: Quantity,
): (OverviewView['moves'][number] & { readonly effort: number }) | null {
  const point = turningPointOf(source, requirement, quantity);
  const { required } = provenOf(source, requirement.id);
  const to = required ? point?.atRequired : point?.atLimit;
  if (!point || to === null || to === undefined || to === point.now.si) return null;
  const { effort, decades } = distanceOf(point.now.si, to);
  return {
    key: requirement.key,
    title: requirement.title,
    quantityKey: quantity.key,
    name: quantity.name,
    from: point.now,
    to: shownQuantity(quantity, to),
    decades,
    effort,
  };
}

/** How far a value has to go, by the factor where both are of one sign; `decades` from a factor of ten on. */
function distanceOf(from: number, to: number): { readonly effort: number; readonly decades: number | null } {
  const ratio = to / from;
  if (!(ratio > 0) || !Number.isFinite(ratio)) return { effort: Number.MAX_VALUE, decades: null };
  const decades = Math.abs(Math.log10(ratio));
  // Rounded, so that inputs that are equally far come in the order of their keys and not of the last bit.
  return { effort: Number(decades.toPrecision(9)), decades: decades >= 1 ? decades : null };
}
