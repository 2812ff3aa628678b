import * as z from 'zod';

/** The roles a person can hold in one study. Administrator is a property of the person, not of a study, and gives no technical authority. */
export const ROLES = ['requirements-owner', 'analyst', 'board-member', 'board-chair', 'reader'] as const;
export const Role = z.enum(ROLES);
export type Role = z.infer<typeof Role>;

/** What each role is called on screen and in exports. */
export const ROLE_NAMES: Readonly<Record<Role, string>> = {
  'requirements-owner': 'Requirements owner',
  analyst: 'Analyst',
  'board-member': 'Board member',
  'board-chair': 'Board chair',
  reader: 'Reader',
};
