import type { ChangeSheet, VerdictMove } from '@shared/contract';
import { writeFormula } from '../actions/analyses';
import { addShare, addValue, expectState, openChange, shownMoves, writeChange } from '../actions/changes';
import { setInGrid } from '../actions/quantities';
import { linkAnalysis, openRequirement, proposeShare, ribbonPiece, writeBelow } from '../actions/requirements';
import { act, dialog, sheetVerdict } from '../actions/sheet';
import { view } from '../actions/studies';
import { expect, test } from '../fixtures/seats';

const STUDY = 'PETREL';

test('three people take a requirement to a change request before the board', async ({ seats }) => {
  test.setTimeout(420_000);
  const ines = await seats.of('Ines Okafor');
  const mika = await seats.of('Mika Sato');
  let key = '';
  let change = '';

  await test.step('The owner writes a requirement under VEH-001 and proposes it as a share of that budget', async () => {
    await openRequirement(ines, STUDY, 'VEH-001');
    key = await writeBelow(ines, {
      text: 'The propulsion system shall keep the target orbit until hand-over with a delta-v of at most 1.5 km/s.',
      title: 'Station keeping demand',
      rationale: 'Fourth demand on the delta-v of the vehicle, from arrival to the hand-over of the cargo.',
      relation: 'at most',
      value: '1.5 km/s',
      element: /^PRP /,
    });
    expect(key).toMatch(/^PRP-\d{3}$/);
    await expect(sheetVerdict(ines)).toHaveText('No evidence');
    await proposeShare(ines, 'VEH-001');

    await openRequirement(ines, STUDY, 'VEH-001');
    const piece = ribbonPiece(ines, key);
    await expect(piece).toHaveAttribute('title', new RegExp(`^${key} Station keeping demand: 1\\.5\\skm/s, proposed$`));
    await expect(piece).toHaveClass(/proposed/);
    expect(await piece.evaluate((element) => getComputedStyle(element).backgroundImage)).toContain('gradient');
  });

  await test.step('The analyst writes an analysis and links its output to the requirement', async () => {
    // A third of the 3.9 km/s held for arrival matching: 1.3 km/s, under the limit of 1.5 km/s.
    const analysis = await writeFormula(mika, STUDY, {
      name: 'Station keeping until hand-over',
      inputs: ['dv_adj'],
      line: 'dv_sk = dv_adj / 3',
      unit: 'km/s',
      label: 'station keeping demand',
    });
    expect(analysis.result).toMatch(/1\.3(00)?\skm\/s/);
    await openRequirement(mika, STUDY, key);
    await linkAnalysis(mika, new RegExp(`${analysis.key} dv_sk`));
    await expect(sheetVerdict(mika)).toHaveText('Compliant');
  });

  await test.step('The analyst changes the specific impulse; the page that the owner has open follows', async () => {
    await expect(sheetVerdict(ines)).toHaveText('Short margin');
    await ines.evaluate(() => document.body.setAttribute('data-opened', 'once'));
    await mika.goto(`/studies/${STUDY}/quantities`);
    await setInGrid(mika, 'I_sp', '6200 s');
    await expect(sheetVerdict(ines)).toHaveText('Non-compliant');
    await expect(
      ines.getByText(/It was short margin in the baseline, and was turned by r\d+, a direct edit/),
    ).toBeVisible();
    await setInGrid(mika, 'I_sp', '6700 s');
    await expect(sheetVerdict(ines)).toHaveText('Compliant');
    await expect(ines.locator('body'), 'the page was not loaded again').toHaveAttribute('data-opened', 'once');
  });

  await test.step('The owner raises a change request that adopts the share and cools the radiator', async () => {
    change = await writeChange(
      ines,
      STUDY,
      'Take station keeping into the delta-v budget, cool the radiator to 760 K',
      'The cargo is handed over months after arrival, and the heat-pipe working fluid loses margin above 800 K.',
    );
    await act(ines, 'Add an edit');
    await addShare(ines, new RegExp(`${key} .*VEH-001`));
    await expect(ines.getByRole('list', { name: 'Proposed edits' }).getByRole('listitem')).toHaveCount(1);
    await addValue(ines, /Radiator surface temperature/, '760 K', 'Cycle model PTL-TN-005, case 9');
    await act(ines, 'Submit');
    await expectState(ines, 'submitted');
  });

  await test.step('The board member sees exactly the verdicts that approval would turn and those it would move', async () => {
    const lena = await seats.of('Lena Brandt');
    await openChange(lena, STUDY, change);
    await act(lena, 'Take into assessment');
    await expectState(lena, 'in assessment');
    await act(lena, 'Put before the board');
    await dialog(lena).getByRole('button', { name: 'Put before the board' }).click();
    await expectState(lena, 'before the board');

    const { impact: predicted } = await view<ChangeSheet>(lena, STUDY, `changes/${change}`);
    expect(predicted.turned.length, 'the change turns verdicts').toBeGreaterThan(0);
    expect(predicted.moved.length, 'the change moves margins').toBeGreaterThan(0);
    expect(predicted.budgets.map((budget) => budget.key)).toContain('VEH-001');
    for (const [which, moves] of [
      ['Turned', predicted.turned],
      ['Moved', predicted.moved],
    ] as const)
      expect(await shownMoves(lena, which)).toEqual(moves.map(wordsOf));
  });
});

/** A predicted move as the sheet of the request shows it. */
function wordsOf({ key, before, after }: VerdictMove) {
  return { key, before: before?.verdict ?? 'new', after: after?.verdict ?? 'withdrawn' };
}
