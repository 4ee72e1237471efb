import { type Locator, type Page, expect } from '@playwright/test';

/** A reading of one's own of a demo excerpt, opened at the desk; gives its address. */
export async function startReading(page: Page, excerpt: string): Promise<string> {
  await page.goto('/library');
  await page.getByRole('link', { name: excerpt, exact: true }).last().click();
  await page.getByRole('button', { name: 'Start mine from this' }).or(page.getByRole('button', { name: 'Start my reading' })).first().click();
  await expect(page).toHaveURL(/\/desk\//, { timeout: 120_000 });
  await expect(labels(page).first()).toBeVisible({ timeout: 60_000 });
  return page.url();
}

export async function openDesk(page: Page, url: string): Promise<void> {
  await page.goto(url);
  await expect(labels(page).first()).toBeVisible({ timeout: 60_000 });
}

export function labels(page: Page): Locator {
  return page.locator('[data-label]');
}

/** The label that has the keyboard. */
export function current(page: Page): Locator {
  return page.locator('[data-label][tabindex="0"]');
}

export async function expectSaved(page: Page): Promise<void> {
  await expect(page.locator('[data-save-state]')).toHaveAttribute('data-save-state', 'saved');
}

/** What every label says, in order. */
export async function spokenLabels(page: Page): Promise<string[]> {
  return labels(page).evaluateAll((all) => all.map((label) => label.getAttribute('aria-label') ?? ''));
}

/** Reaches the score with the Tab key alone. */
export async function tabToScore(page: Page): Promise<void> {
  for (let i = 0; i < 60; i += 1) {
    await page.keyboard.press('Tab');
    if (await page.evaluate(() => document.activeElement?.hasAttribute('data-label') ?? false)) return;
  }
  throw new Error('the score was not reached with sixty Tabs');
}

/** Uploads a score and cuts one excerpt of it; gives the excerpt's page, once the proposal is there. */
export async function addExcerptOf(page: Page, file: { readonly name: string; readonly xml: string }, title: string, lastBar: number): Promise<void> {
  await page.goto('/library');
  await page.getByLabel('MusicXML files').setInputFiles({ name: file.name, mimeType: 'application/xml', buffer: Buffer.from(file.xml) });
  await page.getByLabel(/^Source/).fill('Made for the tests');
  await page.getByLabel(/^Rights/).fill('Public domain');
  await page.getByRole('button', { name: 'Add the score to the library' }).click();
  await expect(page.getByText('in the library', { exact: true }).or(page.getByText(/holds this file already/))).toBeVisible({ timeout: 90_000 });
  await page.goto('/library');
  await page.getByRole('link', { name: title, exact: true }).first().click();
  await page.getByLabel('From bar').fill('1');
  await page.getByLabel('To bar').fill(String(lastBar));
  await page.getByLabel('To bar').press('Tab');
  await page.getByLabel('What it is for').fill('To be opened at the desk');
  await page.getByRole('button', { name: 'Cut the excerpt' }).click();
  await expect(page.getByRole('row', { name: 'Proposal' })).toContainText(/labels? proposed/, { timeout: 120_000 });
}
