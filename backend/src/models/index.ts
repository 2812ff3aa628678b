import { Membership } from './membership';
import { OneTimeToken } from './one-time-token';
import { OutgoingMail } from './outgoing-mail';
import { PeopleAuditLine } from './people-audit-line';
import { Person } from './person';
import { Study } from './study';
import { studyRowModels } from './study-rows';

export { Membership, OneTimeToken, OutgoingMail, PeopleAuditLine, Person, Study };

/** Every model of the product; registering a class here is all that a new table needs on the server's side. */
export const models = [Study, Person, Membership, OneTimeToken, PeopleAuditLine, OutgoingMail, ...studyRowModels];
