import { ROLES, ROLE_NAMES } from '@shared/contract';
import { roleList, roleName } from './role-name';

describe('roleName', () => {
  it.each(ROLES)('says for %s what the contract says', (role) => {
    expect(roleName(role)).toBe(ROLE_NAMES[role]);
  });
});

describe('roleList', () => {
  it('reads as one phrase', () => {
    expect(roleList(['analyst', 'board-member'])).toBe('Analyst, board member');
    expect(roleList([])).toBe('');
  });
});
