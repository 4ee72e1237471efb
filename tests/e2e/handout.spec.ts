import { readFile } from 'node:fs/promises';
import AxeBuilder from '@axe-core/playwright';
import { type Page, expect, test } from '@playwright/test';
import { PHONE, signIn } from '../support/e2e';

/** From the library to the handout of Tobias Wrenfield's own reading of the Evening Hymn. */
async function openHandout(page: Page): Promise<void> {
  await signIn(page, 't.wrenfield');
  await page.goto('/library');
  await page.locator('a[href^="/excerpts/"]', { hasText: 'Evening Hymn' }).first().click();
  await page.getByRole('link', { name: 'Hand out: Reading by Tobias Wrenfield' }).filter({ visible: true }).first().click();
  await expect(page.getByRole('heading', { level: 1, name: 'Handout' })).toBeVisible();
}

async function engraved(page: Page): Promise<void> {
  await expect(page.getByRole('img', { name: /^Page 1 of/ })).toBeVisible({ timeout: 90_000 });
  await expect(page.getByRole('status').filter({ hasText: 'Engraving' })).toBeHidden({ timeout: 90_000 });
}

test('an instructor prints a worksheet with blanks, then the key, as PDF', async ({ page }) => {
  // Four engravings.
  test.slow();
  await openHandout(page);
  await engraved(page);
  await page.getByLabel('Applied chords').check();
  await page.getByLabel('Title').fill('Evening Hymn, section B');
  await expect(page.getByText('Engraving…')).toBeVisible();
  await engraved(page);
  const sheet = page.getByRole('img', { name: /^Page 1 of/ });
  await expect(sheet).toContainText('Evening Hymn, section B');
  await expect(sheet).toContainText('Worksheet');
  await expect(page.getByRole('status').filter({ hasText: 'blanks' })).toBeVisible();
  const download = page.waitForEvent('download');
  await page.getByRole('link', { name: 'Download PDF' }).click();
  const file = await download;
  expect(file.suggestedFilename()).toBe('Evening Hymn, section B (worksheet).pdf');
  expect((await readFile(await file.path())).subarray(0, 5).toString()).toBe('%PDF-');
  await page.getByLabel('Key', { exact: true }).check();
  await page.getByLabel('Paper').selectOption('Letter');
  await expect(page.getByText('Engraving…')).toBeVisible();
  await engraved(page);
  await expect(sheet).toContainText('G major');
  await expect(page.getByRole('group', { name: 'Ask for' })).toBeHidden();
});

test('spans are chosen one by one; an empty title is refused and nothing is lost', async ({ page }) => {
  test.slow();
  await openHandout(page);
  await engraved(page);
  await page.getByLabel('Those I choose').check();
  const spans = page.getByRole('list', { name: 'Spans to ask for, by bar' }).getByRole('button');
  const all = await spans.count();
  await spans.first().click();
  await expect(spans.first()).toHaveAttribute('aria-pressed', 'false');
  await engraved(page);
  await expect(page.getByRole('status').filter({ hasText: `${all - 1} blanks` })).toBeVisible({ timeout: 90_000 });
  await page.getByLabel('Title').fill('');
  await expect(page.getByRole('alert').filter({ hasText: 'A handout needs a title.' })).toBeVisible();
  await expect(page.getByRole('img', { name: /^Page 1 of/ })).toBeVisible();
});

test('the handout works on a phone and axe finds nothing serious, by day and by night', async ({ page }) => {
  await page.setViewportSize(PHONE);
  await openHandout(page);
  await engraved(page);
  for (const colorScheme of ['light', 'dark'] as const) {
    await page.emulateMedia({ colorScheme, reducedMotion: 'reduce' });
    const { violations } = await new AxeBuilder({ page }).analyze();
    expect(violations.filter(({ impact }) => impact === 'serious' || impact === 'critical').map(({ id, nodes }) => `${id}: ${nodes[0]?.html}`)).toEqual([]);
  }
  expect(await page.evaluate(() => document.documentElement.scrollWidth <= window.innerWidth)).toBe(true);
});

test('a student finds no handout page', async ({ page }) => {
  await openHandout(page);
  const address = page.url();
  await page.context().clearCookies();
  await signIn(page, 'a.dovell');
  await page.goto(address);
  await expect(page.getByRole('heading', { level: 1, name: 'There is nothing here' })).toBeVisible();
  await expect(page.getByRole('heading', { name: 'Handout' })).toHaveCount(0);
});
