import type { Role } from '@shared/contract';

/** Who is signed in, as read from the database for this request. */
export interface SignedInPerson {
  readonly id: string;
  readonly name: string;
  readonly email: string;
  readonly administrator: boolean;
}

/** The study that a request is about, and the person's roles in it at this moment. */
export interface StudyAccess {
  readonly id: string;
  readonly key: string;
  readonly name: string;
  readonly revision: number;
  /** Empty only for an administrator who is not a member. */
  readonly roles: readonly Role[];
}

/** Who may call a route outside any study. */
export type Permission = 'public' | 'signed-in' | 'administrator';

/** Who may call a route inside a study: any member, members with one of the roles, or administrators. */
export type StudyPermission =
  'member' | 'administrator' | 'member-or-administrator' | { readonly anyOf: readonly Role[] };
