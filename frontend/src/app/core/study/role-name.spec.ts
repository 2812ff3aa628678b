import { ROLES, ROLE_NAMES } from '@shared/contract';
import { roleName } from './role-name';

describe('roleName', () => {
  it.each(ROLES)('says for %s what the contract says', (role) => {
    expect(roleName(role)).toBe(ROLE_NAMES[role]);
  });
});
