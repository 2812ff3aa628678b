import { COMMAND_TYPES, Command, EditCommand, EditRequest } from './commands';
import { COMMAND_ROLES } from './permissions';

const ID = '00000000-0000-7000-8000-000000000001';
const written = { type: 'requirement.create', title: 'T', text: 'It shall fly.', level: 'vehicle', prefix: 'VEH' };

/** Paths of what a schema refuses in an input; empty when it accepts it. */
function faults(input: unknown, schema: { safeParse: typeof Command.safeParse } = Command): string[] {
  const result = schema.safeParse(input);
  return result.success ? [] : result.error.issues.map(({ path }) => path.join('.'));
}

describe('commands as they come in', () => {
  it('take what may be left out as nothing', () => {
    expect(Command.parse(written)).toMatchObject({ limit: null, elementId: null, parentIds: [], rationale: '' });
  });

  it.each([
    ['an empty statement', { ...written, text: '   ' }, 'text'],
    ['an empty title', { ...written, title: '' }, 'title'],
    ['a key prefix in small letters', { ...written, prefix: 'veh' }, 'prefix'],
    [
      'an unknown relation',
      { ...written, limit: { relation: 'about', value: { text: '1', unit: 'm' } } },
      'limit.relation',
    ],
    [
      'a limit without number',
      { ...written, limit: { relation: 'at most', value: { text: ' ', unit: 'm' } } },
      'limit.value.text',
    ],
    ['a version that nobody can have seen', { type: 'quantity.remove', id: ID, version: 0 }, 'version'],
    ['an identifier that is none', { type: 'quantity.remove', id: 'Q-001', version: 1 }, 'id'],
    ['a name that starts with a digit', { type: 'quantity.create', symbol: '2x', name: 'x', unit: 'm' }, 'symbol'],
    ['a coverage factor of zero', { type: 'study.configure', id: ID, version: 1, changes: { k: 0 } }, 'changes.k'],
    ['a rejection of a day that is none', { type: 'change.refer', id: ID, version: 1, due: '2026-02-30' }, 'due'],
  ])('are refused with %s, by its path', (_case, input, path) => {
    expect(faults(input)).toContain(path);
  });

  it('refuse fields that they do not have', () => {
    expect(faults({ ...written, state: 'baselined' })).not.toEqual([]);
    expect(faults({ type: 'requirement.revise', id: ID, version: 1, changes: { state: 'baselined' } })).not.toEqual([]);
    expect(faults({ type: 'study.destroy' })).not.toEqual([]);
  });

  it('revise only what is given: defaults are not filled in', () => {
    const command = Command.parse({ type: 'requirement.revise', id: ID, version: 1, changes: { title: 'T' } });
    expect(command).toEqual({ type: 'requirement.revise', id: ID, version: 1, changes: { title: 'T' } });
    expect(faults({ type: 'requirement.revise', id: ID, version: 1, changes: { text: '' } })).toEqual(['changes.text']);
  });

  it('propose edits only, no steps of procedure', () => {
    const approve = { type: 'change.dispose', id: ID, version: 1, decision: 'approved', reason: '' };
    expect(faults(approve)).toEqual([]);
    expect(faults(approve, EditCommand as never)).not.toEqual([]);
    expect(faults({ type: 'change.write', title: 'T', edits: [approve] })).not.toEqual([]);
  });

  it('come in batches of at least one, into a draft by its key', () => {
    expect(EditRequest.safeParse({ commands: [] }).success).toBe(false);
    expect(EditRequest.safeParse({ commands: [written], draft: 'CR-24' }).success).toBe(false);
    expect(EditRequest.parse({ commands: [written], draft: 'CR-024' }).why).toBe('');
  });

  it('each have a row in the table of roles, never the reader', () => {
    expect(Object.keys(COMMAND_ROLES).sort()).toEqual([...COMMAND_TYPES].sort());
    for (const roles of Object.values(COMMAND_ROLES)) {
      expect(roles.length).toBeGreaterThan(0);
      expect(roles).not.toContain('reader');
    }
  });
});
