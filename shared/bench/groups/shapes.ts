import { lineOf, typicalTimes, type Line } from '../measure';
import { modelOf, specOf } from '../ours';
import { SpreadsheetPeer } from '../peers/hyperformula';
import { straightLine } from '../peers/straight-line';
import { deepStudy, nameOf, startValue, wideStudy, type Study } from '../study';

const SIZE = 10_000;

/** The two extreme shapes: one input read by 10,000 formulas, and a chain of 10,000. */
export async function shapesGroup(): Promise<Line[]> {
  return [
    ...(await shape('wide: one input read by 10,000 formulas', wideStudy(SIZE), 60)),
    ...(await shape('deep: a chain of 10,000 formulas', deepStudy(SIZE), 100)),
  ];
}

async function shape(name: string, study: Study, least: number): Promise<Line[]> {
  const model = modelOf(specOf(study));
  const sheet = new SpreadsheetPeer(study);
  const values = model.values([0, ...study.formulas.map(({ node }) => node)].map(nameOf));
  const run = await straightLine(study.formulas, []);
  const value = (i: number): number => startValue(0) + (i % 2) / 1000;
  const [ours = 0, theirs = 0, straight = 0] = typicalTimes([
    (i) => model.set(new Map([[nameOf(0), value(i)]])),
    (i) => sheet.set(0, value(i)),
    (i) => {
      values[0] = value(i);
      run(values);
    },
  ]);
  sheet.close();
  return [
    lineOf('shape', name, ours, theirs, 'HyperFormula', least),
    lineOf('shape', name, ours, straight, 'straight-line JavaScript'),
  ];
}
