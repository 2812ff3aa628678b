import type { RequirementSheet } from '@shared/contract';

/** Where a requirement stands in the procedure: "baselined in B2 · changes go through the board". */
export function stateLine(
  sheet: Pick<RequirementSheet, 'state' | 'baselinedIn' | 'owner' | 'coOwners' | 'level' | 'element'>,
): string {
  const people = [sheet.owner, ...sheet.coOwners].map((person) => person.name).join(', ');
  return [stateWords(sheet), sheet.level, sheet.element?.name ?? 'allocated to no element', `owned by ${people}`]
    .filter((part) => part !== '')
    .join(' · ');
}

function stateWords({ state, baselinedIn }: Pick<RequirementSheet, 'state' | 'baselinedIn'>): string {
  if (state !== 'baselined') return state;
  return `${baselinedIn === null ? 'baselined' : `baselined in ${baselinedIn}`} · changes go through the board`;
}
