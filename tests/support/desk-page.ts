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
