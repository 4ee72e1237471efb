import { expect, test } from '@playwright/test';
import { addExcerptOf, current, expectSaved, labels } from '../support/desk-page';
import { signIn } from '../support/e2e';
import { quartetXml } from '../support/quartet';

const BARS = 600;

test('six hundred bars of a quartet open at the bar asked for; only what is near the window is drawn', async ({ page }) => {
  test.setTimeout(240_000);
  await signIn(page, 'assistant');
  await addExcerptOf(page, { name: 'long-quartet.musicxml', xml: quartetXml(BARS) }, 'A long quartet', BARS);
  await page.getByRole('button', { name: 'Start my reading' }).click();
  await expect(page).toHaveURL(/\/desk\//, { timeout: 60_000 });
  await page.goto(`${page.url()}?bar=412`);
  await expect(current(page)).toHaveAttribute('aria-label', /^Bar 41[12],/, { timeout: 60_000 });
  await expect(current(page)).toBeInViewport();
  const drawn = () => page.locator('[data-sheet] .engraving').count();
  const sheets = await page.locator('[data-sheet]').count();
  expect(sheets).toBeGreaterThan(20);
  await expect.poll(drawn).toBeLessThanOrEqual(8);
  expect(await labels(page).count()).toBeLessThan(BARS / 2);

  // An edit there is an edit like any other.
  await current(page).click();
  await page.keyboard.type('vi');
  await page.keyboard.press('Enter');
  await expectSaved(page);

  // By the keyboard to the end and back: the sheet that is worked on is always drawn.
  await page.locator('[data-label][tabindex="0"]').focus();
  await page.keyboard.press('End');
  await expect(current(page)).toHaveAttribute('aria-label', /^Bar (599|600),/);
  await expect(current(page)).toBeInViewport({ timeout: 30_000 });
  await expect.poll(drawn).toBeLessThanOrEqual(8);
  await page.keyboard.press('Home');
  await expect(current(page)).toHaveAttribute('aria-label', /^Bar 1,/);
  await expect(current(page)).toBeInViewport({ timeout: 30_000 });
});
