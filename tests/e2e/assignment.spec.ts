import { readFile } from 'node:fs/promises';
import AxeBuilder from '@axe-core/playwright';
import { type Browser, type Page, expect, test } from '@playwright/test';
import { current, expectSaved, labels } from '../support/desk-page';
import { PHONE, demoPerson, signIn } from '../support/e2e';
import { mailsTo } from '../support/mail-sink';

/** One course from its first name on the roster to the marks that came back; each test goes on from the one before. */
test.describe.configure({ mode: 'serial', timeout: 300_000 });

const COURSE = `Figured bass ${Date.now()}`;
const TITLE = `Cadences ${Date.now()}`;
const [DARIA, COSMO] = [demoPerson('d.lindquill'), demoPerson('c.pettibrand')];

/** A page with a score to engrave, on a busy machine. */
const SLOW = { timeout: 120_000 };

let courseUrl = '';
let assignmentUrl = '';
let submissionUrl = '';

async function expectNoViolation(page: Page): Promise<void> {
  const { violations } = await new AxeBuilder({ page }).withTags(['wcag2a', 'wcag2aa', 'wcag21aa', 'wcag22aa']).analyze();
  expect(violations.map(({ id, nodes }) => [id, nodes[0]?.html])).toEqual([]);
}

/** Reads it at both sizes: nothing wider than the window, nothing that axe finds. */
async function expectGoodAtBothSizes(page: Page): Promise<void> {
  for (const size of [{ width: 1366, height: 768 }, PHONE]) {
    await page.setViewportSize(size);
    await expectNoViolation(page);
    expect(await page.evaluate(() => document.documentElement.scrollWidth)).toBeLessThanOrEqual(size.width);
  }
  await page.setViewportSize({ width: 1366, height: 768 });
}

async function openAs(browser: Browser, who: string, url: string): Promise<Page> {
  const page = await (await browser.newContext()).newPage();
  await signIn(page, who);
  await page.goto(url);
  return page;
}

test('the instructor opens a course and adds people from a pasted list', async ({ page }) => {
  await signIn(page, 't.wrenfield');
  await page.goto('/courses');
  await expectGoodAtBothSizes(page);
  await page.getByRole('button', { name: 'New course' }).click();
  const dialog = page.getByRole('dialog', { name: 'New course' });
  await dialog.getByLabel('Title').fill(COURSE);
  await dialog.getByLabel('Term').fill('Winter');
  await dialog.getByRole('button', { name: 'Open the course' }).click();
  await expect(page.getByRole('heading', { level: 1, name: COURSE })).toBeVisible();
  courseUrl = page.url();

  await page.getByRole('tab', { name: /^People/ }).click();
  await page.getByRole('button', { name: 'Add people' }).click();
  const people = page.getByRole('dialog', { name: 'Add people' });
  await people.getByRole('textbox', { name: 'List' }).fill(`name;e-mail\n${DARIA.name};${DARIA.email}\nno address here\n${COSMO.name};${COSMO.email}`);
  await expect(people.getByText('2 to add, 1 left out.')).toBeVisible();
  await expect(people.getByText('There is no e-mail in this line.')).toBeVisible();
  await expectNoViolation(page);
  await people.getByRole('button', { name: 'Add 2 people' }).click();
  await expect(people.getByText('2 added, 0 invited by mail')).toBeVisible();
  await people.getByRole('button', { name: 'Done' }).click();
  await expect(page.getByRole('table', { name: 'Roster' })).toContainText(DARIA.name);
  await expectGoodAtBothSizes(page);

  await page.getByRole('tab', { name: 'Spelling of labels' }).click();
  await page.getByLabel('Cadential six-four').selectOption('tonic');
  await page.getByRole('button', { name: 'Spell labels this way' }).click();
  await expect(page.getByText('Labels are spelled this way now.')).toBeVisible();
  await expectGoodAtBothSizes(page);
});

test('the instructor sets an assignment: what is asked, what is right beside the key, how it is marked', async ({ page }) => {
  await signIn(page, 't.wrenfield');
  await page.goto(courseUrl);
  await page.getByRole('link', { name: 'New assignment' }).first().click();
  await page.getByRole('radio', { name: 'Staircase' }).check();
  await page.getByLabel('Title of the assignment').fill(TITLE);
  await expectGoodAtBothSizes(page);
  await page.getByRole('radio', { name: /Wrenfield/ }).first().check();
  await page.getByRole('button', { name: 'Make the draft' }).click();
  await expect(page.getByRole('heading', { level: 1, name: TITLE })).toBeVisible(SLOW);
  assignmentUrl = page.url().replace(/#.*$/, '');

  await page.getByRole('button', { name: 'Ask none' }).click();
  await expect(page.getByText('This cannot open yet')).toBeVisible();
  await expect(labels(page).first()).toBeVisible(SLOW);
  // Two on the score with the keys, one in the list.
  await labels(page).first().click();
  await page.keyboard.press('Enter');
  await page.keyboard.press('ArrowRight');
  await page.keyboard.press('Enter');
  await page.getByRole('checkbox', { name: 'Ask bar 2, beat 1' }).check();
  await expect(page.getByText(/^3 of \d+ labels asked, 6 points$/)).toBeVisible();
  await labels(page).nth(1).click();
  await page.getByRole('textbox', { name: 'Accept also' }).fill('V65');
  await expect(page.getByText(/^Spells /)).toBeVisible();
  await page.getByRole('button', { name: 'Accept', exact: true }).click();
  await expect(page.getByRole('button', { name: 'Take away' })).toBeVisible();
  await expectGoodAtBothSizes(page);

  await page.getByRole('tab', { name: 'How it is marked' }).click();
  await expect(page.getByRole('table', { name: /What this rubric gives/ })).toContainText('partly right');
  await page.getByLabel('Points per label').fill('4');
  await page.getByRole('button', { name: 'Save the rubric' }).click();
  await expect(page.getByText('The rubric is saved.')).toBeVisible();
  await expectGoodAtBothSizes(page);

  await page.getByRole('tab', { name: 'Form and dates' }).click();
  await page.getByLabel('Instructions').fill('Look at the bass first.');
  await page.getByLabel('Due').fill('2030-01-02T12:00');
  await page.getByLabel('Closes').fill('2030-01-01T12:00');
  await page.getByRole('button', { name: 'Save', exact: true }).click();
  await expect(page.getByText('This closes before it is due.')).toBeVisible();
  await page.getByLabel('Closes').fill('2030-01-03T12:00');
  await page.getByRole('button', { name: 'Save', exact: true }).click();
  await expect(page.getByText('Saved.', { exact: true })).toBeVisible();
  await expectGoodAtBothSizes(page);

  await page.getByRole('button', { name: 'Open it' }).click();
  await expect(page.getByText('Students see it now.')).toBeVisible();
});

test('a student finds it, writes, is told of blanks, and hands in; another tries what is not theirs', async ({ browser }) => {
  const page = await openAs(browser, 'd.lindquill', '/courses');
  await expectGoodAtBothSizes(page);
  await page.getByRole('link', { name: TITLE }).click();
  await expect(page.getByText('Look at the bass first.')).toBeVisible();
  await expectGoodAtBothSizes(page);
  await page.getByRole('button', { name: 'Begin' }).click();
  await expect(page).toHaveURL(/\/submissions\//, SLOW);
  submissionUrl = page.url();
  await expect(labels(page).first()).toBeVisible(SLOW);
  await expect(page.getByRole('tab', { name: 'Why' })).toHaveCount(0);
  await labels(page).first().click();
  await page.keyboard.type('I');
  await page.keyboard.press('Tab');
  await page.keyboard.press('Escape');
  await expect(labels(page).first()).toHaveAttribute('aria-label', /one/);
  await current(page).click();
  await page.keyboard.type('V65');
  await page.keyboard.press('Enter');
  await expectSaved(page);
  await expectNoViolation(page);

  await page.getByRole('button', { name: 'Hand in' }).click();
  const dialog = page.getByRole('dialog', { name: 'Hand this in?' });
  await expect(dialog.getByText('One label is blank')).toBeVisible();
  await expect(dialog).toContainText('bar 2, beat 1');
  await dialog.getByRole('button', { name: 'Hand in with blanks' }).click();
  await expect(page.getByText('Handed in. You can read it here')).toBeVisible(SLOW);

  const other = await openAs(browser, 'c.pettibrand', submissionUrl);
  await expect(other.getByRole('heading', { level: 1 })).not.toContainText(TITLE);
  await expect(other.getByText(DARIA.name)).toHaveCount(0);
  const marking = await other.goto(`${assignmentUrl}/marking`);
  expect(marking?.status()).toBe(404);
});

test('work survives a lost connection and is not handed in half saved', async ({ browser }) => {
  const page = await openAs(browser, 'c.pettibrand', assignmentUrl);
  await page.getByRole('button', { name: 'Begin' }).click();
  await expect(labels(page).first()).toBeVisible(SLOW);
  await page.route('**/edits**', (route) => route.abort('internetdisconnected'));
  await labels(page).first().click();
  await page.keyboard.type('I6');
  await page.keyboard.press('Enter');
  await expect(page.getByText('Not saved, kept here')).toBeVisible();
  await page.getByRole('button', { name: 'Hand in' }).click();
  await expect(page.getByText('Not everything is saved yet')).toBeVisible();
  await page.getByRole('button', { name: 'Back to the desk' }).click();
  await page.unroute('**/edits**');
  await page.getByRole('button', { name: 'Try now' }).click();
  await expectSaved(page);
  await page.getByRole('button', { name: 'Hand in' }).click();
  await page.getByRole('button', { name: 'Hand in with blanks' }).click();
  await expect(page.getByText('Handed in. You can read it here')).toBeVisible(SLOW);
});

test('the instructor marks by question, by keyboard and for one student alone, and releases', async ({ page }) => {
  await signIn(page, 't.wrenfield');
  await page.goto(`${assignmentUrl}/marking`);
  await expect(page.getByText('0 of 6 answers looked at')).toBeVisible();
  await expectGoodAtBothSizes(page);
  const groups = page.locator('[data-group]');
  await expect(groups).toHaveCount(2);
  await expect(groups.first()).toContainText('as keyed');
  await expect(groups.nth(1)).toContainText('partly right');
  await groups.nth(1).focus();
  await page.keyboard.press('+');
  await expect(groups.nth(1)).toContainText('changed by hand');
  await page.keyboard.press('Backspace');
  await expect(groups.nth(1)).not.toContainText('changed by hand');
  await groups.nth(1).getByRole('button', { name: 'Write a remark' }).click();
  await groups.nth(1).getByLabel(/^Remark to/).fill('The bass is the root.');
  await groups.nth(1).getByRole('button', { name: 'Save the remark' }).click();
  await expect(groups.nth(1).getByText('The bass is the root.')).toBeVisible();
  await groups.first().focus();
  await page.keyboard.press('Enter');
  await expect(groups.first()).toContainText('looked at');

  await page.getByRole('tab', { name: /^By student/ }).click();
  await page.getByLabel('Student', { exact: true }).selectOption({ label: DARIA.name });
  await expect(labels(page).first()).toBeVisible(SLOW);
  await expectGoodAtBothSizes(page);

  await page.getByRole('button', { name: 'Release marks' }).click();
  const dialog = page.getByRole('dialog', { name: 'Release marks' });
  await expect(dialog).toContainText('answers that nobody has looked at');
  await dialog.getByRole('button', { name: 'Release 2' }).click();
  await expect(page.getByText('All marks are released.')).toBeVisible();
});

test('the student gets a mail without marks and reads the feedback on the score, on a phone too', async ({ browser }) => {
  const subject = `Your analysis has been marked: ${TITLE}`;
  let link = '';
  await expect
    .poll(async () => {
      const mail = (await mailsTo(DARIA.email)).find((one) => one.subject === subject);
      link = /\/submissions\/\S+\/feedback/.exec(mail?.text ?? '')?.[0] ?? '';
      return link;
    }, SLOW)
    .not.toBe('');
  const page = await openAs(browser, 'd.lindquill', link);
  await expect(page.getByText('8 of 12 points').first()).toBeVisible();
  await expect(labels(page).first()).toBeVisible(SLOW);
  await expect(page.getByText('accepted alternative').first()).toBeVisible();
  await expect(page.getByText('Nothing was written here.').first()).toBeVisible();
  // The assignment does not show its key.
  await expect(page.getByText('Key', { exact: true })).toHaveCount(0);
  await expectGoodAtBothSizes(page);
  await page.setViewportSize(PHONE);
  await page.getByRole('checkbox', { name: 'Only the 1 to look at again' }).check();
  await expect(page.getByRole('listitem').filter({ hasText: 'blank' }).first()).toBeVisible();
});

test('the gradebook sums up, is downloaded as CSV, and says what to reteach', async ({ page }) => {
  await signIn(page, 't.wrenfield');
  await page.goto(`${courseUrl.replace(/#.*$/, '')}/gradebook`);
  await expect(page.getByRole('row', { name: new RegExp(DARIA.name) })).toContainText('8 of 12');
  await expectGoodAtBothSizes(page);
  const download = page.waitForEvent('download');
  await page.getByRole('link', { name: 'Download as CSV' }).click();
  const csv = await readFile(await (await download).path(), 'utf8');
  expect(csv).toContain(`${DARIA.name},${DARIA.email},8,12,released`);
  await page.getByRole('tab', { name: 'What to reteach' }).click();
  await expect(page.getByRole('table', { name: 'Kinds of error' })).toContainText('left blank');
  await expectGoodAtBothSizes(page);
});
