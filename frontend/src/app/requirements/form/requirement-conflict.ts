import { type ConflictField, type Side } from '../../ui/conflict/conflict-view';
import { type RequirementText } from './requirement-text';

const LABELS: Readonly<Partial<Record<keyof RequirementText, string>>> = {
  text: 'Statement',
  title: 'Title',
  rationale: 'Rationale',
  level: 'Level',
  elementId: 'Allocated to',
  parameter: 'Parameter',
  relation: 'Relation',
  value: 'Limit value',
  upper: 'Upper limit',
  tolerance: 'Tolerance',
  temperature: 'What the temperature is',
  condition: 'Condition',
  openKind: 'What is open',
  estimate: 'Estimate',
  action: 'Action',
  openPersonId: 'Who resolves it',
  due: 'By when',
  openRationale: 'Why it is open',
};

/** Names of fields that have a place of their own on the form, as refusals name them. */
export const FIELD_NAMES: readonly string[] = [
  ...['text', 'title', 'rationale', 'level', 'elementId', 'parameter', 'limit', 'openItem'],
];

/** Both sides of every field, for the choice between them. */
export function conflictFields(theirs: RequirementText, mine: RequirementText): readonly ConflictField[] {
  return (Object.entries(LABELS) as [keyof RequirementText, string][]).map(([field, label]) => ({
    field,
    label,
    theirs: theirs[field],
    mine: mine[field],
  }));
}

/** What was typed, with their text where that was chosen. */
export function withTheirs(
  mine: RequirementText,
  theirs: RequirementText,
  chosen: Readonly<Record<string, Side>>,
): RequirementText {
  const taken = (Object.keys(mine) as (keyof RequirementText)[]).filter((field) => chosen[field] === 'theirs');
  return { ...mine, ...Object.fromEntries(taken.map((field) => [field, theirs[field]])) };
}

/** What was typed over what stands: fields that were not touched take what somebody else has made of them. */
export function typedOver(mine: RequirementText, before: RequirementText, theirs: RequirementText): RequirementText {
  const untouched = (Object.keys(mine) as (keyof RequirementText)[]).filter((field) => mine[field] === before[field]);
  return { ...mine, ...Object.fromEntries(untouched.map((field) => [field, theirs[field]])) };
}
