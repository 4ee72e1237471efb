import AxeBuilder from '@axe-core/playwright';
import { type Page, expect, test } from '@playwright/test';
import { expectSaved, labels, spokenLabels, startReading } from '../support/desk-page';
import { demoPerson, signIn } from '../support/e2e';

async function write(page: Page, place: number, text: string): Promise<void> {
  await labels(page).nth(place).click();
  await page.keyboard.type(text);
  await page.keyboard.press('Enter');
  await expectSaved(page);
}

test('history: who, when and what is listed, and any state can be brought back and undone', async ({ page }) => {
  await signIn(page, 'assistant');
  await startReading(page, 'Staircase');
  const beginning = await spokenLabels(page);
  await write(page, 1, 'IV');
  const once = await spokenLabels(page);
  await write(page, 2, 'vi6');
  await labels(page).nth(3).click();
  await page.keyboard.press('j');
  await expectSaved(page);
  const now = await spokenLabels(page);

  await page.getByRole('tab', { name: 'History' }).click();
  const list = page.getByRole('list', { name: 'Saved edits, the newest first' });
  await expect(list.getByRole('listitem')).toHaveCount(3);
  await expect(list.getByRole('listitem').last()).toContainText(demoPerson('assistant').name);
  await expect(list.getByRole('listitem').last()).toContainText('bar 1, beat 3');
  expect((await new AxeBuilder({ page }).withTags(['wcag2a', 'wcag2aa', 'wcag21aa', 'wcag22aa']).analyze()).violations.map(({ id }) => id)).toEqual([]);

  await list.getByRole('listitem').last().getByRole('button', { name: 'Bring this state back' }).click();
  await expect.poll(() => spokenLabels(page)).toEqual(once);
  await expectSaved(page);
  await expect(list.getByRole('listitem')).toHaveCount(4);
  await page.getByRole('button', { name: 'Undo' }).click();
  await expect.poll(() => spokenLabels(page)).toEqual(now);
  await expectSaved(page);
  await page.getByRole('button', { name: 'Bring back how it began' }).click();
  await expect.poll(() => spokenLabels(page)).toEqual(beginning);
  await expectSaved(page);
});

test('a remark that names someone offers the names, and tells them by mail unless they switched it off', async ({ page, browser }) => {
  const { name } = demoPerson('i.rookhope');
  await signIn(page, 'assistant');
  const proposal = page.getByRole('row', { name: 'Proposal' });
  await page.goto('/library');
  await page.getByRole('link', { name: 'Evening Hymn', exact: true }).last().click();
  await proposal.getByRole('link', { name: 'Open' }).last().click();
  await expect(labels(page).first()).toBeVisible({ timeout: 60_000 });
  await labels(page).nth(2).click();
  await page.keyboard.press('m');
  const margin = page.getByRole('complementary', { name: 'Margin' });
  const words = `A doubt of mine, number ${Date.now()}`;
  await margin.getByLabel(/^A remark on/).pressSequentially(`${words} @oo`);
  const offered = margin.getByRole('listbox', { name: 'People to name' }).getByRole('option');
  await expect(offered.first()).toBeVisible();
  while ((await margin.getByRole('option', { selected: true }).textContent()) !== name) await page.keyboard.press('ArrowDown');
  await page.keyboard.press('Enter');
  await expect(margin.getByLabel(/^A remark on/)).toHaveValue(`${words} @${name} `);
  await margin.getByRole('button', { name: 'Send' }).click();
  await expect(margin.getByText(words)).toBeVisible();

  const named = await browser.newContext({ baseURL: test.info().project.use.baseURL ?? '' });
  const theirs = await named.newPage();
  const { email } = demoPerson('i.rookhope');
  await signIn(theirs, 'i.rookhope');
  await expect(async () => {
    await theirs.goto(`/mail-sink?to=${encodeURIComponent(email)}`);
    await expect(theirs.getByText('A remark on Evening Hymn').first()).toBeVisible({ timeout: 1_000 });
  }).toPass({ timeout: 60_000 });
  await theirs.goto('/account');
  await theirs.getByRole('checkbox', { name: /^Remarks:/ }).uncheck();
  await expect(theirs.getByText('No mail about remarks from now on.').first()).toBeVisible();
  await theirs.reload();
  await expect(theirs.getByRole('checkbox', { name: /^Remarks:/ })).not.toBeChecked();
  await theirs.getByRole('checkbox', { name: /^Remarks:/ }).check();
  await expect(theirs.getByText('You get mail about remarks.').first()).toBeVisible();
  await named.close();
});
