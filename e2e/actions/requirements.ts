import { expect, type Locator, type Page } from '@playwright/test';
import { act, choose, dialog } from './sheet';

/** What a requirement is written with. */
export interface WrittenRequirement {
  readonly text: string;
  readonly title: string;
  readonly rationale: string;
  readonly relation: 'at least' | 'at most';
  readonly value: string;
  readonly element: RegExp;
}

/** Opens the sheet of a requirement. */
export async function openRequirement(page: Page, study: string, key: string): Promise<void> {
  await page.goto(`/studies/${study}/requirements/${key}`);
  await expect(page.locator('article.sheet header .key')).toHaveText(key);
}

/** Writes a requirement below the one whose sheet is open; returns its key. */
export async function writeBelow(page: Page, requirement: WrittenRequirement): Promise<string> {
  await act(page, 'Write one below');
  await expect(page.getByRole('heading', { level: 1, name: 'Write a requirement' })).toBeVisible();
  // The level below the parent's shows that the form has taken its start from it.
  await expect(page.getByLabel('Level')).not.toHaveValue('');
  await page.getByLabel('Statement').fill(requirement.text);
  await page.getByLabel('Title').fill(requirement.title);
  await page.getByLabel('Rationale').fill(requirement.rationale);
  await page.getByLabel('Relation').selectOption(requirement.relation);
  await page.getByLabel('Limit value with unit').fill(requirement.value);
  await choose(page.getByLabel('Allocated to'), requirement.element);
  await act(page, 'Save the requirement');
  const key = page.locator('article.sheet header .key');
  await expect(key).toBeVisible();
  return key.innerText();
}

/** Proposes the requirement whose sheet is open as a share of its parent's budget. */
export async function proposeShare(page: Page, parent: string): Promise<void> {
  await page.getByRole('button', { name: `Propose as share of ${parent}` }).click();
  await expect(page.getByRole('button', { name: `Take the proposal back from ${parent}` })).toBeVisible();
}

/** The piece of the budget ribbon that stands for a child. */
export function ribbonPiece(page: Page, child: string): Locator {
  return page.locator('dp-budget-ribbon [title]').and(page.getByTitle(new RegExp(`^${child} `)));
}

/** Links an output of an analysis to the requirement whose sheet is open. */
export async function linkAnalysis(page: Page, output: RegExp): Promise<void> {
  await act(page, 'Link an analysis');
  await choose(dialog(page).getByLabel('Output of an analysis'), output);
  await dialog(page).getByRole('button', { name: 'Link it' }).click();
  await expect(dialog(page)).toHaveCount(0);
}
