import AxeBuilder from '@axe-core/playwright';
import { expect, test } from '@playwright/test';
import { labels, startReading } from '../support/desk-page';
import { signIn } from '../support/e2e';
import { audioContexts, listenTo, loudness } from '../support/listen';

test('sound: silent until asked; by keyboard the score, the chord and the reduction; by mouse tempo, staves, again and again', async ({ page }) => {
  await listenTo(page);
  const violations: string[] = [];
  page.on('console', (message) => message.text().includes('Content Security Policy') && violations.push(message.text()));
  await signIn(page, 'assistant');
  await startReading(page, 'Staircase');
  await labels(page).nth(1).click();
  expect(await audioContexts(page)).toBe(0);

  const cursor = page.locator('[data-play-cursor]');
  await labels(page).nth(1).focus();
  await page.keyboard.press('Space');
  await expect.poll(() => loudness(page)).toBeGreaterThan(0.005);
  const begun = await cursor.getAttribute('data-play-cursor');
  await expect(cursor).not.toHaveAttribute('data-play-cursor', begun ?? '');
  await page.keyboard.press('Space');
  await expect(cursor).toBeHidden();
  await expect.poll(() => loudness(page)).toBeLessThan(0.0005);

  await page.keyboard.press('h');
  await expect.poll(() => loudness(page)).toBeGreaterThan(0.005);
  await expect.poll(() => loudness(page)).toBeLessThan(0.0005);
  await page.keyboard.press('H');
  await expect(cursor).toBeVisible();
  await page.keyboard.press('Space');
  await expect(cursor).toBeHidden();

  const strip = page.getByRole('region', { name: 'Sound' });
  const axe = await new AxeBuilder({ page }).withTags(['wcag2a', 'wcag2aa', 'wcag21aa', 'wcag22aa']).analyze();
  expect(axe.violations.map(({ id, nodes }) => [id, nodes[0]?.html])).toEqual([]);
  await strip.getByRole('slider', { name: 'Quarters a minute' }).fill('200');
  await strip.getByRole('checkbox', { name: 'Again and again' }).check();
  await strip.getByRole('button', { name: 'Selection' }).click();
  const first = await cursor.getAttribute('data-play-cursor');
  // The label's one moment comes again and again; without that it would be over within a second.
  await page.waitForTimeout(2_500);
  await expect(cursor).toHaveAttribute('data-play-cursor', first ?? '');
  for (const staff of await strip.getByRole('group', { name: 'Staves to be heard' }).getByRole('checkbox').all()) await staff.uncheck();
  await expect.poll(() => loudness(page)).toBeLessThan(0.0005);
  await strip.getByRole('checkbox', { name: 'Again and again' }).uncheck();
  await expect(strip.getByRole('button', { name: 'From here' })).toBeVisible();
  await strip.getByRole('button', { name: 'Close the sound' }).click();
  await expect(strip).toBeHidden();
  expect(violations).toEqual([]);
});
