import AxeBuilder from '@axe-core/playwright';
import { expect, test } from '@playwright/test';
import { PHONE, demoPerson } from '../support/e2e';

test('a mail that the app sent can be read in the mail sink, and its link leads back', async ({ page }) => {
  const { email } = demoPerson('k.valderay');
  await page.goto('/sign-in/link');
  await page.getByLabel('E-mail').fill(email);
  await page.getByRole('button', { name: 'Send me a link' }).click();
  await expect(page.getByText('Look into your mailbox')).toBeVisible();
  const list = page.getByRole('navigation', { name: 'Mails, newest first' });
  await expect(async () => {
    await page.goto(`/mail-sink?to=${encodeURIComponent(email)}`);
    await expect(list.getByRole('link')).not.toHaveCount(0, { timeout: 1_000 });
  }).toPass();
  const link = page.getByRole('article', { name: 'The open mail' }).getByRole('link', { name: /\/sign-in\/link\?token=/ });
  await link.click();
  await expect(page).toHaveURL(/\/sign-in\/link\?token=/);
});

test('the mail sink fits a phone and has no serious accessibility fault', async ({ page }) => {
  await page.setViewportSize(PHONE);
  await page.goto('/mail-sink');
  await expect(page.getByRole('heading', { level: 1, name: 'Mail sink' })).toBeVisible();
  expect(await page.evaluate(() => document.documentElement.scrollWidth)).toBeLessThanOrEqual(PHONE.width);
  const { violations } = await new AxeBuilder({ page }).analyze();
  expect(violations.filter(({ impact }) => impact === 'serious' || impact === 'critical')).toEqual([]);
});

test('the health route says that every part is up', async ({ request }) => {
  const answer = await request.get('/api/health');
  expect(answer.status()).toBe(200);
  expect(await answer.json()).toEqual({ status: 'up', parts: { database: 'up', store: 'up', mail: 'up', worker: 'up' } });
});
