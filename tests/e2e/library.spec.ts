import AxeBuilder from '@axe-core/playwright';
import { type Page, expect, test } from '@playwright/test';
import { PHONE, signIn } from '../support/e2e';
import { bombMxl, musicXml, mxlOf } from '../support/small-score';

/** A title that no other run of these tests has used: the library refuses the same file twice. */
const RUN = Date.now().toString(36);

function upload(name: string, content: string | Uint8Array) {
  return { name, mimeType: 'application/octet-stream', buffer: Buffer.from(content) };
}

/** A page that has just come may not listen yet: what is chosen then is chosen again. */
async function chooseFiles(page: Page, ...files: ReturnType<typeof upload>[]): Promise<void> {
  await expect(async () => {
    await page.getByLabel('MusicXML files').setInputFiles(files);
    await expect(page.getByRole('form', { name: 'Files to bring in' })).toBeVisible({ timeout: 3000 });
  }).toPass();
}

async function state(page: Page, source: string, rights: string): Promise<void> {
  await page.getByLabel(/^Source/).fill(source);
  await page.getByLabel(/^Rights/).fill(rights);
}

/** Adds a score of twelve bars and waits until it is read; its title. */
async function addScore(page: Page, title: string): Promise<string> {
  await page.goto('/library');
  await chooseFiles(page, upload('twelve.mxl', mxlOf(musicXml({ title, composer: 'Verrin', bars: 12 }))));
  await state(page, 'Written by the tests', 'Public domain');
  await page.getByRole('button', { name: 'Add the score to the library' }).click();
  await expect(page.getByText('in the library', { exact: true })).toBeVisible({ timeout: 60_000 });
  return title;
}

async function expectNoViolation(page: Page): Promise<void> {
  const { violations } = await new AxeBuilder({ page }).withTags(['wcag2a', 'wcag2aa', 'wcag21aa', 'wcag22aa']).analyze();
  expect(violations.map(({ id, nodes }) => [id, nodes[0]?.html])).toEqual([]);
}

test.beforeEach(({ page }) => signIn(page, 'instructor'));

test('several files at once: the good ones come in, the others say what is wrong and where', async ({ page }) => {
  await page.goto('/library');
  await chooseFiles(
    page,
    upload('plain.musicxml', musicXml({ title: `Plain ${RUN}`, composer: 'Oslet' })),
    upload('broken.musicxml', musicXml({ title: 'Broken' }).replace('</note>', '</not>')),
    upload('bomb.mxl', bombMxl()),
    upload('notes.txt', 'no music'),
    upload('packed.mxl', mxlOf(musicXml({ title: `Packed ${RUN}`, composer: 'Verrin' }))),
  );
  const files = page.getByRole('form', { name: 'Files to bring in' }).getByRole('listitem');
  await expect(files.filter({ hasText: 'broken.musicxml' })).toContainText(/line \d+/, { timeout: 60_000 });
  await expect(files.filter({ hasText: 'bomb.mxl' })).toContainText('100 MB');
  await expect(files.filter({ hasText: 'notes.txt' })).toContainText('must end in .musicxml, .xml or .mxl');
  const plain = files.filter({ hasText: 'plain.musicxml' });
  await expect(plain.getByLabel('Title')).toHaveValue(`Plain ${RUN}`);
  await expect(plain.getByLabel('Composer')).toHaveValue('Oslet');
  await plain.getByLabel('Title').fill(`Renamed ${RUN}`);

  await page.getByLabel(/^Source/).fill('');
  await page.getByRole('button', { name: 'Add 2 scores to the library' }).click();
  await expect(page.getByText('Say where the file comes from')).toBeVisible();
  await state(page, 'Written by the tests', 'Public domain');
  await page.getByRole('button', { name: 'Add 2 scores to the library' }).click();
  await expect(files.getByText('in the library', { exact: true })).toHaveCount(2, { timeout: 90_000 });

  const table = page.getByRole('table', { name: 'Scores and excerpts' });
  await expect(table.getByRole('row', { name: `Renamed ${RUN}` })).toContainText('ready to cut');
  await expect(table.getByRole('row', { name: `Packed ${RUN}` })).toContainText('Verrin');
  await page.getByRole('button', { name: 'Clear what is done' }).click();
  await expect(page.getByRole('form', { name: 'Files to bring in' })).toBeHidden();
});

test('the same file again is told and leads to the score that is there', async ({ page }) => {
  const title = await addScore(page, `Twice ${RUN}`);
  await page.reload();
  await chooseFiles(page, upload('again.mxl', mxlOf(musicXml({ title, composer: 'Verrin', bars: 12 }))));
  await page.getByRole('button', { name: 'Add the score to the library' }).click();
  await expect(page.getByText(`The library holds this file already, as “${title}”.`)).toBeVisible();
  await page.getByRole('link', { name: 'Open the score' }).click();
  await expect(page.getByRole('heading', { name: title, level: 1 })).toBeVisible();
});

test('a lost connection keeps the file and sends it when asked again', async ({ page }) => {
  await page.goto('/library');
  await chooseFiles(page, upload('lost.musicxml', musicXml({ title: `Lost ${RUN}` })));
  await state(page, 'Written by the tests', 'Public domain');
  await page.route('**/api/scores', (route) => route.abort('internetdisconnected'));
  await page.getByRole('button', { name: 'Add the score to the library' }).click();
  await expect(page.getByText('The connection was lost while sending.')).toBeVisible();
  await page.unroute('**/api/scores');
  await page.getByRole('button', { name: 'Try again' }).click();
  await expect(page.getByText('in the library', { exact: true })).toBeVisible({ timeout: 60_000 });
});

test('an excerpt is cut by printed numbers or on the score, and its chords are proposed', async ({ page }) => {
  const title = await addScore(page, `Cut ${RUN}`);
  await page.getByRole('link', { name: title }).first().click();
  await page.getByLabel('From bar').fill('3');
  await page.getByLabel('To bar').fill('99');
  await expect(page.getByText('No such bar')).toBeVisible();
  await page.getByLabel('To bar').fill('6');
  await page.getByLabel('To bar').press('Tab');
  await expect(page.getByLabel('Title')).toHaveValue(`${title}, bars 3–6`);

  // On the score: the first press begins the range, the second ends it.
  await page.locator('[data-bar="4"]').last().click({ timeout: 60_000 });
  await page.locator('[data-bar="7"]').last().click();
  await expect(page.getByLabel('From bar')).toHaveValue('5');
  await expect(page.getByLabel('To bar')).toHaveValue('8');

  await page.getByLabel('What it is for').fill('Tonic and dominant');
  await page.getByRole('button', { name: 'Cut the excerpt' }).click();
  await expect(page.getByRole('heading', { name: `${title}, bars 5–8` })).toBeVisible();
  await expect(page.getByText('Tonic and dominant')).toBeVisible();
  const readings = page.getByRole('table', { name: 'Readings of this excerpt' });
  await expect(readings.getByRole('row', { name: 'Proposal' })).toContainText(/labels? proposed/, { timeout: 90_000 });
  await expectNoViolation(page);

  await page.getByRole('button', { name: 'Start my reading' }).click();
  await expect(page).toHaveURL(/\/desk\//, { timeout: 60_000 });
  await page.goBack();
  await page.reload();
  await expect(readings.getByRole('row', { name: /Reading by/ })).toContainText('yours, seen by nobody else');
  await readings.getByRole('button', { name: 'Make a key' }).click();
  await page.getByRole('dialog').getByRole('button', { name: 'Make the key' }).click();
  await expect(page).toHaveURL(/\/desk\//, { timeout: 60_000 });

  await page.goto('/library');
  await page.getByLabel('Search').fill(`cut ${RUN}`);
  await expect(page.getByRole('status').filter({ hasText: /1 of \d+ scores/ })).toBeVisible();
});

test('the analysis that a file carries becomes a reading', async ({ page }) => {
  const title = `Sung ${RUN}`;
  await page.goto('/library');
  await chooseFiles(page, upload('sung.musicxml', musicXml({ title, bars: 8, lyrics: ['I', 'V7', 'I', 'so', 'I', 'G: I', '', ''] })));
  await state(page, 'Written by the tests', 'Public domain');
  await page.getByRole('button', { name: 'Add the score to the library' }).click();
  await expect(page.getByText('in the library', { exact: true })).toBeVisible({ timeout: 60_000 });
  await page.getByRole('link', { name: title }).first().click();
  await page.getByRole('button', { name: 'Cut the excerpt' }).click();
  await page.getByRole('button', { name: 'Use the file’s own analysis' }).click();
  const dialog = page.getByRole('dialog');
  await expect(dialog.getByLabel('Numerals written as lyrics')).toBeChecked();
  await expect(dialog.getByText('5 labels in these bars')).toBeVisible();
  await expect(dialog.getByRole('row')).toHaveCount(6);
  await dialog.getByText('One label could not be read').click();
  await expect(dialog.getByText('Bar 4: so')).toBeVisible();
  await expectNoViolation(page);
  await dialog.getByRole('button', { name: 'Make it a reading' }).click();
  await expect(page).toHaveURL(/\/desk\//, { timeout: 60_000 });
  await expect(page.locator('[data-numeral]').first()).toBeVisible({ timeout: 60_000 });
});

test('a score that excerpts were cut from stays; one without is deleted and brought back', async ({ page }) => {
  const title = await addScore(page, `Gone ${RUN}`);
  await page.getByRole('link', { name: title }).first().click();
  await page.getByRole('button', { name: 'Edit' }).click();
  await page.getByRole('dialog').getByLabel('Composer').fill('Anonymous');
  await page.getByRole('dialog').getByRole('button', { name: 'Save' }).click();
  await expect(page.getByRole('dialog')).toBeHidden();
  await expect(page.getByText('Anonymous').first()).toBeVisible();
  await page.getByRole('button', { name: 'Delete' }).click();
  await expect(page.getByText(`“${title}” was deleted.`)).toBeVisible();
  await page.getByRole('button', { name: 'Undo' }).click();
  await expect(page.getByRole('heading', { name: title, level: 1 })).toBeVisible();
});

for (const theme of ['day', 'night'] as const) {
  test(`by ${theme}, on a screen and on a phone, the library and a score have no serious fault`, async ({ page, context, baseURL }) => {
    await context.addCookies([{ name: 'theme', value: theme, url: baseURL ?? 'http://127.0.0.1' }]);
    await page.goto('/library');
    await expect(page.getByRole('table')).toBeVisible();
    await expectNoViolation(page);
    await page.setViewportSize(PHONE);
    await expectNoViolation(page);
    const wider = await page.evaluate(() => document.documentElement.scrollWidth > document.documentElement.clientWidth);
    expect(wider).toBe(false);
    await page.getByRole('table').getByRole('rowheader').getByRole('link').first().click();
    await expect(page.locator('.engraving svg').first()).toBeVisible({ timeout: 60_000 });
    await expectNoViolation(page);
  });
}

test('the theme is remembered and worn from the first byte', async ({ page }) => {
  await page.goto('/library');
  await page.getByRole('button', { name: 'Day or night' }).click();
  await page.getByRole('menuitemradio', { name: 'Night' }).click();
  await expect(page.locator('html')).toHaveAttribute('data-theme', 'night');
  const html = await (await page.request.get('/library')).text();
  expect(html).toMatch(/<html[^>]*data-theme="night"/);
});

test('a student finds no library', async ({ page, context }) => {
  await context.clearCookies();
  await signIn(page, 'student');
  await page.goto('/library');
  await expect(page.getByRole('heading', { name: 'There is nothing here' })).toBeVisible();
});
