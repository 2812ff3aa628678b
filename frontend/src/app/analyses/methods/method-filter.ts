import { describeDimension, parseUnit } from '@shared/units';
import { matchesWords } from '../../ui/address/address';
import type { MethodView } from '../analyses-api';

/** What of the library is looked at; every part is empty when it does not narrow. */
export interface MethodFilter {
  readonly concept: string;
  /** Name of the quantity that a method gives: "power", "mass". */
  readonly gives: string;
  readonly q: string;
}

/** Methods that pass every part of a filter, in their order. */
export function filtered(methods: readonly MethodView[], filter: MethodFilter): readonly MethodView[] {
  return methods.filter(
    (method) =>
      (filter.concept === '' || method.concepts.includes(filter.concept)) &&
      (filter.gives === '' || givenBy(method).includes(filter.gives)) &&
      matchesWords(
        filter.q,
        ...[method.name, method.summary, method.reference, method.validity, method.family],
        ...[...method.inputs, ...method.outputs].flatMap(({ name, label }) => [name, label]),
      ),
  );
}

/** The kinds of numbers that a method gives, by the name of their dimension. */
export function givenBy(method: MethodView): readonly string[] {
  return [
    ...new Set(
      method.outputs.flatMap(({ unit }) => {
        const parsed = parseUnit(unit);
        return parsed.ok ? [describeDimension(parsed.unit.dimension)] : [];
      }),
    ),
  ];
}

/** Only the newest version of each method: older ones stand in analyses that pin them. */
export function newest(methods: readonly MethodView[]): readonly MethodView[] {
  const last = new Map<string, MethodView>();
  for (const method of methods) {
    const known = last.get(method.id);
    if (known === undefined || isNewer(method.version, known.version)) last.set(method.id, method);
  }
  return methods.filter((method) => last.get(method.id) === method);
}

function isNewer(version: string, than: string): boolean {
  return version.localeCompare(than, 'en', { numeric: true }) > 0;
}
