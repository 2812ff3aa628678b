import type { Limit, Policy, Requirement, RequiredMargin } from '@shared/contract';
import type { Dimension } from '@shared/units';
import { isTemperature, knownDimension } from './analysis-ports';
import type { Study } from './study';
import { percentBase } from './verdict';

/**
 * The margin that policy asks for (absolute in SI), from the row for the requirement's parameter at the study's
 * maturity: the row's absolute margin where the limit is of its dimension, else its per cent. Null without a row, and
 * where the row has only a per cent and the limit, being zero or on a difference, has none.
 */
export function requiredMargin(study: Study, requirement: Requirement, limit: Limit): RequiredMargin | null {
  if (!requirement.parameter) return null;
  const { maturity } = study.settings;
  const row = study
    .all('policy')
    .find((policy) => policy.parameter === requirement.parameter && policy.maturity === maturity);
  if (!row) return null;
  const { definition, source } = row;
  const dimension = knownDimension(limit.value.unit);
  const base = percentBase(limit, isTemperature(dimension))?.base;
  const absolute = absoluteFor(row, dimension);
  if (absolute !== null)
    return { percent: base === undefined ? null : (absolute / base) * 100, absolute, definition, source };
  if (base === undefined) return null;
  return { percent: row.percent, absolute: (row.percent / 100) * base, definition, source };
}

function absoluteFor({ absolute }: Policy, dimension: Dimension): number | null {
  return absolute && knownDimension(absolute.unit) === dimension ? absolute.si : null;
}
