import { expect, type Page } from '@playwright/test';
import { act, choose, dialog } from './sheet';

/** A line of the impact as it is shown: which requirement, its verdict before and after, its margin after. */
export interface ShownMove {
  readonly key: string;
  readonly before: string;
  readonly after: string;
}

/** Writes a change request from the list of changes; returns its key. */
export async function writeChange(page: Page, study: string, title: string, reason: string): Promise<string> {
  await page.goto(`/studies/${study}/changes`);
  await act(page, 'Write a change request');
  await dialog(page).getByLabel('Title').fill(title);
  await dialog(page).getByLabel('Reason').fill(reason);
  await dialog(page).getByRole('button', { name: 'Write it' }).click();
  await expect(page.getByRole('heading', { level: 1, name: title })).toBeVisible();
  return page.locator('.sheet-head .key').innerText();
}

/** Adds to the draft that is open the adoption of a proposed share. */
export async function addShare(page: Page, share: RegExp): Promise<void> {
  await page.getByRole('radio', { name: 'Adopt a proposed share' }).check();
  await choose(page.getByLabel('Proposed share', { exact: true }), share);
  await page.getByRole('button', { name: 'Add the edit' }).click();
}

/** Adds to the draft that is open another value of a quantity. */
export async function addValue(page: Page, quantity: RegExp, value: string, source: string): Promise<void> {
  await page.getByRole('radio', { name: 'The value of a quantity' }).check();
  await choose(page.getByLabel('Quantity', { exact: true }), quantity);
  await page.getByLabel('New value').fill(value);
  await page.getByLabel('Source').fill(source);
  await page.getByRole('button', { name: 'Add the edit' }).click();
}

/** Opens the sheet of a change request. */
export async function openChange(page: Page, study: string, key: string): Promise<void> {
  await page.goto(`/studies/${study}/changes/${key}`);
  await expect(page.locator('.sheet-head .key')).toHaveText(key);
}

/** Waits until the sheet says that the request is in this state. */
export async function expectState(page: Page, state: string): Promise<void> {
  await expect(page.locator('.sheet-head .line-of-facts')).toContainText(state);
}

/** Votes for the request that is open, with a remark. */
export async function voteFor(page: Page, remark: string): Promise<void> {
  await act(page, 'For');
  await dialog(page).getByLabel('Remark').fill(remark);
  await dialog(page).getByRole('button', { name: 'Vote for' }).click();
  await expect(dialog(page)).toHaveCount(0);
}

/** Approves the request that is open, with a reason. */
export async function approve(page: Page, reason: string): Promise<void> {
  await act(page, 'Approve');
  await dialog(page).getByLabel('Reason').fill(reason);
  await dialog(page).getByRole('button', { name: 'Approve' }).click();
  await expect(dialog(page)).toHaveCount(0);
}

/** The verdicts that the open request turns, or those it moves, as the sheet shows them. */
export async function shownMoves(page: Page, which: 'Turned' | 'Moved'): Promise<ShownMove[]> {
  const rows = page.getByRole('table', { name: which }).locator('tbody').getByRole('row');
  return rows.evaluateAll((lines) =>
    lines.map((line) => {
      const verdicts = [...line.querySelectorAll('td.verdict')].map((cell) => cell.textContent.trim().toLowerCase());
      return {
        key: line.querySelector('.key')?.textContent.trim() ?? '',
        before: verdicts[0] ?? '',
        after: verdicts[1] ?? '',
      };
    }),
  );
}
