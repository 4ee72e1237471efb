import { expect, test } from '@playwright/test';
import { expectSaved, labels, openDesk, spokenLabels, startReading } from '../support/desk-page';
import { signIn } from '../support/e2e';
import { openOwnServer } from '../support/own-server';

interface Listed {
  readonly revisions: readonly { readonly words: string }[];
}

test('two browsers, one server killed and one network cut in between: nothing is lost, nothing done twice', async ({ page, browser }) => {
  test.setTimeout(240_000);
  const own = await openOwnServer();
  test.skip(own === null, 'the build is not known: run by npm test, or with NEXT_DIST_DIR');
  if (!own) return;
  try {
    await signIn(page, 'assistant');
    const url = await startReading(page, 'Staircase');
    const readingId = url.split('/').at(-1) ?? '';
    const count = await labels(page).count();
    const context = await browser.newContext({ storageState: await page.context().storageState(), viewport: { width: 1366, height: 768 } });
    const other = await context.newPage();
    await openDesk(other, `${own.address}/desk/${readingId}`);

    // The server of the second browser dies with an edit on its way; more are made meanwhile, and undone.
    await labels(other).nth(1).click();
    await other.keyboard.type('vi');
    await other.keyboard.press('Enter');
    await own.kill();
    await labels(other).nth(3).click();
    await other.keyboard.type('iii6');
    await other.keyboard.press('Enter');
    await labels(other).nth(5).click();
    await other.keyboard.type('IV6');
    await other.keyboard.press('Enter');
    await other.keyboard.press('Control+z');
    await expect(other.getByText('Not saved, kept here')).toBeVisible();

    // The first browser goes on with the server it has, and then its network is cut.
    await labels(page).nth(7).click();
    await page.keyboard.type('ii6');
    await page.keyboard.press('Enter');
    await expectSaved(page);
    await page.context().setOffline(true);
    await labels(page).nth(9).click();
    await page.keyboard.type('vi7');
    await page.keyboard.press('Enter');
    await expect(page.getByText('Not saved, kept here')).toBeVisible();

    await own.start();
    await page.context().setOffline(false);
    await expect(other.locator('[data-save-state]')).toHaveAttribute('data-save-state', 'saved', { timeout: 60_000 });
    await expect(page.locator('[data-save-state]')).toHaveAttribute('data-save-state', 'saved', { timeout: 60_000 });

    await expect.poll(() => spokenLabels(page), { timeout: 20_000 }).toEqual(await spokenLabels(other));
    const heard = await spokenLabels(page);
    expect(heard).toHaveLength(count);
    for (const [place, printed] of [[1, 'vi'], [3, 'iii6'], [7, 'ii6'], [9, 'vi7']] as const) {
      await expect(labels(page).nth(place).locator('[data-numeral]')).toHaveAttribute('data-numeral', printed);
    }
    const list = (await (await page.request.get(`/api/readings/${readingId}/revisions`)).json()) as Listed;
    expect(list.revisions.map((r) => r.words).sort()).toEqual(['Undone: Wrote a numeral.', ...Array<string>(5).fill('Wrote a numeral.')]);

    // Once more from nothing: what the browsers show is what is kept.
    await openDesk(page, url);
    expect(await spokenLabels(page)).toEqual(heard);
    await context.close();
  } finally {
    await own.kill();
  }
});
