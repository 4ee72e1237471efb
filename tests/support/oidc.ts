import { type IncomingMessage, type Server, type ServerResponse, createServer } from 'node:http';
import Provider from 'oidc-provider';

export interface OidcAccount {
  readonly subject: string;
  readonly email: string;
  readonly emailVerified: boolean;
}

export interface RunningProvider {
  readonly issuer: string;
  /** Whoever signs in at the provider from now on. */
  account: OidcAccount;
  close(): Promise<void>;
}

export async function listen(server: Server): Promise<number> {
  await new Promise<void>((resolve) => server.listen(0, '127.0.0.1', resolve));
  const address = server.address();
  if (address === null || typeof address === 'string') throw new Error('the server listens on no port');
  return address.port;
}

/** A real OpenID provider (the certified oidc-provider package) that signs in whoever `account` says, without a form. */
export async function startOidcProvider(client: { readonly id: string; readonly secret: string; readonly redirectUri: string }): Promise<RunningProvider> {
  const server = createServer();
  const issuer = `http://127.0.0.1:${await listen(server)}`;
  const running: RunningProvider = {
    issuer,
    account: { subject: 'nobody', email: 'nobody@nowhere.example', emailVerified: false },
    close: () => new Promise((resolve) => server.close(() => resolve())),
  };
  const provider = new Provider(issuer, {
    clients: [{ client_id: client.id, client_secret: client.secret, redirect_uris: [client.redirectUri] }],
    claims: { email: ['email', 'email_verified'] },
    features: { devInteractions: { enabled: false } },
    interactions: { url: (_context: unknown, interaction: { uid: string }) => `/interaction/${interaction.uid}` },
    findAccount: (_context: unknown, accountId: string) => ({
      accountId,
      claims: () => ({ sub: accountId, email: running.account.email, email_verified: running.account.emailVerified }),
    }),
  });
  const answer = provider.callback();
  server.on('request', (request: IncomingMessage, response: ServerResponse) => {
    if (request.url?.startsWith('/interaction/')) void interact(provider, running.account.subject, request, response);
    else answer(request, response);
  });
  return running;
}

/** Signs in, then agrees. */
async function interact(provider: Provider, accountId: string, request: IncomingMessage, response: ServerResponse): Promise<void> {
  const { prompt, params } = await provider.interactionDetails(request, response);
  if (prompt.name === 'login') return provider.interactionFinished(request, response, { login: { accountId } });
  const grant = new provider.Grant({ accountId, clientId: params.client_id });
  grant.addOIDCScope('openid email profile');
  return provider.interactionFinished(request, response, { consent: { grantId: await grant.save() } }, { mergeWithLastSubmission: true });
}
