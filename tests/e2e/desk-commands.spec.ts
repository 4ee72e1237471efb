import AxeBuilder from '@axe-core/playwright';
import { type Page, expect, test } from '@playwright/test';
import { current, expectSaved, labels, openDesk, spokenLabels, startReading } from '../support/desk-page';
import { signIn } from '../support/e2e';

async function violations(page: Page): Promise<string[]> {
  const found = await new AxeBuilder({ page }).withTags(['wcag2a', 'wcag2aa', 'wcag21aa', 'wcag22aa']).analyze();
  return found.violations.map(({ id, nodes }) => `${id} ${nodes[0]?.html}`);
}

async function choose(page: Page, item: string | RegExp): Promise<void> {
  await page.getByRole('button', { name: 'More' }).click();
  await page.getByRole('menuitem', { name: item }).click();
}

async function write(page: Page, place: number, text: string): Promise<void> {
  await labels(page).nth(place).click();
  await page.keyboard.type(text);
  await page.keyboard.press('Enter');
}

const numeralAt = (page: Page, place: number) => labels(page).nth(place).locator('[data-numeral]').first().getAttribute('data-numeral');

test.beforeEach(({ page }) => signIn(page, 'assistant'));

test('a pattern is copied and laid on a like passage, by keyboard and by mouse', async ({ page }) => {
  await startReading(page, 'Staircase');
  await labels(page).nth(1).click();
  await page.keyboard.press('Shift+ArrowRight');
  await page.keyboard.press('Control+c');
  const copied = [await numeralAt(page, 1), await numeralAt(page, 2)];
  await labels(page).nth(5).click();
  await page.keyboard.press('Control+v');
  await expect.poll(async () => [await numeralAt(page, 5), await numeralAt(page, 6)]).toEqual(copied);
  await page.keyboard.press('Control+z');
  await expect.poll(async () => [await numeralAt(page, 5), await numeralAt(page, 6)]).not.toEqual(copied);

  await labels(page).nth(1).click();
  await labels(page).nth(2).click({ modifiers: ['Shift'] });
  await choose(page, 'Copy the selected labels');
  await labels(page).nth(7).click();
  await choose(page, 'Lay the copy here, in this key');
  await expect.poll(async () => [await numeralAt(page, 7), await numeralAt(page, 8)]).toEqual(copied);
  await expectSaved(page);
});

test('a pivot is shown in both keys and is there after a reload; elsewhere it is refused', async ({ page }) => {
  const url = await startReading(page, 'Staircase');
  await write(page, 3, 'vi');
  await write(page, 4, 'A: ii6');
  await labels(page).nth(3).click();
  await page.keyboard.press('q');
  await expect(labels(page).nth(3).locator('[data-pivot]')).toContainText('A major');
  await expect(labels(page).nth(3)).toHaveAttribute('aria-label', /pivot: .*two in A major/);
  await expectSaved(page);
  await openDesk(page, url);
  await expect(labels(page).nth(3).locator('[data-pivot]')).toBeVisible();
  expect(await violations(page)).toEqual([]);
  await labels(page).nth(3).click();
  await choose(page, /^Pivot/);
  await expect(page.locator('[data-pivot]')).toHaveCount(0);
  await labels(page).nth(0).click();
  await page.keyboard.press('q');
  await expect(page.getByText('A pivot is the last label before another key.')).toBeAttached();
});

test('all from a chosen certainty on is accepted, the number said beforehand', async ({ page }) => {
  await startReading(page, 'Evening Hymn');
  await labels(page).first().click();
  await page.keyboard.press('z');
  const dialog = page.getByRole('dialog', { name: 'Accept from a certainty on' });
  const slider = dialog.getByRole('slider', { name: 'At least this certain' });
  await slider.fill('70');
  const said = (await dialog.getByText(/open suggestions\.$/).textContent()) ?? '';
  const count = Number(/^\d+/.exec(said)?.[0]);
  expect(count).toBeGreaterThan(0);
  expect(await violations(page)).toEqual([]);
  await dialog.getByRole('button', { name: /^Accept/ }).click();
  await expect(page.locator('[data-label][data-state="accepted"]')).toHaveCount(count);
  await page.keyboard.press('Control+z');
  await expect(page.locator('[data-label][data-state="accepted"]')).toHaveCount(0);
});

test('a note left over is named by hand, printed at its note, and taken back', async ({ page }) => {
  const url = await startReading(page, 'Evening Hymn');
  const kinds = page.locator('[data-left-over] select');
  let place = 0;
  for (; (await kinds.count()) === 0; place += 1) {
    await labels(page).nth(place).click();
    await expect(current(page)).toHaveAttribute('data-label', (await labels(page).nth(place).getAttribute('data-label')) ?? '');
  }
  await current(page).focus();
  await page.keyboard.press('T');
  await expect(kinds.first()).toBeFocused();
  await kinds.first().selectOption('escape tone');
  await expect(page.getByText('named by hand').first()).toBeVisible();
  await expectSaved(page);
  expect(await violations(page)).toEqual([]);
  await openDesk(page, url);
  await labels(page).nth(place - 1).click();
  await expect(page.locator('[data-tone="escape"]').first()).toBeVisible();
  await expect(kinds.first()).toHaveValue('escape');
  await kinds.first().selectOption('as first proposed');
  await expect(page.getByText('named by hand')).toHaveCount(0);
  await expectSaved(page);
});

test('keys can be set anew, and keep to the score', async ({ page }) => {
  const url = await startReading(page, 'Staircase');
  const count = await labels(page).count();
  await labels(page).nth(1).click();
  await page.keyboard.press('?');
  const sheet = page.getByRole('dialog', { name: 'Keys' });
  await sheet.getByRole('button', { name: /^Join with the next: j/ }).click();
  await page.keyboard.press('v');
  await expect(sheet.getByRole('alert')).toHaveText('Numerals begin with this key.');
  await page.keyboard.press('s');
  await expect(sheet.getByRole('alert')).toContainText('Split at a note');
  await page.keyboard.press('Control+j');
  await expect(sheet.getByRole('button', { name: /^Join with the next: Ctrl J/ })).toBeVisible();
  expect(await violations(page)).toEqual([]);
  await page.keyboard.press('Escape');
  await openDesk(page, url);
  await labels(page).nth(1).click();
  await page.keyboard.press('j');
  await expect(labels(page)).toHaveCount(count);
  await page.keyboard.press('Control+j');
  await expect(labels(page)).toHaveCount(count - 1);
  // In a field of the margin the desk's keys are letters.
  await page.keyboard.press('m');
  await page.getByLabel(/^A remark on/).pressSequentially('oxyz');
  await expect(page.getByLabel(/^A remark on/)).toHaveValue('oxyz');
  await page.getByRole('button', { name: 'All keys' }).click();
  await sheet.getByRole('button', { name: /^Join with the next/ }).click();
  await sheet.getByRole('button', { name: 'As it was' }).click();
  await expect(sheet.getByRole('button', { name: /^Join with the next: j/ })).toBeVisible();
});

test('tonicise or modulate is one command, and goes back', async ({ page }) => {
  await startReading(page, 'Staircase');
  await write(page, 3, 'V7/V');
  const before = await spokenLabels(page);
  await labels(page).nth(3).click();
  await page.keyboard.press('t');
  await expect(labels(page).nth(3)).toHaveAttribute('aria-label', /five seven in A major/);
  await choose(page, 'Tonicise or modulate');
  await expect.poll(() => spokenLabels(page)).toEqual(before);
});
