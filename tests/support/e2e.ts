import { type BrowserContext, type Page, expect } from '@playwright/test';
import signIns from '../../db/seed/sign-ins.json' with { type: 'json' };

export const PHONE = { width: 390, height: 844 } as const;

/** Someone of the demo: by mailbox (`t.wrenfield`), or the first of a role (`student`). */
export function demoPerson(who: string): { readonly role: string; readonly name: string; readonly email: string } {
  const person = signIns.people.find(({ email, role }) => email.startsWith(`${who}@`) || role === who);
  if (!person) throw new Error(`db/seed/sign-ins.json has neither a mailbox nor a role ${who}`);
  return person;
}

type Cookies = Awaited<ReturnType<BrowserContext['cookies']>>;
const sessions = new Map<string, Cookies>();

/** Signs in with the demo's password, through the page the first time and with the same session after that. */
export async function signIn(page: Page, who: string): Promise<void> {
  const { email, name } = demoPerson(who);
  const known = sessions.get(email);
  if (known) return page.context().addCookies(known);
  await page.goto('/sign-in');
  await page.getByLabel('E-mail').fill(email);
  await page.getByLabel('Password').fill(signIns.password);
  await page.getByRole('button', { name: 'Sign in', exact: true }).click();
  await expect(page.getByRole('button', { name: `Account of ${name}` })).toBeVisible();
  sessions.set(email, await page.context().cookies());
}
