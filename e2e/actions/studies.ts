import { expect, type Page } from '@playwright/test';

/** Reads a view of the study through the API, as the person who is signed in on the page. */
export async function view<T>(page: Page, study: string, path: string): Promise<T> {
  const answer = await page.request.get(`/api/studies/${study}/${path}`);
  expect(answer.status(), `${path}: ${await answer.text()}`).toBe(200);
  return (await answer.json()) as T;
}
