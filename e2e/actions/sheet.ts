import { expect, type Locator, type Page } from '@playwright/test';

/** Takes an action of the title block, also where it stands under "More". */
export async function act(page: Page, label: string): Promise<void> {
  const actions = page.getByRole('group', { name: 'Actions of this sheet' });
  const button = actions.getByRole('button', { name: label, exact: true });
  const more = actions.getByRole('button', { name: 'More' });
  await expect(button.or(more).first()).toBeVisible();
  if (await button.isVisible()) return button.click();
  await more.click();
  await page.getByRole('menuitem', { name: label, exact: true }).click();
}

/** The dialog that is open. */
export function dialog(page: Page): Locator {
  return page.getByRole('dialog');
}

/** Chooses the option of a list whose words match, once it is there. */
export async function choose(list: Locator, words: RegExp): Promise<void> {
  const matching = (): Promise<string[]> =>
    list.locator('option').evaluateAll(
      (options, pattern) =>
        options
          .filter((option): option is HTMLOptionElement => option instanceof HTMLOptionElement)
          .filter(({ label }) => new RegExp(pattern).test(label))
          .map(({ value }) => value),
      words.source,
    );
  await expect.poll(async () => (await matching()).length, `options like ${words.source}`).toBe(1);
  await list.selectOption(await matching());
}

/** The verdict at the head of a requirement sheet. */
export function sheetVerdict(page: Page): Locator {
  return page.locator('article.sheet header dp-verdict-mark');
}
