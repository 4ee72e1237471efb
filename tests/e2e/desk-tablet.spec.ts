import AxeBuilder from '@axe-core/playwright';
import { expect, test } from '@playwright/test';
import { current, expectSaved, labels, startReading } from '../support/desk-page';
import { signIn } from '../support/e2e';

test.use({ viewport: { width: 1024, height: 768 }, hasTouch: true });

const LEAST = 24;

test('on a tablet everything is done by touch, with targets of 24 pixels', async ({ page }) => {
  await signIn(page, 'assistant');
  await startReading(page, 'Staircase');
  const small = await page.locator('[role="toolbar"] button:visible, [role="toolbar"] a:visible, ol[aria-label="Bars"] button:visible').evaluateAll(
    (all, least) => all.map((e) => ({ name: e.textContent, ...e.getBoundingClientRect().toJSON() })).filter((e) => e.width < least || e.height < least).map((e) => `${e.name} ${e.width}×${e.height}`),
    LEAST,
  );
  expect(small).toEqual([]);
  // A label takes a touch within 24 pixels of the screen round its middle.
  const missed = await labels(page).evaluateAll((all, least) => {
    const reach = least / 2 - 1;
    return all.slice(0, 8).filter((label) => {
      label.scrollIntoView({ block: 'center', inline: 'center' });
      const box = label.getBoundingClientRect();
      const [x, y] = [box.left + box.width / 2, box.top + box.height / 2];
      const hits = (px: number, py: number) => document.elementFromPoint(px, py)?.closest('[data-label]') === label;
      return !(hits(x, y - reach) && hits(x, y + reach) && hits(x, y));
    }).map((label) => label.getAttribute('aria-label'));
  }, LEAST);
  expect(missed).toEqual([]);

  await labels(page).nth(2).tap();
  await expect(labels(page).nth(2)).toHaveAttribute('aria-pressed', 'true');
  await page.getByRole('toolbar', { name: 'Desk' }).getByRole('button', { name: 'Accept' }).tap();
  await expect(labels(page).nth(2)).toHaveAttribute('data-state', 'accepted');
  await labels(page).nth(3).tap();
  await page.getByRole('button', { name: 'Write' }).first().tap();
  await page.getByRole('textbox', { name: /^Numeral, in/ }).fill('vi6');
  await page.getByRole('button', { name: 'Write', exact: true }).last().tap();
  await expect(labels(page).nth(3)).toHaveAttribute('data-state', 'written by hand');
  const count = await labels(page).count();
  await page.getByRole('button', { name: 'More' }).tap();
  await page.getByRole('menuitem', { name: 'Join with the next' }).tap();
  await expect(labels(page)).toHaveCount(count - 1);
  await page.getByRole('button', { name: 'Undo' }).tap();
  await expect(labels(page)).toHaveCount(count);
  await page.getByRole('button', { name: /^Bar 4:/ }).tap();
  await expect(current(page)).toHaveAttribute('aria-label', /^Bar 4,/);
  await expectSaved(page);
  const { violations } = await new AxeBuilder({ page }).withTags(['wcag2a', 'wcag2aa', 'wcag21aa', 'wcag22aa']).analyze();
  expect(violations.map(({ id, nodes }) => [id, nodes[0]?.html])).toEqual([]);
});
