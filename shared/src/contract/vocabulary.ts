/** Closed lists of words that schemas, entities and screens share. */
export const BUDGET_RULES = ['sum', 'product', 'root-sum-square', 'smallest', 'largest'] as const;
/** How children relate to the parent's limit: shares of it, demands drawn on it, or contributions that supply it. */
export const BUDGET_SENSES = ['shares', 'demands', 'contributions'] as const;
export const BASES = ['measured', 'calculated', 'estimated', 'allocated', 'assumed'] as const;
export const VERIFICATION_METHODS = ['analysis', 'test', 'inspection', 'demonstration', 'review of design'] as const;
export const VERDICTS = [
  'compliant',
  'short margin',
  'indeterminate',
  'non-compliant',
  'not computable',
  'no evidence',
] as const;
export const COMPLIANCES = ['yes', 'partial', 'no', 'not assessed'] as const;
export type Verdict = (typeof VERDICTS)[number];
export type Compliance = (typeof COMPLIANCES)[number];
