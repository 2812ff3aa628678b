import type { ChangeRequest, Command, EditSummary, EntityKind, EntityKinds } from '@shared/contract';
import { isOpen, targetKind } from '../change-requests';
import type { Study } from '../study';
import { entityNames, type EntityNames } from './entity-names';
import { fieldChanges, headline, sameFields } from './field-changes';
import {
  askedMarginInWords,
  budgetInWords,
  capitalised,
  limitInWords,
  measureInWords,
  uncertaintyInWords,
} from './in-words';
import { walkEdits } from './proposed-edits';

/** What one edit does, in words; the key of what it creates is known only once it is applied. */
export type EditWords = Pick<EditSummary, 'key' | 'what' | 'before' | 'after' | 'fields'>;

/**
 * Every edit of a change request in words: what, from, to, and whether its target has moved. Of an approved request
 * `before` is the study as it was just before the approval; without it the old values cannot be said and are left empty.
 */
export function editSummaries(
  study: Study,
  change: ChangeRequest,
  personName: (id: string) => string,
  before: Study | null = null,
): EditSummary[] {
  const approved = change.state === 'approved';
  const summaries: EditSummary[] = [];
  const pending: { readonly at: number; readonly id: string; readonly kind: EntityKind }[] = [];
  walkEdits(before ?? study, change, (fork, edit, index, conflict) => {
    for (const { at, id, kind } of pending.splice(0)) nameCreated(fork, at, id, kind);
    const words = editInWords(fork, edit, entityNames(fork, personName));
    summaries.push({
      index,
      type: edit.type,
      ...words,
      ...(approved && !before ? withoutBefore(words) : {}),
      conflict: isOpen(change) ? conflict : '',
      command: edit,
    });
    if (!('version' in edit) && 'id' in edit && edit.id)
      pending.push({ at: index, id: edit.id, kind: targetKind(edit) });
  });
  // What the study already holds has its key there; what only the draft holds has none that is sure to last.
  for (const { at, id, kind } of pending) nameCreated(study, at, id, kind);
  return summaries;

  function nameCreated(fork: Study, at: number, id: string, kind: EntityKind): void {
    const created = study.get(kind, id) ?? fork.get(kind, id);
    const summary = summaries[at];
    if (created && summary && 'key' in created) summaries[at] = { ...summary, key: created.key };
  }
}

/** One edit in words, against the study as it is before the edit. */
export function editInWords(study: Study, edit: Command, names: EntityNames): EditWords {
  switch (edit.type) {
    case 'policy.create':
      return written('', `Margin policy for ${edit.parameter}, ${edit.maturity}`, askedMarginInWords(edit));
    case 'element.create':
      return written(edit.key, `New element ${edit.key}`, edit.name);
    case 'requirement.create':
      return written('', 'New requirement', edit.limit ? `${edit.title}, ${limitInWords(edit.limit)}` : edit.title);
    case 'quantity.create':
      return written(
        '',
        `New quantity ${edit.symbol}`,
        edit.value ? `${edit.name}, ${measureInWords(edit.value)}` : edit.name,
      );
    case 'analysis.create':
      return written('', `New ${edit.kind} analysis`, edit.name);
    case 'trace.link': {
      const child = names.entity('requirement', edit.childId);
      return {
        key: child,
        what: `${child} in the flow-down`,
        before: '',
        after: `below ${names.entity('requirement', edit.parentId)}`,
      };
    }
    case 'verification.link': {
      const key = names.entity('requirement', edit.requirementId);
      const by = edit.analysisId
        ? `${edit.method}, ${names.entity('analysis', edit.analysisId)} ${edit.output ?? ''}`
        : edit.method;
      return { key, what: `${key} verification`, before: 'none', after: by.trim() };
    }
    case 'budget.propose':
    case 'budget.adopt':
      return shareInWords(study, edit, names);
    case 'budget.set': {
      const requirement = study.get('requirement', edit.id);
      const key = names.entity('requirement', edit.id);
      return {
        key,
        what: `${key} budget`,
        before: budgetInWords(requirement?.budget),
        after: budgetInWords(edit.budget),
      };
    }
    case 'requirement.withdraw': {
      const requirement = study.get('requirement', edit.id);
      const key = names.entity('requirement', edit.id);
      return {
        key,
        what: `${key} ${requirement?.title ?? ''}`.trim(),
        before: requirement?.state ?? '',
        after: 'withdrawn',
      };
    }
    case 'quantity.set':
      return revisedInWords(study, 'quantity', edit.id, settings(edit), names);
    case 'policy.revise':
      return revisedInWords(
        study,
        'policy',
        edit.id,
        { percent: edit.percent, absolute: edit.absolute, definition: edit.definition, source: edit.source },
        names,
      );
    case 'study.configure':
    case 'element.revise':
    case 'requirement.revise':
    case 'quantity.revise':
    case 'analysis.revise':
    case 'verification.revise':
      return revisedInWords(study, targetKind(edit), edit.id, edit.changes, names);
    case 'policy.remove':
    case 'element.remove':
    case 'trace.unlink':
    case 'quantity.remove':
    case 'analysis.remove':
    case 'verification.unlink':
      return removedInWords(study, targetKind(edit), edit.id, names);
    default:
      throw new Error(`${edit.type} is a step of procedure and no edit that can be proposed`);
  }
}

/** The words of an edit whose old values are not known. */
function withoutBefore({ fields }: EditWords): Pick<EditWords, 'before' | 'fields'> {
  return { before: '', ...(fields ? { fields: fields.map((field) => ({ ...field, before: '' })) } : {}) };
}

function written(key: string, what: string, after: string): EditWords {
  return { key, what, before: '', after };
}

function settings(edit: Extract<Command, { type: 'quantity.set' }>): Record<string, unknown> {
  const { value, uncertainty, basis, source } = edit;
  return { value, uncertainty, basis, source };
}

function shareInWords(
  study: Study,
  edit: Extract<Command, { type: 'budget.propose' | 'budget.adopt' }>,
  names: EntityNames,
): EditWords {
  const trace = study.get('trace', edit.id);
  const child = trace && study.get('requirement', trace.childId);
  if (!trace || !child) return { key: '', what: 'Share of a budget', before: '', after: '' };
  const parent = names.entity('requirement', trace.parentId);
  const share = child.limit ? ` ${measureInWords(child.limit.upper ?? child.limit.value)}` : '';
  const after = edit.type === 'budget.adopt' ? 'adopted' : edit.share;
  return { key: child.key, what: `${child.key}${share} into the budget of ${parent}`, before: trace.share, after };
}

/** How something is called in a list of edits: quantities and analyses by name, the rest by key. */
function called<K extends EntityKind>(kind: K, entity: EntityKinds[K], names: EntityNames): string {
  if (kind === 'study') return 'Study';
  if (kind === 'quantity') return capitalised((entity as EntityKinds['quantity']).name);
  if (kind === 'policy') return `Margin policy for ${names.entity(kind, entity.id)}`;
  return names.entity(kind, entity.id);
}

function revisedInWords<K extends EntityKind>(
  study: Study,
  kind: K,
  id: string,
  changes: object,
  names: EntityNames,
): EditWords {
  const before = study.get(kind, id);
  if (!before) return { key: '', what: names.entity(kind, id), before: '', after: 'cannot be edited' };
  const given = Object.fromEntries(Object.entries(changes).filter(([, value]) => value !== undefined));
  // Typed measures and limits carry the digits and the unit that words are made of, so they read like stored ones.
  const after = { ...before, ...given } as EntityKinds[K];
  const differing = fieldChanges(kind, before, after, names);
  const fields = differing.length > 0 ? differing : sameFields(kind, before, Object.keys(given), names);
  const key = kind === 'study' || kind === 'policy' ? '' : names.entity(kind, id);
  const name = called(kind, before, names);
  const [only] = fields;
  if (!only) return { key, what: name, before: 'as it is', after: 'as it is' };
  if (kind === 'quantity' && fields.every(({ field }) => field === 'value' || field === 'uncertainty')) {
    const [was, is] = [before, after].map((state) => valueInWords(state as EntityKinds['quantity'], fields.length > 1));
    const what = only.field === 'value' ? name : `${name}, uncertainty`;
    return fields.length > 1
      ? { key, what, before: was ?? '', after: is ?? '' }
      : { key, what, before: only.before, after: only.after };
  }
  if (fields.length === 1) return { key, what: `${name} ${only.field}`, before: only.before, after: only.after };
  return {
    key,
    what: `${name}: ${fields.map(({ field }) => field).join(', ')}`,
    before: fields.map((field) => `${field.field} ${field.before}`).join('; '),
    after: fields.map((field) => `${field.field} ${field.after}`).join('; '),
    fields,
  };
}

function valueInWords(quantity: EntityKinds['quantity'], withUncertainty: boolean): string {
  const value = measureInWords(quantity.value);
  return withUncertainty && quantity.uncertainty ? `${value} ${uncertaintyInWords(quantity.uncertainty)}` : value;
}

function removedInWords<K extends EntityKind>(study: Study, kind: K, id: string, names: EntityNames): EditWords {
  const entity = study.get(kind, id);
  if (!entity) return { key: '', what: names.entity(kind, id), before: '', after: 'removed' };
  const key = kind === 'policy' ? '' : names.entity(kind, id);
  const what = kind === 'verification' ? `${key} verification` : called(kind, entity, names);
  return { key, what, before: headline(kind, entity, names), after: 'removed' };
}
