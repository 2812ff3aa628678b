import type { CommandType } from './commands';
import type { Role } from './roles';

const OWNER: readonly Role[] = ['requirements-owner'];
const ANALYST: readonly Role[] = ['analyst'];
const OWNER_OR_ANALYST: readonly Role[] = ['requirements-owner', 'analyst'];
const BOARD: readonly Role[] = ['board-member', 'board-chair'];
const CHAIR: readonly Role[] = ['board-chair'];
const ANYONE_TECHNICAL: readonly Role[] = ['requirements-owner', 'analyst', 'board-member', 'board-chair'];

/**
 * Which roles may give which command. The server decides by this table, the client shows by it; rules about ownership,
 * state and separation of duties come on top (shared/study).
 */
export const COMMAND_ROLES: Readonly<Record<CommandType, readonly Role[]>> = {
  'study.configure': OWNER,
  'policy.create': OWNER,
  'policy.revise': OWNER,
  'policy.remove': OWNER,
  'element.create': OWNER_OR_ANALYST,
  'element.revise': OWNER_OR_ANALYST,
  'element.remove': OWNER_OR_ANALYST,
  'requirement.create': OWNER,
  'requirement.revise': OWNER,
  'requirement.withdraw': OWNER,
  'requirement.submit': OWNER,
  'requirement.return': ['requirements-owner', 'board-member', 'board-chair'],
  'trace.link': OWNER,
  'trace.unlink': OWNER,
  'budget.set': OWNER,
  'budget.propose': OWNER,
  'budget.adopt': OWNER,
  'quantity.create': ANALYST,
  'quantity.set': ANALYST,
  'quantity.revise': ANALYST,
  'quantity.remove': ANALYST,
  'analysis.create': ANALYST,
  'analysis.revise': ANALYST,
  'analysis.remove': ANALYST,
  'analysis.check': ANYONE_TECHNICAL,
  'verification.link': OWNER_OR_ANALYST,
  'verification.revise': OWNER_OR_ANALYST,
  'verification.unlink': OWNER_OR_ANALYST,
  'verification.record': OWNER_OR_ANALYST,
  'assessment.lower': ['requirements-owner', 'board-member', 'board-chair'],
  'assessment.close': BOARD,
  'assessment.reopen': BOARD,
  'departure.request': OWNER_OR_ANALYST,
  'departure.decide': CHAIR,
  'departure.expire': CHAIR,
  'change.write': ANYONE_TECHNICAL,
  'change.revise': ANYONE_TECHNICAL,
  'change.amend': ANYONE_TECHNICAL,
  'change.drop': ANYONE_TECHNICAL,
  'change.rebase': ANYONE_TECHNICAL,
  'change.submit': ANYONE_TECHNICAL,
  'change.withdraw': ANYONE_TECHNICAL,
  'change.assess': BOARD,
  'change.refer': BOARD,
  'change.vote': BOARD,
  'change.dispose': CHAIR,
  'baseline.take': CHAIR,
  'edit.undo': ANYONE_TECHNICAL,
};

/** Whether somebody with these roles may give this kind of command at all. */
export function mayGive(type: CommandType, roles: readonly Role[]): boolean {
  return COMMAND_ROLES[type].some((role) => roles.includes(role));
}
