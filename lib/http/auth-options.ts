import type { NextAuthOptions, Session } from 'next-auth';
import type { JWT } from 'next-auth/jwt';
import type { OAuthConfig, Provider } from 'next-auth/providers/index';
import CredentialsProvider from 'next-auth/providers/credentials';
import type { OidcConfig } from '@/lib/config';
import { getConfig } from '@/lib/config';
import type { Result } from '@/lib/result';
import type { AppError } from '@/lib/errors';
import { createDeps } from '@/lib/workflows/deps';
import { signInWithLink } from '@/lib/workflows/sign-in-with-link';
import { type SignedIn, signInWithPassword } from '@/lib/workflows/sign-in-with-password';
import { signInWithProvider } from '@/lib/workflows/sign-in-with-provider';
import { SIGN_IN_METHODS, type SignInMethod } from '@/lib/auth/actor';
import { addressOf } from './address';

/** What the session's cookie says: nothing about the person but the id. */
export interface SessionBegan {
  readonly userId: string;
  readonly epoch: number;
  readonly method: SignInMethod;
  /** Milliseconds since 1970, UTC. */
  readonly signedInAt: number;
}

declare module 'next-auth' {
  interface Session {
    began?: SessionBegan;
  }
  interface User {
    began?: SessionBegan;
  }
}

declare module 'next-auth/jwt' {
  interface JWT {
    began?: SessionBegan;
  }
}

/** Two weeks; renewed once a day while in use. */
const SESSION_SECONDS = 14 * 24 * 3600;

function began(signedIn: SignedIn, method: SignInMethod): SessionBegan {
  return { userId: signedIn.userId, epoch: signedIn.epoch, method, signedInAt: createDeps().now().getTime() };
}

/** next-auth passes a thrown message on to the page as `error`: the code of our own table. */
function userOf(result: Result<SignedIn, AppError>, method: SignInMethod) {
  if (!result.ok) throw new Error(result.error.code);
  return { id: result.value.userId, began: began(result.value, method) };
}

function headersOf(record: Record<string, unknown> | undefined): Pick<Headers, 'get'> {
  return { get: (name) => (typeof record?.[name] === 'string' ? (record[name] as string) : null) };
}

const passwordProvider = CredentialsProvider({
  id: 'password',
  credentials: { email: {}, password: {} },
  authorize: async (credentials, request) =>
    userOf(
      await signInWithPassword(createDeps(), {
        email: credentials?.email ?? '',
        password: credentials?.password ?? '',
        address: addressOf(headersOf(request.headers)),
      }),
      'password',
    ),
});

const linkProvider = CredentialsProvider({
  id: 'link',
  credentials: { token: {} },
  authorize: async (credentials, request) =>
    userOf(
      await signInWithLink(createDeps(), {
        token: credentials?.token ?? '',
        address: addressOf(headersOf(request.headers)),
      }),
      'link',
    ),
});

interface OidcProfile {
  readonly sub: string;
  readonly email?: string;
  readonly email_verified?: boolean;
}

type UserinfoRequest = Parameters<NonNullable<Exclude<OAuthConfig<OidcProfile>['userinfo'], string | undefined>['request']>>[0];

/** The claims of the ID token, which the client has verified. */
function claimsOf(tokens: object): OidcProfile {
  if (!('claims' in tokens) || typeof tokens.claims !== 'function') throw new Error('the provider sent no ID token');
  return tokens.claims() as OidcProfile;
}

/** The e-mail may be in the ID token or, as OpenID Connect Core 5.4 has it, only at the UserInfo endpoint. */
async function profileOf(tokens: UserinfoRequest['tokens'], client: UserinfoRequest['client']): Promise<OidcProfile> {
  const claims = claimsOf(tokens);
  if (claims.email || !tokens.access_token || !client.issuer.metadata.userinfo_endpoint) return claims;
  const told = await client.userinfo<OidcProfile>(tokens.access_token);
  if (told.sub !== claims.sub) throw new Error('the UserInfo is about someone else (OpenID Connect Core 5.3.2)');
  return { ...told, ...claims };
}

function oidcProvider(oidc: OidcConfig): Provider {
  return {
    id: 'provider',
    name: oidc.name,
    type: 'oauth',
    wellKnown: new URL('.well-known/openid-configuration', `${oidc.issuer.replace(/\/$/, '')}/`).href,
    issuer: oidc.issuer,
    clientId: oidc.clientId,
    clientSecret: oidc.clientSecret,
    authorization: { params: { scope: 'openid email profile' } },
    idToken: true,
    userinfo: { request: ({ tokens, client }) => profileOf(tokens, client) },
    checks: ['pkce', 'state', 'nonce'],
    profile: (profile: OidcProfile) => ({ id: profile.sub }),
  };
}

function providers(oidc: OidcConfig | null): Provider[] {
  return [passwordProvider, linkProvider, ...(oidc ? [oidcProvider(oidc)] : [])];
}

/** Only a provider's sign-in is decided here; the others were in `authorize`. Returning a path sends the browser there. */
const signIn: NonNullable<NonNullable<NextAuthOptions['callbacks']>['signIn']> = async ({ user, account, profile }) => {
  if (account?.provider !== 'provider') return true;
  const claims = profile as OidcProfile | undefined;
  const result = await signInWithProvider(createDeps(), {
    issuer: getConfig().oidc?.issuer ?? '',
    subject: account.providerAccountId,
    email: claims?.email ?? null,
    emailVerified: claims?.email_verified === true,
  });
  if (!result.ok) return `/sign-in?error=${result.error.code}`;
  user.began = began(result.value, 'provider');
  return true;
};

function jwt({ token, user }: { token: JWT; user?: { began?: SessionBegan } }): JWT {
  return user?.began ? { began: user.began } : token;
}

function session({ session, token }: { session: Session; token: JWT }): Session {
  return { expires: session.expires, ...(isBegan(token.began) ? { began: token.began } : {}) };
}

function isBegan(value: SessionBegan | undefined): value is SessionBegan {
  return value !== undefined && SIGN_IN_METHODS.includes(value.method);
}

function logCode(code: string): void {
  createDeps().log.warn({ endpoint: 'next-auth', code }, 'next-auth says');
}

let options: NextAuthOptions | undefined;

export function getAuthOptions(): NextAuthOptions {
  if (options) return options;
  const config = getConfig();
  options = {
    secret: config.authSecret,
    useSecureCookies: config.appUrl.startsWith('https:'),
    session: { strategy: 'jwt', maxAge: SESSION_SECONDS, updateAge: 24 * 3600 },
    pages: { signIn: '/sign-in', error: '/sign-in', signOut: '/sign-in' },
    providers: providers(config.oidc),
    callbacks: { signIn, jwt, session },
    // Its own logger would print what a provider sent.
    logger: { error: logCode, warn: logCode, debug: () => undefined },
  };
  return options;
}
