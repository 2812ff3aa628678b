import type { BindableView } from '@shared/contract';
import { describeDimension } from '@shared/units';
import { knownDimension, outputsOf } from '../analysis-ports';
import { outputNode } from '../model';
import { byKey } from './verdict-view';
import type { ViewContext } from './view-context';

/** Everything in the study that an analysis input can be bound to, by key, with its present value in SI. */
export function bindableView({ proof: { study, model } }: ViewContext): BindableView {
  const quantities = study
    .all('quantity')
    .sort(byKey)
    .map(({ id, key, symbol, name, unit, value, temperature }) => {
      const dimension = describeDimension(knownDimension(unit));
      return { id, key, symbol, name, unit, dimension, si: value?.si ?? null, temperature };
    });
  const outputs = study
    .all('analysis')
    .sort(byKey)
    .flatMap((analysis) =>
      outputsOf(study, analysis).map((port) => {
        const node = outputNode(analysis.id, port.name);
        const outcome = model.has(node) ? model.outcome(node) : null;
        return {
          analysisId: analysis.id,
          key: analysis.key,
          output: port.name,
          name: port.label,
          unit: port.unit,
          dimension: describeDimension(port.dimension),
          si: outcome?.ok ? outcome.value : null,
        };
      }),
    );
  return { quantities, outputs };
}
