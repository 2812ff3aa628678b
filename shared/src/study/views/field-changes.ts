import type {
  Analysis,
  Binding,
  ChangeRequest,
  EntityKind,
  EntityKinds,
  FormulaLine,
  Limit,
  Measure,
  OpenItem,
  Uncertainty,
} from '@shared/contract';
import type { EntityNames } from './entity-names';
import { askedMarginInWords, budgetInWords, limitInWords, measureInWords, uncertaintyInWords } from './in-words';

/** One field of an entity as it was and as it is, in words. */
export interface FieldChange {
  readonly field: string;
  readonly before: string;
  readonly after: string;
}

type Words<V> = (value: V, names: EntityNames) => string;
type FieldTable<E> = { readonly [F in keyof E]?: readonly [label: string, words: Words<E[F]>] };

const text = (value: string): string => value || 'nothing';
const number = (value: number): string => String(value);
const plainly: Words<string | null> = (value) => value ?? 'none';
const person: Words<string> = (id, names) => names.person(id);
const element: Words<string | null> = (id, names) => (id ? names.entity('element', id) : 'unallocated');

function source(binding: Binding, names: EntityNames): string {
  const { from } = binding;
  if ('quantityId' in from) return names.entity('quantity', from.quantityId);
  if ('analysisId' in from) return `${names.entity('analysis', from.analysisId)} ${from.output}`;
  return from.constant;
}
const inputs: Words<readonly Binding[]> = (list, names) =>
  list.map((binding) => `${binding.name} from ${source(binding, names)}`).join('; ') || 'none';
const lines: Words<readonly FormulaLine[]> = (list) =>
  list.map((line) => `${line.name} = ${line.expression}`).join('; ') || 'none';
const results: Words<Analysis['results']> = (list) =>
  list.map((result) => `${result.name} ${measureInWords(result.value)}`).join('; ') || 'none';
const openItem: Words<OpenItem | null> = (item, names) =>
  item ? `${item.kind}, ${item.action}, ${names.person(item.personId)}, due ${item.due}` : 'none';
const signed = (value: { readonly personId: string } | null, names: EntityNames, what: string): string =>
  value ? `${what} by ${names.person(value.personId)}` : 'none';
const votes: Words<ChangeRequest['votes']> = (list, names) =>
  list.map((vote) => `${names.person(vote.personId)} ${vote.vote}`).join('; ') || 'none';

/** What people enter, kind by kind, with the label of each field; fields that only the machine keeps are left out. */
const FIELDS: { readonly [K in EntityKind]: FieldTable<EntityKinds[K]> } = {
  study: {
    name: ['name', text],
    summary: ['summary', text],
    phase: ['phase', text],
    concept: ['concept', text],
    maturity: ['maturity', text],
    k: ['coverage factor k', number],
    quorum: ['votes that approval needs', number],
  },
  policy: {
    percent: ['required margin', (value) => `${value} %`],
    absolute: ['absolute required margin', (value: Measure | null) => (value ? measureInWords(value) : 'none')],
    definition: ['definition', text],
    source: ['source', text],
  },
  element: {
    key: ['code', text],
    name: ['name', text],
    parentId: ['part of', (id, names) => (id ? names.entity('element', id) : 'nothing')],
    description: ['description', text],
  },
  requirement: {
    title: ['title', text],
    text: ['statement', text],
    rationale: ['rationale', text],
    level: ['level', text],
    elementId: ['allocation', element],
    parameter: ['parameter', plainly],
    limit: ['limit', (value: Limit | null) => limitInWords(value)],
    budget: ['budget', budgetInWords],
    openItem: ['open item', openItem],
    ownerId: ['owner', person],
    coOwnerIds: ['co-owners', (ids, names) => ids.map((id) => names.person(id)).join(', ') || 'none'],
    state: ['state', text],
  },
  trace: { share: ['share', text] },
  quantity: {
    value: ['value', measureInWords],
    uncertainty: ['uncertainty', (value: Uncertainty | null) => uncertaintyInWords(value)],
    basis: ['basis', text],
    source: ['source', text],
    symbol: ['symbol', text],
    name: ['name', text],
    kind: ['kind', plainly],
    unit: ['unit', (unit) => unit || 'none'],
    temperature: ['temperature', text],
    elementId: ['allocation', element],
    ownerId: ['owner', person],
    state: ['state', text],
  },
  analysis: {
    name: ['name', text],
    purpose: ['purpose', text],
    elementId: ['allocation', element],
    inputs: ['inputs', inputs],
    lines: ['lines', lines],
    method: ['method', (method) => (method ? `${method.id} ${method.version}` : 'none')],
    results: ['results', results],
    assumptions: ['assumptions', text],
    authorId: ['author', person],
    check: ['check', (check, names) => signed(check, names, 'signed')],
  },
  verification: {
    method: ['method of verification', text],
    level: ['level', text],
    stage: ['stage', text],
    gate: ['review gate', text],
    criterion: ['criterion', text],
    analysisId: ['analysis', (id, names) => (id ? names.entity('analysis', id) : 'none')],
    output: ['output', plainly],
    deciding: ['decides', (value) => (value ? 'yes' : 'no')],
    finding: [
      'finding',
      (value, names) =>
        value ? `${value.met ? 'met' : 'not met'}, ${value.document}, ${names.person(value.personId)}` : 'none',
    ],
  },
  assessment: {
    lowered: [
      'compliance lowered',
      (value, names) => (value ? `to ${value.to} by ${names.person(value.personId)}: ${value.reason}` : 'no'),
    ],
    closed: [
      'close-out',
      (value, names) => (value ? `closed by ${names.person(value.personId)}: ${value.reason}` : 'open'),
    ],
  },
  departure: {
    title: ['title', text],
    reason: ['reason', text],
    effectivity: ['effectivity', text],
    expires: ['expires', plainly],
    state: ['state', text],
    decision: ['decision', (value, names) => (value ? `${names.person(value.personId)}: ${value.reason}` : 'none')],
  },
  change: {
    title: ['title', text],
    reason: ['reason', text],
    class: ['class', number],
    due: ['due', plainly],
    state: ['state', text],
    edits: ['proposed edits', (edits) => String(edits.length)],
    votes: ['votes', votes],
    disposition: [
      'disposition',
      (value, names) =>
        value
          ? `${value.decision} by ${names.person(value.personId)}${value.reason ? `: ${value.reason}` : ''}`
          : 'none',
    ],
  },
  baseline: { name: ['name', text], review: ['review', text], note: ['note', text], digest: ['digest', text] },
};

/** The fields that people see in which two states of an entity differ, in words. */
export function fieldChanges<K extends EntityKind>(
  kind: K,
  before: EntityKinds[K],
  after: EntityKinds[K],
  names: EntityNames,
): FieldChange[] {
  const changes: FieldChange[] = [];
  for (const [field, entry] of Object.entries(FIELDS[kind])) {
    const [label, words] = entry as unknown as readonly [string, Words<unknown>];
    const was = words(before[field as keyof EntityKinds[K]], names);
    const is = words(after[field as keyof EntityKinds[K]], names);
    if (was !== is) changes.push({ field: label, before: was, after: is });
  }
  return changes;
}

/** Fields that an edit gives although they are so already, in words. */
export function sameFields<K extends EntityKind>(
  kind: K,
  entity: EntityKinds[K],
  given: readonly string[],
  names: EntityNames,
): FieldChange[] {
  return Object.entries(FIELDS[kind]).flatMap(([field, entry]) => {
    if (!given.includes(field)) return [];
    const [label, words] = entry as unknown as readonly [string, Words<unknown>];
    const is = words(entity[field as keyof EntityKinds[K]], names);
    return [{ field: label, before: is, after: is }];
  });
}

/** What an entity is in a few words, for lines that say it was written or removed. */
export function headline<K extends EntityKind>(kind: K, entity: EntityKinds[K], names: EntityNames): string {
  switch (kind) {
    case 'study':
      return (entity as EntityKinds['study']).name;
    case 'policy':
      return askedMarginInWords(entity as EntityKinds['policy']);
    case 'element':
      return (entity as EntityKinds['element']).name;
    case 'requirement': {
      const { title, limit } = entity as EntityKinds['requirement'];
      return limit ? `${title}, ${limitInWords(limit)}` : title;
    }
    case 'trace': {
      const { childId, parentId } = entity as EntityKinds['trace'];
      return `${names.entity('requirement', childId)} below ${names.entity('requirement', parentId)}`;
    }
    case 'quantity': {
      const { name, value } = entity as EntityKinds['quantity'];
      return value ? `${name}, ${measureInWords(value)}` : name;
    }
    case 'analysis':
      return (entity as EntityKinds['analysis']).name;
    case 'verification': {
      const { method, analysisId, output } = entity as EntityKinds['verification'];
      return analysisId ? `${method}, ${names.entity('analysis', analysisId)} ${output ?? ''}`.trim() : method;
    }
    case 'assessment': {
      const { lowered, closed } = entity as EntityKinds['assessment'];
      return closed ? `closed: ${closed.reason}` : lowered ? `lowered to ${lowered.to}: ${lowered.reason}` : 'open';
    }
    case 'departure':
    case 'change':
      return (entity as EntityKinds['departure'] | EntityKinds['change']).title;
    case 'baseline': {
      const { name, review } = entity as EntityKinds['baseline'];
      return `${name}, ${review}`;
    }
  }
  return '';
}
