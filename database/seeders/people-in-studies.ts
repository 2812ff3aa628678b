import { DEMO_PEOPLE } from './demo-people';
import type { Membership } from './script';

function address(name: string): string {
  const person = DEMO_PEOPLE.find((candidate) => candidate.name === name);
  if (!person) throw new Error(`${name} is not among the people of the demonstration`);
  return person.email;
}

export const INES = address('Ines Okafor');
export const MIKA = address('Mika Sato');
export const LENA = address('Lena Brandt');
export const TOMAS = address('Tomas Moreau');
export const ROSA = address('Rosa Adeyemi');

/** Everybody who holds a role takes part in every demonstration study. */
export const DEMO_MEMBERSHIPS: readonly Membership[] = DEMO_PEOPLE.filter((person) => person.roles.length > 0).map(
  ({ email, roles }) => ({ email, roles }),
);
