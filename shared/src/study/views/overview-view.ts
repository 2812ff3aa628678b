import type { OverviewView, Requirement } from '@shared/contract';
import { checkBounds, quantityKind } from '@shared/methods';
import { formatSi } from '@shared/units';
import { methodWarnings } from '../prove';
import { driversOf, movesOf, thinRequirements } from './overview-drivers';
import { waitsFor } from './overview-waits';
import { shownQuantity } from './turning-points';
import { byKey, provenOf, requirementsInForce, verdictCounts } from './verdict-view';
import type { ViewContext } from './view-context';

/** Whether the study closes, what fails or is thin, what drives that, what changed since the baseline, what waits for me. */
export function overviewView(context: ViewContext, since: { readonly edits: number }): OverviewView {
  const inForce = requirementsInForce(context);
  const counts = verdictCounts(context);
  const thin = thinRequirements(context, inForce);
  return {
    closes: inForce.length > 0 && counts.compliant === inForce.length,
    counts,
    total: inForce.length,
    marks: inForce.map(({ id, key, title }) => {
      const { verdict, margin } = provenOf(context, id);
      return { key, title, verdict, percent: margin?.percent ?? null };
    }),
    drivers: driversOf(context, thin),
    moves: movesOf(context, thin),
    waits: waitsFor(context),
    since: {
      baseline: context.baseline?.key ?? null,
      edits: since.edits,
      turned: turnedSinceBaseline(context, inForce),
      reopened: inForce.filter(({ id }) => provenOf(context, id).closeOut === 'reopened').map(({ key }) => key),
    },
    warnings: [...methodCautions(context), ...unusualQuantities(context)],
  };
}

function turnedSinceBaseline(context: ViewContext, inForce: readonly Requirement[]): OverviewView['since']['turned'] {
  return inForce.flatMap(({ id, key }) => {
    const from = context.baseline?.verdicts.get(id);
    const to = provenOf(context, id).verdict;
    return from && from !== to ? [{ key, from, to }] : [];
  });
}

/** What methods say about their present inputs, such as leaving their range of validity. */
function methodCautions({ proof }: ViewContext): OverviewView['warnings'] {
  const { study, model } = proof;
  return study
    .all('analysis')
    .filter(({ kind }) => kind === 'method')
    .sort(byKey)
    .flatMap(({ id, key }) => methodWarnings(study, model, id).map((text) => ({ key, text })));
}

/** Quantities outside the soft bounds of their kind: possible, and unusual enough to be said. */
function unusualQuantities({ proof }: ViewContext): OverviewView['warnings'] {
  return proof.study
    .all('quantity')
    .sort(byKey)
    .flatMap((quantity) => {
      const soft = quantity.kind ? quantityKind(quantity.kind)?.soft : undefined;
      if (!soft || !quantity.value) return [];
      const { si, unit } = shownQuantity(quantity, quantity.value.si);
      const show = (value: number): string => formatSi(value, unit, { temperature: quantity.temperature });
      const unusual = checkBounds(si, soft, show);
      if (!unusual) return [];
      const usual = unusual.replace(/^must/, 'should');
      return [{ key: quantity.key, text: `${quantity.name} is ${show(si)}; it ${usual}.` }];
    });
}
