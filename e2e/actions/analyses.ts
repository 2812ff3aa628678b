import { expect, type Page } from '@playwright/test';
import { act } from './sheet';

/** A formula analysis of one line; its inputs are picked by the symbols of quantities. */
export interface WrittenFormula {
  readonly name: string;
  readonly inputs: readonly string[];
  readonly line: string;
  readonly unit: string;
  readonly label: string;
}

/** Writes a formula analysis from the list of analyses; returns its key and what the line comes to as it is typed. */
export async function writeFormula(
  page: Page,
  study: string,
  formula: WrittenFormula,
): Promise<{ key: string; result: string }> {
  await page.goto(`/studies/${study}/analyses`);
  await act(page, 'Write an analysis');
  await page.getByLabel('Name', { exact: true }).fill(formula.name);
  for (const symbol of formula.inputs) {
    const picker = page.getByRole('combobox', { name: 'Add an input' });
    await picker.fill(symbol);
    await expect(
      page.getByRole('listbox', { name: 'Add an input' }).getByRole('option', { selected: true }),
    ).toContainText(symbol);
    await picker.press('Enter');
    await expect(page.getByLabel(`Symbol of input ${symbol}`)).toHaveValue(symbol);
  }
  await page.getByRole('textbox', { name: 'Line 1', exact: true }).fill(formula.line);
  await page.getByLabel('Unit of line 1').fill(formula.unit);
  await page.getByLabel('Label of line 1').fill(formula.label);
  const shown = page.getByLabel('Result of line 1');
  await expect(shown).not.toBeEmpty();
  const result = await shown.innerText();
  await act(page, 'Save the analysis');
  const key = page.locator('.sheet-head .key');
  await expect(key).toBeVisible();
  return { key: await key.innerText(), result };
}
