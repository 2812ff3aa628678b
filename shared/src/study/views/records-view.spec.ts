import type { Command, Patch } from '@shared/contract';
import type { Study } from '../study';
import { sendToReview } from '../testing/baselines';
import {
  ANALYST,
  CHAIR,
  ID,
  MEMBER,
  OWNER,
  edit,
  idOf,
  limit,
  requirement,
  smallStudy,
  viewOf,
  type Somebody,
} from '../testing/small-study';
import { isUndoable, recordChanges } from './records-view';
import { summaryOf } from './edit-sentence';

const changes = (study: Study, patch: Patch) =>
  recordChanges(patch, viewOf(study)).map(({ key, field, before, after }) => [key, field, before, after]);

describe('what a ledger entry changed', () => {
  it('is said field by field, without counters and versions', () => {
    const study = smallStudy();
    const set = edit(study, ANALYST, {
      type: 'quantity.set',
      id: ID.isp,
      version: 1,
      value: { text: '6300', unit: 's' },
      uncertainty: null,
      source: 'bench test 12',
    });
    expect(changes(study, set)).toEqual([
      ['Q-001', 'value', '6\u2009500 s', '6\u2009300 s'],
      ['Q-001', 'uncertainty', '± 100 s (normal, k = 2)', 'none stated'],
      ['Q-001', 'source', 'for tests', 'bench test 12'],
    ]);
    const written = edit(
      study,
      OWNER,
      requirement({ id: idOf(80), title: 'spare', limit: limit('at most', '1.5', 'km/s'), parentIds: [ID.deltaV] }),
    );
    expect(changes(study, written)).toEqual([
      ['VEH-003', 'written', '', 'spare, ≤ 1.5 km/s'],
      ['VEH-001 → VEH-003', 'written', '', 'VEH-003 below VEH-001'],
    ]);
  });

  it('names what was removed, also when it is no longer in the study', () => {
    const study = smallStudy();
    const patch = edit(study, ANALYST, { type: 'verification.unlink', id: ID.massByAnalysis, version: 1 });
    expect(changes(study, patch)).toEqual([['VEH-002', 'removed', 'analysis, AN-001 m_0', '']]);
  });

  it('shows lines of an analysis, allocations and votes in words', () => {
    const study = smallStudy();
    const revised = edit(study, ANALYST, {
      type: 'analysis.revise',
      id: ID.rollUp,
      version: 1,
      changes: {
        elementId: ID.vehicle,
        lines: [{ name: 'm_0', expression: '1.1 * m_dry + m_p', unit: 't', label: 'initial mass' }],
      },
    });
    expect(changes(study, revised)).toEqual([
      ['AN-001', 'allocation', 'unallocated', 'VEH'],
      ['AN-001', 'lines', 'm_0 = m_dry + m_p', 'm_0 = 1.1 * m_dry + m_p'],
    ]);
  });
});

describe('the sentence of a ledger entry', () => {
  function said(study: Study, person: Somebody, ...commands: Command[]): string {
    const patch = edit(study, person, ...commands);
    return summaryOf(commands, patch, study);
  }

  it('says one edit with both states', () => {
    const study = smallStudy();
    const set: Command = { type: 'quantity.set', id: ID.isp, version: 1, value: { text: '6600', unit: 's' } };
    expect(said(study, ANALYST, set)).toBe('Specific impulse 6\u2009500 s → 6\u2009600 s');
    expect(
      said(study, OWNER, {
        type: 'requirement.revise',
        id: ID.mass,
        version: 1,
        changes: { limit: limit('at most', '118', 't') },
      }),
    ).toBe('VEH-002 limit ≤ 116 t → ≤ 118 t');
    expect(
      said(study, OWNER, {
        type: 'requirement.revise',
        id: ID.mass,
        version: 2,
        changes: { title: 'M', level: 'unit' },
      }),
    ).toBe('VEH-002: title, level');
  });

  it('says what was written, and how many edits more there were', () => {
    const study = smallStudy();
    const write = requirement({ id: idOf(80), title: 'spare', limit: limit('at most', '1.5', 'km/s') });
    const link: Command = { type: 'trace.link', id: idOf(81), parentId: ID.deltaV, childId: idOf(80) };
    const propose: Command = { type: 'budget.propose', id: idOf(81), version: 1, share: 'proposed' };
    expect(said(study, OWNER, write)).toBe('Wrote VEH-003 spare, ≤ 1.5 km/s');
    expect(said(study, OWNER, link, propose)).toBe('Linked VEH-003 below VEH-001, and 1 more edit');
    expect(said(study, OWNER, { type: 'budget.adopt', id: idOf(81), version: 2 })).toBe(
      'Adopted VEH-003 1.5 km/s into the budget of VEH-001',
    );
  });

  it('says steps of procedure', () => {
    const study = smallStudy();
    const step = { id: idOf(70) };
    const edits = [{ type: 'quantity.set', id: ID.isp, version: 1, value: { text: '6600', unit: 's' } }] as const;
    const write: Command = { type: 'change.write', ...step, title: 'More', reason: 'r', due: null, edits: [...edits] };
    expect(said(study, OWNER, write)).toBe('Wrote CR-001 More');
    expect(said(study, OWNER, { type: 'change.submit', ...step, version: 1 })).toBe('Submitted CR-001: More');
    expect(said(study, MEMBER, { type: 'change.refer', ...step, version: 2, due: null })).toBe(
      'Put CR-001: More before the board',
    );
    expect(said(study, MEMBER, { type: 'change.vote', ...step, version: 3, vote: 'for', remark: '' })).toBe(
      'Voted for CR-001: More',
    );
    expect(said(study, CHAIR, { type: 'change.dispose', ...step, version: 4, decision: 'approved', reason: '' })).toBe(
      'Approved CR-001: More',
    );
    expect(said(study, MEMBER, { type: 'analysis.check', id: ID.rollUp, version: 1, remark: '' })).toBe(
      'Signed the check of AN-001',
    );
    sendToReview(study, ID.deltaV);
    expect(
      said(study, CHAIR, {
        type: 'baseline.take',
        name: 'Concept',
        review: 'Concept review',
        note: '',
        requirementIds: [ID.deltaV],
        quantityIds: [],
        openItems: 'listed',
      }),
    ).toBe('Took baseline B1 Concept, Concept review');
  });
});

describe('whether an edit can be taken back', () => {
  it('holds for an own edit that nothing was built on', () => {
    const study = smallStudy();
    const patch = edit(study, ANALYST, {
      type: 'quantity.set',
      id: ID.isp,
      version: 1,
      value: { text: '6600', unit: 's' },
    });
    expect(isUndoable(viewOf(study, ANALYST), 7, patch, ANALYST.id)).toBe(true);
    expect(isUndoable(viewOf(study, MEMBER), 7, patch, ANALYST.id)).toBe(false);
    edit(study, ANALYST, { type: 'quantity.set', id: ID.isp, version: 2, value: { text: '6650', unit: 's' } });
    expect(isUndoable(viewOf(study, ANALYST), 7, patch, ANALYST.id)).toBe(false);
  });
});
