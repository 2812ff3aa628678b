import type { BindableView, BindingSource } from '@shared/contract';
import type { Constant } from '@shared/constants';
import { type Dimension, parseUnit } from '@shared/units';

/** Something that an input can be bound to: a quantity, an output of an analysis or a constant. */
export interface Source {
  readonly from: BindingSource;
  readonly group: 'Quantities' | 'Outputs of analyses' | 'Constants';
  /** Where it is found: "Q-004", "AN-012 m_p", "g_0". */
  readonly key: string;
  readonly symbol: string;
  readonly name: string;
  readonly unit: string;
  readonly dimension: Dimension;
  readonly temperature: 'absolute' | 'difference';
  readonly si: number | null;
}

/** All sources; those of the study first. An analysis cannot be bound to itself. */
export function sourcesOf(view: BindableView, constants: readonly Constant[], ownId: string | null): readonly Source[] {
  const quantities = view.quantities.map((one) => ({
    from: { quantityId: one.id },
    group: 'Quantities' as const,
    key: one.key,
    symbol: one.symbol,
    name: one.name,
    unit: one.unit,
    temperature: one.temperature,
    si: one.si,
  }));
  const outputs = view.outputs
    .filter(({ analysisId }) => analysisId !== ownId)
    .map((one) => ({
      from: { analysisId: one.analysisId, output: one.output },
      group: 'Outputs of analyses' as const,
      key: `${one.key} ${one.output}`,
      symbol: one.output,
      name: one.name,
      unit: one.unit,
      temperature: 'absolute' as const,
      si: one.si,
    }));
  const fixed = constants.map((one) => ({
    from: { constant: one.id },
    group: 'Constants' as const,
    key: one.symbol,
    symbol: one.symbol,
    name: one.name,
    unit: one.unit,
    temperature: 'absolute' as const,
    si: one.value,
  }));
  return [...quantities, ...outputs, ...fixed].flatMap((one) => {
    const parsed = parseUnit(one.unit);
    return parsed.ok ? [{ ...one, dimension: parsed.unit.dimension }] : [];
  });
}

/** One word for a binding, the same for the same source. */
export function sourceId(from: BindingSource): string {
  if ('quantityId' in from) return `quantity ${from.quantityId}`;
  if ('analysisId' in from) return `output ${from.analysisId} ${from.output}`;
  return `constant ${from.constant}`;
}

/** The name an input gets when it is bound: the symbol, with a number behind it where that is taken. */
export function freeName(symbol: string, taken: ReadonlySet<string>): string {
  const base = symbol.replace(/[^A-Za-z0-9_]/g, '') || 'x';
  if (!taken.has(base)) return base;
  for (let number = 2; ; number++) if (!taken.has(`${base}_${number}`)) return `${base}_${number}`;
}
