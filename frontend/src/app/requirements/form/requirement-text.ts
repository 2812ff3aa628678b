import type { CommandOf, Limit, LimitInput, Measure, MeasureInput, OpenItem, Relation } from '@shared/contract';
import { DIMENSIONLESS, type Dimension, parseMeasure } from '@shared/units';
import { dimensionTyped, isTypedTemperature, readAny } from './typed-limit';

/** A requirement as it is typed: every field the text in its control, so that nothing typed is lost whatever is wrong with it. */
export interface RequirementText {
  readonly text: string;
  readonly title: string;
  readonly rationale: string;
  readonly level: string;
  readonly prefix: string;
  readonly elementId: string;
  readonly parameter: string;
  readonly relation: Relation | '';
  readonly value: string;
  readonly upper: string;
  readonly tolerance: string;
  readonly temperature: 'absolute' | 'difference';
  readonly condition: string;
  readonly openKind: OpenItem['kind'] | '';
  readonly estimate: string;
  readonly action: string;
  readonly openPersonId: string;
  readonly due: string;
  readonly openRationale: string;
}

export const BLANK: RequirementText = {
  text: '',
  title: '',
  rationale: '',
  level: '',
  prefix: '',
  elementId: '',
  parameter: '',
  relation: '',
  value: '',
  upper: '',
  tolerance: '',
  temperature: 'absolute',
  condition: '',
  openKind: '',
  estimate: '',
  action: '',
  openPersonId: '',
  due: '',
  openRationale: '',
};

/** What stands in a requirement, as a read model or an entity has it. */
export interface Written {
  readonly text: string;
  readonly title: string;
  readonly rationale: string;
  readonly level: string;
  readonly elementId: string | null;
  readonly parameter: string | null;
  readonly limit: Limit | null;
  readonly openItem: OpenItem | null;
}

/** The texts of what stands, as its author typed them. */
export function textOf(written: Written): RequirementText {
  const { limit, openItem } = written;
  return {
    ...BLANK,
    text: written.text,
    title: written.title,
    rationale: written.rationale,
    level: written.level,
    elementId: written.elementId ?? '',
    parameter: written.parameter ?? '',
    ...(limit === null
      ? {}
      : {
          relation: limit.relation,
          value: typed(limit.value),
          upper: typed(limit.upper),
          tolerance: typed(limit.tolerance),
          temperature: limit.temperature,
          condition: limit.condition,
        }),
    ...(openItem === null
      ? {}
      : {
          openKind: openItem.kind,
          estimate: openItem.estimate,
          action: openItem.action,
          openPersonId: openItem.personId,
          due: openItem.due,
          openRationale: openItem.rationale,
        }),
  };
}

function typed(measure: Measure | null): string {
  return measure === null ? '' : `${measure.text} ${measure.unit}`.trim();
}

/** What is wrong with what was typed, by field, each in a sentence. */
export type Faults = Readonly<Partial<Record<keyof RequirementText, string>>>;

/** Everything that can be said before the server is asked; `isNew` also asks for what the key is made of. */
export function faultsOf(text: RequirementText, isNew: boolean): Faults {
  const faults: Partial<Record<keyof RequirementText, string>> = {};
  if (text.text.trim() === '')
    faults.text = 'A requirement needs its statement: what shall do what, within which limit.';
  if (text.title.trim() === '') faults.title = 'A short title is needed; lists and drawings show it.';
  if (text.level === '') faults.level = 'Choose the level that it belongs to.';
  if (isNew && text.prefix.trim() === '' && text.elementId === '')
    faults.prefix = 'Allocate it to an element, or give a key prefix such as MIS.';
  if (isNew && text.prefix.trim() !== '' && !/^[A-Z][A-Z0-9]{1,7}$/.test(text.prefix.trim()))
    faults.prefix = `“${text.prefix}” is no key prefix. Right would be 2 to 8 capital letters or digits, such as MIS.`;
  return { ...faults, ...limitFaults(text), ...openFaults(text) };
}

function limitFaults(text: RequirementText): Faults {
  if (text.relation === '')
    return text.value.trim() === ''
      ? {}
      : { relation: 'Say how the value limits it: at least, at most, between or equal within.' };
  const value = readAny(text.value, text.temperature);
  if (!value.ok) return { value: value.message };
  const dimension = dimensionOf(text.value);
  if (text.relation === 'between') {
    const upper = parseMeasure(text.upper, { ...dimension, temperature: text.temperature });
    if (!upper.ok) return { upper: upper.message };
    if (upper.measure.si <= value.measure.si)
      return { upper: `“${text.upper}” is not above ${text.value}; the upper end must be the larger one.` };
  }
  if (text.relation === 'equal within') {
    const tolerance = parseMeasure(text.tolerance, { ...dimension, temperature: 'difference' });
    if (!tolerance.ok) return { tolerance: tolerance.message };
  }
  return {};
}

function dimensionOf(value: string): { readonly dimension: Dimension } {
  return { dimension: dimensionTyped(value) ?? DIMENSIONLESS };
}

function openFaults(text: RequirementText): Faults {
  if (text.openKind === '') return {};
  return {
    ...(text.action.trim() === '' ? { action: 'Say what is done to resolve it.' } : {}),
    ...(text.openPersonId === '' ? { openPersonId: 'Say who resolves it.' } : {}),
    ...(text.due === '' ? { due: 'Give the day by which it is resolved.' } : {}),
  };
}

/** The fields of a requirement as the commands take them; call it when there are no faults. */
export function fieldsOf(
  text: RequirementText,
): Omit<CommandOf<'requirement.create'>, 'type' | 'id' | 'prefix' | 'parentIds'> {
  return {
    text: text.text.trim(),
    title: text.title.trim(),
    rationale: text.rationale.trim(),
    level: text.level,
    elementId: text.elementId === '' ? null : text.elementId,
    parameter: text.parameter.trim() === '' ? null : text.parameter.trim(),
    limit: limitOf(text),
    openItem:
      text.openKind === ''
        ? null
        : {
            kind: text.openKind,
            estimate: text.estimate.trim(),
            action: text.action.trim(),
            personId: text.openPersonId,
            due: text.due,
            rationale: text.openRationale.trim(),
          },
  };
}

function limitOf(text: RequirementText): LimitInput | null {
  if (text.relation === '') return null;
  const value = measureOf(text.value, text.temperature);
  if (value === null) return null;
  const upper = text.relation === 'between' ? measureOf(text.upper, text.temperature) : null;
  const tolerance = text.relation === 'equal within' ? measureOf(text.tolerance, 'difference') : null;
  return {
    relation: text.relation,
    value,
    ...(upper === null ? {} : { upper }),
    ...(tolerance === null ? {} : { tolerance }),
    temperature: isTypedTemperature(text.value) ? text.temperature : 'absolute',
    condition: text.condition.trim(),
  };
}

function measureOf(typedText: string, temperature: 'absolute' | 'difference'): MeasureInput | null {
  const result = readAny(typedText, temperature);
  return result.ok ? { text: result.measure.text, unit: result.measure.unit } : null;
}

/** Fields whose texts differ, as `requirement.revise` takes them: limit and open item each as one. */
export function changesBetween(
  before: RequirementText,
  after: RequirementText,
): CommandOf<'requirement.revise'>['changes'] {
  const [old, next] = [fieldsOf(before), fieldsOf(after)];
  const names = (Object.keys(next) as (keyof typeof next)[]).filter(
    (name) => JSON.stringify(old[name]) !== JSON.stringify(next[name]),
  );
  return Object.fromEntries(names.map((name) => [name, next[name]]));
}
