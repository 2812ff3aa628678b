import type { BudgetView } from '@shared/contract';
import { formatSi } from '@shared/units';
import type { ShowNumber } from '../measure/show-number';

const COMBINED: Readonly<Record<string, string>> = {
  sum: 'add up',
  product: 'multiply',
  'root-sum-square': 'combine by root-sum-square',
  smallest: 'count by the smallest',
  largest: 'count by the largest',
};
const NAMED: Readonly<Record<string, string>> = {
  shares: 'Shares',
  demands: 'Demands',
  contributions: 'Contributions',
};

/** What a budget says, in three parts so that the middle one can stand out. */
export interface BudgetSentence {
  readonly before: string;
  readonly strong: string;
  readonly after: string;
}

/** "Demands add up: 36 of 38 km/s shared out, **2 km/s held in reserve**. The budget closes." */
export function budgetSentence(budget: BudgetView, show: ShowNumber = formatSi): BudgetSentence {
  const temperature = budget.difference ? ('difference' as const) : ('absolute' as const);
  const said = (si: number): string => show(si, budget.unit, { temperature });
  const rule = `${NAMED[budget.sense] ?? 'Shares'} ${COMBINED[budget.rule] ?? budget.rule}: `;
  if (budget.allocated === null || budget.reserve === null)
    return { before: rule, strong: budget.problem || 'a share has no number yet', after: '.' };
  const supply = budget.sense === 'contributions';
  const before = supply
    ? `${rule}${said(budget.allocated)} of the ${said(budget.limit)} asked for, `
    : `${rule}${said(budget.allocated)} of ${said(budget.limit)} shared out, `;
  const size = said(Math.abs(budget.reserve));
  const strong =
    budget.reserve >= 0
      ? supply
        ? `${size} to spare`
        : `${size} held in reserve`
      : supply
        ? `${size} missing`
        : `${size} too much`;
  const closes = budget.closes === null ? '' : budget.closes ? ' The budget closes.' : ' The budget does not close.';
  const proposed = budget.shares.some((share) => share.status === 'proposed') && budget.reserveIfAdopted !== null;
  const adopted = proposed
    ? ` With the proposed shares adopted ${said(budget.reserveIfAdopted ?? 0)} would be left.`
    : '';
  return { before, strong, after: `.${closes}${adopted}` };
}
