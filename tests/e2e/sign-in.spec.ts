import AxeBuilder from '@axe-core/playwright';
import { type Browser, type Locator, type Page, expect, test } from '@playwright/test';
import signIns from '../../db/seed/sign-ins.json' with { type: 'json' };
import { demoPerson } from '../support/e2e';
import { mailsTo } from '../support/mail-sink';

const PASSWORD = signIns.password;

let invited = 0;
const newEmail = () => `newcomer-${Date.now()}-${(invited += 1)}@fennimoor.example`;

async function enter(page: Page, email: string, password: string): Promise<void> {
  await page.getByLabel('E-mail').fill(email);
  await page.getByLabel('Password').fill(password);
  await page.getByRole('button', { name: 'Sign in', exact: true }).click();
}

async function signIn(page: Page, email: string, password = PASSWORD): Promise<void> {
  await page.goto('/sign-in');
  await enter(page, email, password);
  await expect(page.getByRole('button', { name: /^Account of/ })).toBeVisible();
}

async function openAs(browser: Browser, email: string, password?: string): Promise<Page> {
  const page = await (await browser.newContext()).newPage();
  await signIn(page, email, password);
  return page;
}

/**
 * Presses a button until what it opens is there: a press before the page's script is at work opens nothing. Forms need no
 * such care, theirs are held back.
 */
async function open(button: Locator, opened: Locator): Promise<void> {
  await expect(async () => {
    if (!(await opened.isVisible())) await button.click();
    await expect(opened).toBeVisible({ timeout: 2_000 });
  }).toPass();
}

/** The link in the newest mail to an address, once the worker has sent it. */
async function linkTo(email: string, path: string): Promise<string> {
  let link: string | undefined;
  await expect
    .poll(async () => {
      const [mail] = await mailsTo(email);
      link = mail && new RegExp(`${path}\\S+`).exec(mail.text)?.[0];
      return link ?? null;
    })
    .not.toBeNull();
  return link ?? '';
}

/** The owner invites someone; they accept and are in. */
async function invite(browser: Browser, role: string): Promise<{ readonly page: Page; readonly email: string }> {
  const email = newEmail();
  const owner = await openAs(browser, demoPerson('owner').email);
  await owner.goto('/settings/members');
  await owner.getByLabel('E-mail').fill(email);
  await owner.getByLabel('Role', { exact: true }).selectOption(role);
  await owner.getByRole('button', { name: 'Invite', exact: true }).click();
  await expect(owner.getByRole('rowheader', { name: email })).toBeVisible();
  await owner.context().close();
  const page = await (await browser.newContext()).newPage();
  await page.goto(await linkTo(email, '/invitation/'));
  await page.getByLabel('Your name').fill(`New ${role}`);
  await page.getByLabel('Choose a password').fill('a password for the browser');
  await page.getByRole('button', { name: 'Accept the invitation' }).click();
  await expect(page.getByRole('button', { name: `Account of New ${role}` })).toBeVisible();
  return { page, email };
}

/** What the header offers to each role. */
const PLACES: Readonly<Record<string, readonly string[]>> = {
  owner: ['Library', 'Courses', 'Settings'],
  instructor: ['Library', 'Courses'],
  assistant: ['Library', 'Courses'],
  student: ['My work'],
};

async function expectPlaces(page: Page, role: string): Promise<void> {
  const links = page.getByRole('navigation', { name: 'Main' }).getByRole('link');
  await expect(links).toHaveText([...(PLACES[role] ?? [])]);
}

test.describe('by password', () => {
  for (const role of Object.keys(PLACES)) {
    test(`the demo’s ${role} signs in, sees their places, and signs out`, async ({ page }) => {
      await signIn(page, demoPerson(role).email);
      await expectPlaces(page, role);
      await open(page.getByRole('button', { name: /^Account of/ }), page.getByRole('menuitem', { name: 'Sign out' }));
      await page.getByRole('menuitem', { name: 'Sign out' }).click();
      await expect(page.getByRole('heading', { name: 'Sign in' })).toBeVisible();
      await page.goto('/account');
      await expect(page.getByRole('heading', { name: 'Sign in' })).toBeVisible();
    });
  }

  test('a wrong one says so and keeps the e-mail', async ({ page }) => {
    await page.goto('/sign-in');
    await enter(page, 'nobody@fennimoor.example', 'not the password');
    await expect(page.getByRole('main').getByRole('alert')).toContainText('do not match');
    await expect(page.getByLabel('E-mail')).toHaveValue('nobody@fennimoor.example');
  });

  test('leads back to the page that was asked for', async ({ page }) => {
    await page.goto('/account?from=test');
    await expect(page).toHaveURL(/\/sign-in\?from=%2Faccount%3Ffrom%3Dtest$/);
    await enter(page, demoPerson('student').email, PASSWORD);
    await expect(page).toHaveURL(/\/account\?from=test$/);
  });
});

test('a link by mail signs in once, and lets a forgotten password be replaced', async ({ browser }) => {
  const { page: first, email } = await invite(browser, 'student');
  await first.context().close();
  const page = await (await browser.newContext()).newPage();
  await page.goto('/sign-in');
  await page.getByRole('link', { name: 'Get a link by mail' }).click();
  // Both pages have a field of that name.
  await expect(page.getByRole('heading', { name: 'Sign in by mail' })).toBeVisible();
  await page.getByLabel('E-mail').fill(email);
  await page.getByRole('button', { name: 'Send me a link' }).click();
  await expect(page.getByText('Look into your mailbox')).toBeVisible();
  const link = await linkTo(email, '/sign-in/link\\?token=');
  await page.goto(link);
  await page.getByRole('button', { name: 'Sign in' }).click();
  await expect(page.getByRole('button', { name: 'Account of New student' })).toBeVisible();
  await page.goto('/account');
  await page.getByLabel('New password').fill('a password after the link');
  await page.getByRole('button', { name: 'Save the password' }).click();
  await expect(page.getByText('The new password is saved.')).toBeVisible();
  const again = await openAs(browser, email, 'a password after the link');
  await again.goto(link);
  await again.getByRole('button', { name: 'Sign in' }).click();
  await expect(again.getByRole('main').getByRole('alert')).toContainText('expired or was used');
});

test.describe('an invitation', () => {
  for (const role of Object.keys(PLACES)) {
    test(`brings in a new ${role}`, async ({ browser }) => {
      const { page } = await invite(browser, role);
      await expectPlaces(page, role);
    });
  }

  test('that is unknown says what to do', async ({ page }) => {
    await page.goto('/invitation/made-up');
    await expect(page.getByText('This invitation does not work any more')).toBeVisible();
  });
});

test('a new password ends the sessions of other devices', async ({ browser }) => {
  const { page, email } = await invite(browser, 'instructor');
  const other = await openAs(browser, email, 'a password for the browser');
  await page.goto('/account');
  await page.getByLabel('Password until now').fill('a password for the browser');
  await page.getByLabel('New password').fill('a password of tomorrow');
  await page.getByRole('button', { name: 'Save the password' }).click();
  await expect(page.getByText('The new password is saved.')).toBeVisible();
  await page.reload();
  await expect(page.getByRole('heading', { name: 'Account', exact: true })).toBeVisible();
  await other.reload();
  await expect(other.getByRole('heading', { name: 'Sign in' })).toBeVisible();
});

test('an account can be deleted by whose it is', async ({ browser }) => {
  const { page, email } = await invite(browser, 'student');
  await page.goto('/account');
  await open(page.getByRole('button', { name: 'Delete my account …' }), page.getByLabel('Your password'));
  await page.getByLabel('Your password').fill('a password for the browser');
  await page.getByRole('button', { name: 'Delete my account and data' }).click();
  await expect(page.getByRole('heading', { name: 'Sign in' })).toBeVisible();
  await enter(page, email, 'a password for the browser');
  await expect(page.getByRole('main').getByRole('alert')).toBeVisible();
});

test('a student finds nothing where the staff works', async ({ page }) => {
  await signIn(page, demoPerson('student').email);
  for (const path of ['/settings', '/settings/members', '/library']) {
    await page.goto(path);
    await expect(page.getByRole('heading', { name: 'There is nothing here' })).toBeVisible();
  }
});

test('a request from another site changes nothing', async ({ page }) => {
  await signIn(page, demoPerson('instructor').email);
  const answer = await page.request.post('/api/scores', {
    headers: { origin: 'https://elsewhere.example' },
    multipart: { title: 'x' },
  });
  expect(answer.status()).toBe(403);
  expect(await answer.json()).toMatchObject({ error: { code: 'bad_origin' } });
});

test('pages carry a strict policy and break none of it', async ({ page }) => {
  const broken: string[] = [];
  page.on('console', (message) => {
    if (/Content Security Policy/i.test(message.text())) broken.push(message.text());
  });
  const answer = await page.goto('/sign-in');
  const policy = answer?.headers()['content-security-policy'] ?? '';
  expect(policy).toContain("frame-ancestors 'none'");
  expect(policy).toMatch(/script-src 'self' 'nonce-[^']+' 'strict-dynamic'/);
  await enter(page, demoPerson('owner').email, PASSWORD);
  await expect(page.getByRole('button', { name: /^Account of/ })).toBeVisible();
  for (const path of ['/account', '/settings', '/settings/members', '/settings/audit']) {
    await page.goto(path);
    await expect(page.getByRole('heading', { level: 1 })).toBeVisible();
  }
  await open(page.getByRole('button', { name: /^Account of/ }), page.getByRole('menuitem', { name: 'Sign out' }));
  expect(broken).toEqual([]);
});

test('the pages have no serious accessibility fault', async ({ page }) => {
  const check = async (path: string) => {
    await page.goto(path);
    await expect(page.getByRole('heading', { level: 1 })).toBeVisible();
    const { violations } = await new AxeBuilder({ page }).analyze();
    const serious = violations.filter(({ impact }) => impact === 'serious' || impact === 'critical');
    expect(serious.map(({ id, nodes }) => `${path} ${id}: ${nodes[0]?.html}`)).toEqual([]);
  };
  await check('/sign-in');
  await check('/sign-in/link');
  await check('/invitation/made-up');
  await signIn(page, demoPerson('owner').email);
  for (const path of ['/account', '/settings', '/settings/members', '/settings/audit']) await check(path);
});
