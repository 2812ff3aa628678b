import * as z from 'zod';
import { Role } from './roles';

const Id = z.uuid('must be an identifier as the server gave it');
const Token = z.string().regex(/^[A-Za-z0-9_-]{43}$/, 'must be the code of a link that was sent by mail');
const Version = z.int().min(1);

/** One mail address and nothing else: no display name, list, quotes or control characters. */
export const EmailAddress = z
  .email('must be one mail address such as name@example.org')
  .max(254)
  .regex(/^[^\s"',;<>()\\]+$/, 'must be one mail address such as name@example.org');
export const PersonName = z
  .string()
  .trim()
  .min(1, 'must not be empty')
  .max(200)
  .regex(/^[^\p{Cc}\p{Zl}\p{Zp}]*$/u, 'must be one line of text');
/** Any characters; length alone is asked for, and the server also refuses the commonest ones. */
export const NewPassword = z
  .string()
  .min(8, 'must have at least 8 characters')
  .max(128, 'must have at most 128 characters');
export const StudyKey = z.string().regex(/^[A-Za-z0-9][A-Za-z0-9-]{0,62}$/, 'must be the key of a study');
const Roles = z
  .array(Role)
  .max(5)
  .refine((roles) => new Set(roles).size === roles.length, 'must name each role once');

export const SessionPerson = z.strictObject({
  id: Id,
  name: z.string(),
  email: z.string(),
  administrator: z.boolean(),
});
export type SessionPerson = z.infer<typeof SessionPerson>;

export const StudyReference = z.strictObject({ id: Id, key: z.string(), name: z.string() });
export const MembershipAnswer = z.strictObject({ study: StudyReference, roles: z.array(Role) });
export type MembershipAnswer = z.infer<typeof MembershipAnswer>;

/** Who is signed in, and with which roles in which studies. */
export const SessionAnswer = z.strictObject({
  person: SessionPerson,
  memberships: z.array(MembershipAnswer),
  demonstration: z.boolean(),
});
export type SessionAnswer = z.infer<typeof SessionAnswer>;

export const SignIn = z.strictObject({ email: z.string().min(1).max(254), password: z.string().min(1).max(128) });
export type SignIn = z.infer<typeof SignIn>;

export const PasswordResetRequest = z.strictObject({ email: EmailAddress });
export const PasswordResetCompletion = z.strictObject({ token: Token, password: NewPassword });
/** Accepting an invitation; the link of the first administrator also asks for `email` and `name`. */
export const InvitationAcceptance = z.strictObject({
  token: Token,
  password: NewPassword,
  name: PersonName.optional(),
  email: EmailAddress.optional(),
});
export type InvitationAcceptance = z.infer<typeof InvitationAcceptance>;

/** One of a person's own open sessions. */
export const OwnSession = z.strictObject({
  id: Id,
  current: z.boolean(),
  startedAt: z.iso.datetime(),
  lastSeenAt: z.iso.datetime(),
});
export type OwnSession = z.infer<typeof OwnSession>;
export const OwnSessions = z.strictObject({ sessions: z.array(OwnSession) });

/** A person as the administrator sees them. */
export const PersonAnswer = z.strictObject({
  id: Id,
  name: z.string(),
  email: z.string(),
  administrator: z.boolean(),
  disabled: z.boolean(),
  /** True until the invitation has been accepted. */
  invited: z.boolean(),
  version: Version,
  memberships: z.array(MembershipAnswer),
});
export type PersonAnswer = z.infer<typeof PersonAnswer>;
/** All people, and all studies in which roles can be granted. */
export const PeopleAnswer = z.strictObject({ people: z.array(PersonAnswer), studies: z.array(StudyReference) });
export type PeopleAnswer = z.infer<typeof PeopleAnswer>;

export const Invitation = z.strictObject({
  name: PersonName,
  email: EmailAddress,
  memberships: z
    .array(z.strictObject({ study: StudyKey, roles: Roles.min(1, 'must name at least one role') }))
    .max(100),
});
export type Invitation = z.infer<typeof Invitation>;

export const PersonChange = z
  .strictObject({
    version: Version,
    name: PersonName.optional(),
    administrator: z.boolean().optional(),
    disabled: z.boolean().optional(),
  })
  .refine((change) => Object.keys(change).length > 1, 'must change at least one of name, administrator, disabled');
export type PersonChange = z.infer<typeof PersonChange>;

/** The full set of roles a person is to have in a study; none removes the person from it. */
export const MemberRoles = z.strictObject({ roles: Roles });

export const StudyMember = z.strictObject({ id: Id, name: z.string(), roles: z.array(Role) });
export type StudyMember = z.infer<typeof StudyMember>;
export const StudyMembers = z.strictObject({ members: z.array(StudyMember) });

/** What the product says about itself before anybody signs in. */
export const About = z.strictObject({ name: z.string(), version: z.string(), demonstration: z.boolean() });

/** Mails that the built-in catcher received; demonstration mode only. */
export const DemonstrationMail = z.strictObject({
  id: z.string(),
  to: z.array(z.string()),
  subject: z.string(),
  text: z.string(),
  at: z.iso.datetime(),
});
export type DemonstrationMail = z.infer<typeof DemonstrationMail>;
export const DemonstrationMails = z.strictObject({ mails: z.array(DemonstrationMail) });
