import type { Limit, Quantity, Requirement, RequiredMargin, Shown, TurningPoint } from '@shared/contract';
import { nameTex } from '@shared/formula';
import { quantityKind } from '@shared/methods';
import { outputNode, quantityNode } from '../model';
import { decidingOutput } from './proof-view';
import { byKey, provenOf, type ProofSource } from './verdict-view';

/** Inputs shown on a sheet; those that need move least come first. */
const SHOWN_AT_MOST = 12;

/** A quantity's value (SI) in the unit that its author typed. */
export function shownQuantity(quantity: Quantity, si: number): Shown {
  const unit = quantity.value?.unit ?? quantity.unit;
  return quantity.temperature === 'difference' ? { si, unit, difference: true } : { si, unit };
}

/** Quantities with a value that a requirement's deciding output rests on, by key. */
export function inputQuantities(source: ProofSource, requirement: Requirement): Quantity[] {
  const node = decidingNode(source, requirement);
  if (!node) return [];
  const { study, model } = source.proof;
  return model
    .inputsOf(node)
    .flatMap((id) => (id.startsWith('q:') ? [study.get('quantity', id.slice(2))] : []))
    .filter((quantity) => quantity !== undefined)
    .filter((quantity) => quantity.value !== null)
    .sort(byKey);
}

/** Model node of the output that decides a requirement, if it has an outcome. */
export function decidingNode(source: ProofSource, requirement: Requirement): string | null {
  const deciding = decidingOutput(source, requirement);
  if (!deciding) return null;
  const node = outputNode(deciding.analysis.id, deciding.output);
  const { model } = source.proof;
  return model.has(node) && model.outcome(node).ok ? node : null;
}

/** Output values (SI) at which the limit is reached. */
function limitTargets(limit: Limit): number[] {
  switch (limit.relation) {
    case 'at least':
    case 'at most':
      return [limit.value.si];
    case 'between':
      return limit.upper ? [limit.value.si, limit.upper.si] : [limit.value.si];
    case 'equal within': {
      const tolerance = limit.tolerance?.si ?? 0;
      return [limit.value.si - tolerance, limit.value.si + tolerance];
    }
  }
}

/** Output values (SI) at which the required margin is reached: the limit's, moved towards the good side. */
function requiredTargets(limit: Limit, required: RequiredMargin): number[] {
  const [low, high] = limitTargets(limit);
  if (low === undefined) return [];
  if (high !== undefined) return [low + required.absolute, high - required.absolute];
  return [limit.relation === 'at least' ? low + required.absolute : low - required.absolute];
}

/**
 * Value (SI) of one input nearest to the present one at which the output reaches one of the targets; null when none is
 * reached within the physical bounds of the quantity's kind.
 */
function turningValue(
  { proof: { model } }: ProofSource,
  node: string,
  quantity: Quantity,
  targets: readonly number[],
): number | null {
  const bounds = quantity.kind ? quantityKind(quantity.kind)?.bounds : null;
  const now = quantity.value?.si ?? 0;
  let nearest: number | null = null;
  for (const target of targets) {
    const found = model.turningPoint(node, quantityNode(quantity.id), target, { min: bounds?.min, max: bounds?.max });
    if (found === null) continue;
    if ((bounds?.minExclusive && found === bounds.min) || (bounds?.maxExclusive && found === bounds.max)) continue;
    if (nearest === null || Math.abs(found - now) < Math.abs(nearest - now)) nearest = found;
  }
  return nearest;
}

/** Where one input has to go for the limit, and for the required margin, to be reached exactly; all other inputs as they are. */
export function turningPointOf(source: ProofSource, requirement: Requirement, quantity: Quantity): TurningPoint | null {
  const node = decidingNode(source, requirement);
  const { limit } = requirement;
  if (!node || !limit || !quantity.value) return null;
  const { required } = provenOf(source, requirement.id);
  const atLimit = turningValue(source, node, quantity, limitTargets(limit));
  const now = quantity.value.si;
  return {
    quantityKey: quantity.key,
    symbol: quantity.symbol,
    tex: nameTex(quantity.symbol),
    name: quantity.name,
    now: shownQuantity(quantity, now),
    atLimit,
    atRequired: required ? turningValue(source, node, quantity, requiredTargets(limit, required)) : null,
    percent: atLimit === null || now === 0 ? null : ((atLimit - now) / Math.abs(now)) * 100,
  };
}

/** Turning points of all inputs of a requirement, the smallest change first, the unreachable last; 12 at most. */
export function turningPoints(source: ProofSource, requirement: Requirement): TurningPoint[] {
  const points = inputQuantities(source, requirement).flatMap(
    (quantity) => turningPointOf(source, requirement, quantity) ?? [],
  );
  return points.sort((a, b) => distance(a) - distance(b)).slice(0, SHOWN_AT_MOST);
}

/** Change to the limit, to sort by: an unknown per cent comes after known ones, an unreachable limit last. */
function distance({ percent, atLimit }: TurningPoint): number {
  if (percent !== null) return Math.abs(percent);
  return atLimit === null ? Number.MAX_VALUE : Number.MAX_VALUE / 2;
}
