import { describeStandpoint, isFrozen, parseStandpoint, standpointParam } from './standpoint';

describe('standpoints in the address', () => {
  it.each([
    ['revision:418', 'Revision r418', true],
    ['baseline:B2', 'Baseline B2', true],
    ['draft:CR-024', 'Draft CR-024', false],
  ])('reads and writes %s', (at, words, frozen) => {
    const standpoint = parseStandpoint(at);
    expect(standpointParam(standpoint)).toBe(at);
    expect(describeStandpoint(standpoint, 420)).toBe(words);
    expect(isFrozen(standpoint)).toBe(frozen);
  });

  it.each([null, undefined, 'now', 'revision:-1', 'baseline:', 'yesterday'])('takes %p as now', (at) => {
    const standpoint = parseStandpoint(at);
    expect(standpointParam(standpoint)).toBeUndefined();
    expect(describeStandpoint(standpoint, 420)).toBe('Now · r420');
  });
});
