import type { Role } from '@shared/contract';

/**
 * What a role is called on screen. The same words as ROLE_NAMES of the contract, which the first load does without
 * because its module brings the schema library along; a spec keeps the two equal.
 */
export function roleName(role: Role): string {
  const words = role.replaceAll('-', ' ');
  return words.charAt(0).toUpperCase() + words.slice(1);
}

/** Several roles in one phrase: "Analyst, board member"; empty for none. */
export function roleList(roles: readonly Role[]): string {
  return roles.map((role, index) => (index === 0 ? roleName(role) : roleName(role).toLowerCase())).join(', ');
}
