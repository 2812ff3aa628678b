import type { Departure } from '@shared/contract';
import { proposal, type Phrase } from './words';

/** Sends requirements to review. */
export const submit =
  (...keys: readonly string[]): Phrase =>
  (names) =>
    keys.map((key) => ({ type: 'requirement.submit' as const, ...names.target('requirement', key) }));

/** Signs the check of an analysis. */
export const check =
  (name: string, remark: string): Phrase =>
  (names) => [{ type: 'analysis.check', ...names.target('analysis', name), remark }];

/** Closes rows of the matrix. */
export const close =
  (reason: string, ...keys: readonly string[]): Phrase =>
  (names) =>
    keys.map((key) => ({ type: 'assessment.close' as const, ...names.seen('requirement', key), reason }));

/** Lowers the compliance of a row. */
export const lower =
  (key: string, to: 'partial' | 'no' | 'not assessed', reason: string): Phrase =>
  (names) => [{ type: 'assessment.lower', ...names.seen('requirement', key), to, reason }];

/** Takes a baseline of requirements and puts quantities under control. */
export const baseline =
  (words: {
    name: string;
    review: string;
    note: string;
    requirements: readonly string[];
    quantities: readonly string[];
  }): Phrase =>
  (names) => [
    {
      type: 'baseline.take',
      id: names.create('baseline', words.name),
      name: words.name,
      review: words.review,
      note: words.note,
      requirementIds: words.requirements.map((key) => names.id('requirement', key)),
      quantityIds: words.quantities.map((name) => names.id('quantity', name)),
      openItems: 'listed',
    },
  ];

/** Asks for a departure. */
export const departure =
  (
    name: string,
    words: Pick<Departure, 'kind' | 'class' | 'title' | 'reason' | 'effectivity'> & {
      requirement: string;
      expires: string | null;
    },
  ): Phrase =>
  (names) => {
    const { requirement, ...fields } = words;
    return [
      {
        type: 'departure.request',
        id: names.create('departure', name),
        requirementId: names.id('requirement', requirement),
        ...fields,
      },
    ];
  };
export const grant =
  (name: string, reason: string): Phrase =>
  (names) => [{ type: 'departure.decide', ...names.target('departure', name), decision: 'in force', reason }];

/** Writes a change request with its proposed edits. */
export const change =
  (name: string, words: { title: string; reason: string; due: string | null; edits: readonly Phrase[] }): Phrase =>
  (names) => {
    const edits = proposal(words.edits, names);
    return [
      {
        type: 'change.write',
        id: names.create('change', name),
        title: words.title,
        reason: words.reason,
        due: words.due,
        edits,
      },
    ];
  };

/** A step of a change request on its way to the board. */
export const changeStep =
  (name: string, step: 'submit' | 'assess'): Phrase =>
  (names) => [{ type: `change.${step}` as 'change.submit', ...names.target('change', name) }];
export const refer =
  (name: string, due: string | null): Phrase =>
  (names) => [{ type: 'change.refer', ...names.target('change', name), due }];
export const vote =
  (name: string, side: 'for' | 'against', remark: string): Phrase =>
  (names) => [{ type: 'change.vote', ...names.target('change', name), vote: side, remark }];
export const approve =
  (name: string, reason: string): Phrase =>
  (names) => [{ type: 'change.dispose', ...names.target('change', name), decision: 'approved', reason }];
