/**
 * Sign-in through an OpenID provider, the whole way: our next-auth options against oidc-provider (an OpenID Certified
 * implementation), with redirects, PKCE, state, nonce, ID token and UserInfo.
 */
import type { Server } from 'node:http';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { decode } from 'next-auth/jwt';
import { getConfig } from '@/lib/config';
import type { Actor } from '@/lib/auth/actor';
import type { Deps } from '@/lib/workflows/deps';
import { createAuthServer } from '../../support/auth-server';
import { type CookieBrowser, createCookieBrowser } from '../../support/cookie-browser';
import { type RunningProvider, listen, startOidcProvider } from '../../support/oidc';
import { type TestServices, openServices } from '../../support/services';
import { addDepartment, addPerson } from '../../support/world';

const CLIENT = { id: 'understave', secret: 'a secret of the tests' };
const COOKIE = 'next-auth.session-token';

let services: TestServices;
let app: string;
let server: Server;
let provider: RunningProvider;
let person: Actor;

beforeAll(async () => {
  server = createAuthServer();
  app = `http://127.0.0.1:${await listen(server)}`;
  provider = await startOidcProvider({ ...CLIENT, redirectUri: `${app}/api/auth/callback/provider` });
  // lib/config reads the environment at its first use, which is in openServices.
  Object.assign(process.env, { APP_URL: app, OIDC_ISSUER: provider.issuer, OIDC_CLIENT_ID: CLIENT.id, OIDC_CLIENT_SECRET: CLIENT.secret });
  services = await openServices(new Date().toISOString());
  // next-auth's callbacks take the process's deps: here the test's.
  (globalThis as { understaveDeps?: Deps }).understaveDeps = services.deps;
  person = await addPerson(services.deps, await addDepartment(services.deps, 'Department'), 'instructor', 'person');
});

afterAll(async () => {
  await services.close();
  await provider.close();
  server.close();
});

/** Presses the provider's button on the sign-in page; where the browser ends up in the app. */
async function signInByProvider(browser: CookieBrowser): Promise<string> {
  const { response } = await browser.visit(`${app}/api/auth/csrf`);
  const { csrfToken } = (await response.json()) as { csrfToken: string };
  const body = new URLSearchParams({ csrfToken, callbackUrl: `${app}/library` });
  const isBack = (url: string) => url.startsWith(app) && !url.startsWith(`${app}/api/auth/`);
  const { url } = await browser.visit(`${app}/api/auth/signin/provider`, { method: 'POST', body }, isBack);
  return url.slice(app.length);
}

async function sessionOf(browser: CookieBrowser) {
  const token = browser.cookie(app, COOKIE);
  return token ? ((await decode({ token, secret: getConfig().authSecret }))?.began ?? null) : null;
}

describe('signing in through the provider', () => {
  it('brings in a member whose verified e-mail it tells', async () => {
    provider.account = { subject: 'subject-1', email: person.email, emailVerified: true };
    const browser = createCookieBrowser();
    expect(await signInByProvider(browser)).toBe('/library');
    expect(await sessionOf(browser)).toMatchObject({ userId: person.userId, epoch: 0, method: 'provider' });
  });

  it('knows them again by the subject, whatever the e-mail is now', async () => {
    provider.account = { subject: 'subject-1', email: 'moved@elsewhere.example', emailVerified: false };
    const browser = createCookieBrowser();
    expect(await signInByProvider(browser)).toBe('/library');
    expect(await sessionOf(browser)).toMatchObject({ userId: person.userId });
  });

  it('brings in no stranger and no unverified e-mail, and says so', async () => {
    for (const account of [
      { subject: 'subject-2', email: 'stranger@elsewhere.example', emailVerified: true },
      { subject: 'subject-3', email: person.email, emailVerified: false },
    ]) {
      provider.account = account;
      const browser = createCookieBrowser();
      expect(await signInByProvider(browser)).toBe('/sign-in?error=bad_credentials');
      expect(await sessionOf(browser)).toBeNull();
    }
  });

  it('takes no answer that the browser did not ask for', async () => {
    const browser = createCookieBrowser();
    const { url } = await browser.visit(`${app}/api/auth/callback/provider?code=made-up&state=made-up`, {}, (next) => next.includes('/sign-in'));
    expect(new URL(url).searchParams.get('error')).not.toBeNull();
    expect(await sessionOf(browser)).toBeNull();
  });
});
