/** The package ships no types. What our own provider for tests uses of it. */
declare module 'oidc-provider' {
  import type { IncomingMessage, ServerResponse } from 'node:http';

  export default class Provider {
    constructor(issuer: string, configuration: object);
    callback(): (request: IncomingMessage, response: ServerResponse) => void;
    interactionDetails(
      request: IncomingMessage,
      response: ServerResponse,
    ): Promise<{ readonly prompt: { readonly name: string }; readonly params: { readonly client_id: string } }>;
    interactionFinished(request: IncomingMessage, response: ServerResponse, result: object, options?: object): Promise<void>;
    readonly Grant: new (of: { accountId: string; clientId: string }) => { addOIDCScope(scope: string): void; save(): Promise<string> };
  }
}
