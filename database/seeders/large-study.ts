import type { Analysis, Binding, Element, Measure, Quantity, Requirement, StudySettings } from '@shared/contract';
import { Study } from '@shared/study';

export interface LargeStudySize {
  readonly requirements: number;
  readonly quantities: number;
  readonly analyses: number;
}
/** Size that the product is measured with. */
export const LARGE: LargeStudySize = { requirements: 50_000, quantities: 2_000, analyses: 20_000 };

const OWNER = identifier(0);
const ELEMENTS = 200;
const LEVELS = ['mission', 'vehicle', 'system', 'unit'] as const;
/** Children of each requirement in the flow-down. */
const FAN_OUT = 8;
/** Analyses that rest on each analysis. */
const FOLLOWERS = 3;

/**
 * A large study for load tests and benchmarks, the same on every call: a flow-down eight wide, analyses of three lines
 * that rest on each other three wide, every requirement verified by one output, verdicts of several kinds. All values
 * lie near one tonne, so that limits near it hold, fail and straddle. Its patch is what a database has to be loaded with.
 */
export function largeStudy(size: LargeStudySize = LARGE, key = 'LARGE'): Study {
  const study = new Study();
  let count = 0;
  const next = (): string => identifier(++count);

  study.put('study', settingsOf(next(), key, size));
  const elements = Array.from({ length: ELEMENTS }, () => next());
  elements.forEach((id, index) => study.put('element', elementAt(id, index, elements)));
  const requirements = Array.from({ length: size.requirements }, () => next());
  requirements.forEach((id, index) => {
    study.put('requirement', requirementAt(id, index, elements));
    const parentId = index > 0 ? requirements[Math.floor((index - 1) / FAN_OUT)] : undefined;
    if (parentId !== undefined) study.put('trace', { id: next(), version: 1, parentId, childId: id, share: 'none' });
  });
  const quantities = Array.from({ length: size.quantities }, () => next());
  quantities.forEach((id, index) => study.put('quantity', quantityAt(id, index, elements)));
  const analyses = Array.from({ length: size.analyses }, () => next());
  analyses.forEach((id, index) => study.put('analysis', analysisAt(id, index, quantities, analyses)));
  if (analyses.length > 0) {
    requirements.forEach((requirementId, index) =>
      study.put('verification', {
        id: next(),
        version: 1,
        requirementId,
        method: 'analysis',
        level: 'system',
        stage: 'qualification',
        gate: '',
        criterion: '',
        analysisId: at(analyses, index),
        output: 'm_c',
        deciding: false,
        finding: null,
      }),
    );
  }
  return study;
}

/** Identifier number n in the form of a UUID version 7; they sort like their numbers. */
function identifier(n: number): string {
  const hex = n.toString(16).padStart(12, '0');
  return `01900000-0000-7000-8000-${hex}`;
}

/** The item at an index, counted around. */
function at(items: readonly string[], index: number): string {
  const item = items[index % items.length];
  if (item === undefined) throw new Error('an index into an empty list');
  return item;
}

/** A number from 0 up to 1 that looks arbitrary and is the same on every call (fractional part of n times the golden ratio). */
function spread(n: number): number {
  return (n * 0.618_033_988_749_895) % 1;
}

function tonnes(text: string): Measure {
  return { text, unit: 't', si: Number(text) * 1000 };
}

function numbered(prefix: string, index: number): string {
  return `${prefix}-${String(index + 1).padStart(3, '0')}`;
}

function settingsOf(id: string, key: string, size: LargeStudySize): StudySettings {
  return {
    id,
    version: 1,
    key,
    name: 'Large study',
    summary: 'A generated study for load tests.',
    phase: 'Load test',
    concept: 'generated',
    levels: LEVELS,
    maturity: 'concept',
    k: 2,
    quorum: 2,
    counters: { LRG: size.requirements, Q: size.quantities, AN: size.analyses },
  };
}

function elementAt(id: string, index: number, elements: readonly string[]): Element {
  const parentId = index > 0 ? at(elements, Math.floor((index - 1) / FAN_OUT)) : null;
  return { id, version: 1, key: `E${String(index + 1)}X`, name: `Element ${index + 1}`, parentId, description: '' };
}

function requirementAt(id: string, index: number, elements: readonly string[]): Requirement {
  const depth = Math.floor(Math.log(index * (FAN_OUT - 1) + 1) / Math.log(FAN_OUT));
  const limit = (0.97 + 0.06 * spread(index)).toFixed(3);
  return {
    id,
    version: 1,
    key: numbered('LRG', index),
    title: `Keep mass ${index + 1}`,
    text: `Element ${(index % ELEMENTS) + 1} shall have a mass of at most ${limit} t in case ${index + 1}.`,
    rationale: 'Generated for load tests.',
    level: LEVELS[Math.min(depth, LEVELS.length - 1)] ?? 'unit',
    elementId: at(elements, index),
    parameter: null,
    limit: {
      relation: 'at most',
      value: tonnes(limit),
      upper: null,
      tolerance: null,
      temperature: 'absolute',
      condition: `case ${index + 1}`,
    },
    budget: null,
    openItem: null,
    ownerId: OWNER,
    coOwnerIds: [],
    state: index % 10 === 9 ? 'in preparation' : 'baselined',
  };
}

function quantityAt(id: string, index: number, elements: readonly string[]): Quantity {
  return {
    id,
    version: 1,
    key: numbered('Q', index),
    symbol: `m_${index + 1}`,
    name: `Mass ${index + 1}`,
    kind: 'mass',
    unit: 't',
    temperature: 'absolute',
    value: tonnes((0.9 + 0.2 * spread(index)).toFixed(4)),
    uncertainty: index % 10 === 0 ? { distribution: 'normal', halfWidth: tonnes('0.020'), k: 2 } : null,
    basis: 'assumed',
    source: 'Generated',
    ownerId: OWNER,
    elementId: at(elements, index),
    state: 'working',
  };
}

function analysisAt(id: string, index: number, quantities: readonly string[], analyses: readonly string[]): Analysis {
  const quantity = (offset: number): Binding['from'] => ({ quantityId: at(quantities, index * 7 + offset * 613) });
  const before: Binding['from'] =
    index === 0 ? quantity(3) : { analysisId: at(analyses, Math.floor((index - 1) / FOLLOWERS)), output: 'm_c' };
  return {
    id,
    version: 1,
    key: numbered('AN', index),
    name: `Mass combination ${index + 1}`,
    purpose: '',
    kind: 'formula',
    elementId: null,
    authorId: OWNER,
    inputs: [
      { name: 'm_1', from: quantity(0) },
      { name: 'm_2', from: quantity(1) },
      { name: 'm_3', from: quantity(2) },
      { name: 'm_4', from: before },
    ],
    lines: [
      { name: 'm_a', expression: '(m_1 + m_2) / 2', unit: 't', label: 'arithmetic mean' },
      { name: 'm_b', expression: 'sqrt(m_a * m_3)', unit: 't', label: 'geometric mean' },
      { name: 'm_c', expression: '0.7 * m_b + 0.3 * m_4', unit: 't', label: 'weighted with the one before' },
    ],
    method: null,
    results: [],
    assumptions: '',
    check: null,
  };
}
