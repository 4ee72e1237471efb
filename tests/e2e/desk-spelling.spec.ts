import { expect, test } from '@playwright/test';
import { labels, openDesk, startReading } from '../support/desk-page';
import { signIn } from '../support/e2e';

test('the convention sheet chosen at the desk changes what is printed and how typed text is read, and is there after a reload', async ({ page }) => {
  await signIn(page, 'assistant');
  const url = await startReading(page, 'Staircase');
  await labels(page).nth(1).click();
  await page.keyboard.type('Cad64');
  await page.keyboard.press('Enter');
  await labels(page).nth(3).click();
  await page.keyboard.type('V7/V');
  await page.keyboard.press('Enter');
  const cadential = labels(page).nth(1);
  const applied = labels(page).nth(3);
  const before = await cadential.locator('[data-numeral]').getAttribute('data-numeral');
  await expect(applied.locator('[data-numeral]')).toHaveAttribute('data-numeral', /V7\/V/);

  await page.getByRole('button', { name: 'More' }).click();
  await page.getByRole('menuitemradio', { name: 'I6/4, V of V, ♭II6' }).click();
  await expect(cadential.locator('[data-numeral]')).toHaveAttribute('data-numeral', /^I/);
  await expect(cadential.locator('[data-numeral]')).not.toHaveAttribute('data-numeral', before ?? '');
  await expect(applied.locator('[data-numeral]')).toHaveAttribute('data-numeral', /of/);

  // Under this sheet a typed I64 means the cadential six-four: the label is as it was.
  await cadential.click();
  await page.keyboard.type('I64');
  await page.keyboard.press('Enter');
  await openDesk(page, url);
  await expect(cadential.locator('[data-numeral]')).toHaveAttribute('data-numeral', /^I/);
  await page.getByRole('button', { name: 'More' }).click();
  await page.getByRole('menuitemradio', { name: /^as usual/ }).click();
  await expect(cadential.locator('[data-numeral]')).toHaveAttribute('data-numeral', before ?? '');
});
