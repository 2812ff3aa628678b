import type { Role } from '@shared/contract';

/** A person of the demonstration. All of them are invented, and their addresses lie under a name reserved for examples. */
export interface DemoPerson {
  readonly name: string;
  readonly email: string;
  /** What the person is in the study, in words, for the list of sign-ins. */
  readonly title: string;
  /** Roles in the demonstration studies; none for the administrator, who has no technical authority. */
  readonly roles: readonly Role[];
  readonly administrator: boolean;
}

/** Published on purpose: demonstration accounts exist only in the demonstration's own database. */
export const DEMO_PASSWORD = 'quartz-ripple-meadow-42';

function person(name: string, title: string, roles: readonly Role[], administrator = false): DemoPerson {
  return {
    name,
    email: `${name.toLowerCase().replace(' ', '.')}@demo.deltaproof.example`,
    title,
    roles,
    administrator,
  };
}

export const DEMO_PEOPLE: readonly DemoPerson[] = [
  person('Ines Okafor', 'requirements owner', ['requirements-owner']),
  person('Mika Sato', 'analyst', ['analyst']),
  person('Lena Brandt', 'board member', ['board-member']),
  person('Tomas Moreau', 'board member', ['board-member']),
  person('Rosa Adeyemi', 'board chair', ['board-chair']),
  person('Piet Halloran', 'reader', ['reader']),
  person('Ada Quist', 'administrator', [], true),
];
