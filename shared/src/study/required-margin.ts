import type { Limit, Requirement, RequiredMargin } from '@shared/contract';
import { isTemperature, knownDimension } from './analysis-ports';
import type { Study } from './study';
import { percentBase } from './verdict';

/** The margin that policy asks for, from the row for the requirement's parameter at the study's maturity; null where no row or no per cent applies. */
export function requiredMargin(study: Study, requirement: Requirement, limit: Limit): RequiredMargin | null {
  if (!requirement.parameter) return null;
  const { maturity } = study.settings;
  const row = study
    .all('policy')
    .find((policy) => policy.parameter === requirement.parameter && policy.maturity === maturity);
  const base = row && percentBase(limit, isTemperature(knownDimension(limit.value.unit)));
  return row && base
    ? {
        percent: row.percent,
        absolute: (row.percent / 100) * base.base,
        definition: row.definition,
        source: row.source,
      }
    : null;
}
