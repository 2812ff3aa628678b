import { expect, type Page } from '@playwright/test';

/** Types a value into the row of a quantity in the register, as one does in a spreadsheet. */
export async function setInGrid(page: Page, symbol: string, typed: string): Promise<void> {
  await page.getByLabel('Find by key or word').fill(symbol);
  const row = page.locator('.ag-row').filter({ has: page.getByText(symbol, { exact: true }) });
  await expect(row).toHaveCount(1);
  const cell = row.locator('[col-id="value"]');
  await cell.dblclick();
  const editor = cell.getByRole('textbox');
  await editor.fill(typed);
  await editor.press('Enter');
}
