import { conflictFields, typedOver, withTheirs } from './requirement-conflict';
import { BLANK } from './requirement-text';

const BEFORE = { ...BLANK, title: 'Hold pressure', rationale: 'First reason', text: 'The tank shall hold.' };
const MINE = { ...BEFORE, title: 'Hold tank pressure' };
const THEIRS = { ...BEFORE, title: 'Withstand pressure', rationale: 'Second reason' };

describe('an edit that somebody else was faster with', () => {
  it('keeps what I typed and takes what I left alone from them', () => {
    const merged = typedOver(MINE, BEFORE, THEIRS);
    expect([merged.title, merged.rationale]).toEqual(['Hold tank pressure', 'Second reason']);
    const differing = conflictFields(THEIRS, merged).filter((field) => field.theirs !== field.mine);
    expect(differing.map((field) => field.label)).toEqual(['Title']);
  });

  it('takes their side of the fields where it was chosen', () => {
    expect(withTheirs(MINE, THEIRS, { title: 'theirs' }).title).toBe('Withstand pressure');
    expect(withTheirs(MINE, THEIRS, { title: 'mine' }).title).toBe('Hold tank pressure');
  });
});
