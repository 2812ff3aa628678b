import type { Command, EntityKind, EntityKinds, Patch } from '@shared/contract';
import { targetKind } from '../change-requests';
import type { Study } from '../study';
import { entityNames, type EntityNames } from './entity-names';
import { fieldChanges, headline, type FieldChange } from './field-changes';
import { capitalised, measureInWords } from './in-words';

/** One plain sentence for the ledger: "Specific impulse 6 400 s → 6 500 s". `study` is the study with the edit applied. */
export function summaryOf(commands: readonly Command[], patch: Patch, study: Study): string {
  const [first, ...more] = commands;
  if (!first) return 'Nothing was edited';
  const names = entityNames(study, (id) => id, patch);
  const sentence = sentenceOf(first, patch, study, names);
  if (more.length === 0) return sentence;
  return `${sentence}, and ${more.length} more ${more.length === 1 ? 'edit' : 'edits'}`;
}

/** An entity as an edit leaves it, or as it was where the edit removed it. */
function stateOf<K extends EntityKind>(patch: Patch, study: Study, kind: K, id: string): EntityKinds[K] | undefined {
  const entry = patch.find((candidate) => candidate.kind === kind && candidate.id === id);
  return (entry?.after ?? entry?.before ?? study.get(kind, id)) as EntityKinds[K] | undefined;
}

function sentenceOf(command: Command, patch: Patch, study: Study, names: EntityNames): string {
  const id = 'id' in command ? command.id : undefined;
  const key = (kind: EntityKind): string => (id ? names.entity(kind, id) : createdKey(patch, kind, names));
  const change = (): string => {
    const found = id ? stateOf(patch, study, 'change', id) : undefined;
    return found ? `${found.key}: ${found.title}` : key('change');
  };
  switch (command.type) {
    case 'requirement.create':
    case 'quantity.create':
    case 'analysis.create':
    case 'element.create':
    case 'policy.create':
    case 'change.write':
      return `Wrote ${createdInWords(patch, targetKind(command), id, names)}`;
    case 'quantity.set':
    case 'quantity.revise':
    case 'study.configure':
    case 'policy.revise':
    case 'element.revise':
    case 'requirement.revise':
    case 'analysis.revise':
    case 'verification.revise':
    case 'budget.set':
    case 'change.revise':
      return revisedInWords(command, patch, study, names);
    case 'element.remove':
    case 'quantity.remove':
    case 'analysis.remove':
    case 'policy.remove':
      return `Removed ${removedInWords(patch, targetKind(command), command.id, names)}`;
    case 'requirement.withdraw':
      return `Withdrew ${key('requirement')}: ${command.reason}`;
    case 'requirement.submit':
      return `Sent ${key('requirement')} to review`;
    case 'requirement.return':
      return `Returned ${key('requirement')} to preparation: ${command.reason}`;
    case 'trace.link':
      return `Linked ${names.entity('requirement', command.childId)} below ${names.entity('requirement', command.parentId)}`;
    case 'trace.unlink':
      return `Unlinked ${key('trace')}`;
    case 'budget.propose':
    case 'budget.adopt':
      return shareInWords(command, patch, study, names);
    case 'analysis.check':
      return `Signed the check of ${key('analysis')}`;
    case 'verification.link': {
      const requirement = names.entity('requirement', command.requirementId);
      return command.analysisId
        ? `Linked ${names.entity('analysis', command.analysisId)} ${command.output ?? ''} to ${requirement}`
        : `${requirement} is to be verified by ${command.method}`;
    }
    case 'verification.unlink':
      return `Unlinked a verification of ${key('verification')}`;
    case 'verification.record':
      return `Found ${key('verification')} ${command.met ? 'met' : 'not met'}, ${command.document}`;
    case 'assessment.lower': {
      const row = key('requirement');
      return command.to ? `Lowered compliance of ${row} to ${command.to}` : `Compliance of ${row} as computed again`;
    }
    case 'assessment.close':
      return `Closed the row of ${key('requirement')}`;
    case 'assessment.reopen':
      return `Reopened the row of ${key('requirement')}`;
    case 'departure.request':
      return `Asked for ${createdInWords(patch, 'departure', id, names)}`;
    case 'departure.decide':
      return command.decision === 'in force' ? `Granted ${key('departure')}` : `Refused ${key('departure')}`;
    case 'departure.expire':
      return `${key('departure')} expired`;
    case 'change.amend':
      return `Added ${command.edits.length === 1 ? 'an edit' : `${command.edits.length} edits`} to ${change()}`;
    case 'change.drop':
      return `Dropped edit ${command.index + 1} of ${change()}`;
    case 'change.rebase':
      return `Resolved the conflict of ${change()}`;
    case 'change.submit':
      return `Submitted ${change()}`;
    case 'change.assess':
      return `Took ${change()} into assessment`;
    case 'change.refer':
      return `Put ${change()} before the board`;
    case 'change.vote':
      return `Voted ${command.vote} ${change()}`;
    case 'change.dispose':
      return `${capitalised(command.decision)} ${change()}`;
    case 'change.withdraw':
      return `Withdrew ${change()}`;
    case 'baseline.take':
      return `Took baseline ${createdInWords(patch, 'baseline', id, names)}`;
    case 'edit.undo':
      return `Took back r${command.revision}`;
  }
}

function createdEntry(patch: Patch, kind: EntityKind, id: string | undefined): Patch[number] | undefined {
  return patch.find((entry) => entry.kind === kind && entry.before === null && (!id || entry.id === id));
}
function createdKey(patch: Patch, kind: EntityKind, names: EntityNames): string {
  const entry = createdEntry(patch, kind, undefined);
  return entry ? names.entity(kind, entry.id) : `a ${kind}`;
}
function createdInWords(patch: Patch, kind: EntityKind, id: string | undefined, names: EntityNames): string {
  const entry = createdEntry(patch, kind, id);
  if (!entry?.after) return id ? names.entity(kind, id) : `a ${kind}`;
  const words = headline<EntityKind>(kind, entry.after, names);
  if (kind === 'policy') return `the margin policy for ${names.entity(kind, entry.id)}: ${words}`;
  return `${names.entity(kind, entry.id)} ${words}`;
}
function removedInWords(patch: Patch, kind: EntityKind, id: string, names: EntityNames): string {
  const before = patch.find((entry) => entry.kind === kind && entry.id === id)?.before;
  if (kind === 'policy') return `the margin policy for ${names.entity(kind, id)}`;
  return before ? `${names.entity(kind, id)} ${headline<EntityKind>(kind, before, names)}` : names.entity(kind, id);
}

/** What is said of a revision: quantities by name, the rest by key; one field with both states, several by their labels. */
function revisedInWords(
  command: Command & { readonly id: string },
  patch: Patch,
  study: Study,
  names: EntityNames,
): string {
  const kind = targetKind(command);
  const entry = patch.find((candidate) => candidate.kind === kind && candidate.id === command.id);
  const label = calledIn(kind, command.id, patch, study, names);
  if (!entry?.before || !entry.after) return `${label} edited`;
  const fields = fieldChanges(kind, entry.before, entry.after, names);
  const [only] = fields;
  if (!only) return `${label} confirmed as it is`;
  if (fields.length > 1 && !isValueFirst(kind, fields))
    return `${label}: ${fields.map(({ field }) => field).join(', ')}`;
  const others =
    fields.length > 1
      ? `; ${fields
          .slice(1)
          .map(({ field }) => field)
          .join(', ')}`
      : '';
  const field = only.field === 'value' ? '' : ` ${only.field}`;
  return `${label}${field} ${only.before} → ${only.after}${others}`;
}

function isValueFirst(kind: EntityKind, fields: readonly FieldChange[]): boolean {
  return kind === 'quantity' && fields[0]?.field === 'value';
}

function calledIn(kind: EntityKind, id: string, patch: Patch, study: Study, names: EntityNames): string {
  if (kind === 'study') return 'Study';
  if (kind === 'policy') return `Margin policy for ${names.entity(kind, id)}`;
  if (kind === 'verification') return `Verification of ${names.entity(kind, id)}`;
  if (kind !== 'quantity') return names.entity(kind, id);
  return capitalised(stateOf(patch, study, 'quantity', id)?.name ?? names.entity(kind, id));
}

function shareInWords(
  command: Extract<Command, { type: 'budget.propose' | 'budget.adopt' }>,
  patch: Patch,
  study: Study,
  names: EntityNames,
): string {
  const trace = stateOf(patch, study, 'trace', command.id);
  const child = trace && stateOf(patch, study, 'requirement', trace.childId);
  if (!trace || !child) return 'Edited a share of a budget';
  const share = child.limit ? `${child.key} ${measureInWords(child.limit.upper ?? child.limit.value)}` : child.key;
  const parent = names.entity('requirement', trace.parentId);
  if (command.type === 'budget.adopt') return `Adopted ${share} into the budget of ${parent}`;
  return command.share === 'proposed'
    ? `Proposed ${share} for the budget of ${parent}`
    : `Took back the proposed share ${share} from the budget of ${parent}`;
}
