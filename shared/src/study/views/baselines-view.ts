import type { BaselinesView, Verdict } from '@shared/contract';
import { bearsOn } from './quantities-view';
import { byKey, countVerdicts, requirementsInForce } from './verdict-view';
import { personRef, type ViewContext } from './view-context';

/** Baselines, newest first, with the verdicts frozen in each (by its key), and what a new one would take in. */
export function baselinesView(
  context: ViewContext,
  counts: ReadonlyMap<string, Readonly<Record<Verdict, number>>>,
): BaselinesView {
  const { study } = context.proof;
  const bearing = bearsOn(context);
  return {
    rows: study
      .all('baseline')
      .sort((a, b) => byKey(b, a))
      .map((baseline) => ({
        ...baseline,
        person: personRef(context, baseline.takenBy),
        counts: counts.get(baseline.key) ?? countVerdicts([]),
      })),
    candidates: {
      requirements: requirementsInForce(context)
        .filter(({ state }) => state !== 'baselined')
        .map(({ id, key, title, state, openItem }) => ({ id, key, title, state, toBeResolved: openItem !== null })),
      quantities: study
        .all('quantity')
        .filter(({ state }) => state === 'working')
        .sort(byKey)
        .map((quantity) => {
          const { id, key, name } = quantity;
          return { id, key, name, bearsOn: bearing(quantity).length };
        })
        .filter((quantity) => quantity.bearsOn > 0),
    },
  };
}
