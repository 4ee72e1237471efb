import AxeBuilder from '@axe-core/playwright';
import { expect, test } from '@playwright/test';
import { current, expectSaved, labels, startReading } from '../support/desk-page';
import { signIn } from '../support/e2e';

test('side by side: differences are named, gone through and taken over, by keyboard and by mouse', async ({ page }) => {
  await signIn(page, 'assistant');
  await startReading(page, 'Staircase');
  await labels(page).nth(1).click();
  await page.keyboard.type('IV');
  await page.keyboard.press('Enter');
  await labels(page).nth(6).click();
  await page.keyboard.type('I');
  await page.keyboard.press('Enter');
  await labels(page).nth(9).click();
  await page.keyboard.press('j');
  await expectSaved(page);

  await page.getByRole('button', { name: 'Side by side' }).click();
  await page.getByRole('menuitem', { name: /the proposal/ }).click();
  const margin = page.getByRole('complementary', { name: 'Margin' });
  const found = margin.getByRole('tabpanel', { name: /^Differences/ }).getByRole('listitem');
  await expect(found.first()).toContainText('another', { timeout: 30_000 });
  const count = await found.count();
  expect(count).toBeGreaterThanOrEqual(3);
  await expect(page.locator('[data-beside][data-differs="true"]').first()).toBeVisible();
  expect((await new AxeBuilder({ page }).withTags(['wcag2a', 'wcag2aa', 'wcag21aa', 'wcag22aa']).analyze()).violations.map(({ id }) => id)).toEqual([]);

  await labels(page).first().click();
  await page.keyboard.press('x');
  await expect(current(page)).toHaveAttribute('aria-label', /four in D major/);
  await expect(margin.locator('[aria-current="true"]')).toContainText(/another root|another inversion/);
  await page.keyboard.press('y');
  await expect(found).toHaveCount(count - 1);
  await page.keyboard.press('Control+z');
  await expect(found).toHaveCount(count);
  await page.keyboard.press('Control+Shift+z');
  await expect(found).toHaveCount(count - 1);

  await found.first().getByRole('button').click();
  while ((await found.count()) > 0) {
    const left = await found.count();
    await found.first().getByRole('button').click();
    await margin.getByRole('button', { name: 'Take theirs over' }).click();
    await expect.poll(() => found.count()).toBeLessThan(left);
  }
  await expect(margin.getByText('the two readings are alike.')).toBeVisible();
  await expectSaved(page);
});
