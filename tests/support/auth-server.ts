import { type IncomingMessage, type Server, type ServerResponse, createServer } from 'node:http';
import NextAuth from 'next-auth';
import { getAuthOptions } from '@/lib/http/auth-options';

/** Our next-auth options behind a plain HTTP server, at the paths the app has them. */
export function createAuthServer(): Server {
  return createServer((request, response) => {
    void answer(request, response);
  });
}

async function textOf(request: IncomingMessage): Promise<string> {
  const chunks: Buffer[] = [];
  for await (const chunk of request) chunks.push(chunk as Buffer);
  return Buffer.concat(chunks).toString();
}

function cookiesOf(request: IncomingMessage): Record<string, string> {
  const pairs = (request.headers.cookie ?? '').split('; ').filter(Boolean);
  return Object.fromEntries(pairs.map((pair) => [pair.slice(0, pair.indexOf('=')), decodeURIComponent(pair.slice(pair.indexOf('=') + 1))]));
}

/** What next-auth expects of a request and a response of Next's `pages/api`. */
async function answer(request: IncomingMessage, response: ServerResponse): Promise<void> {
  const url = new URL(request.url ?? '/', 'http://127.0.0.1');
  const query = { ...Object.fromEntries(url.searchParams), nextauth: url.pathname.replace('/api/auth/', '').split('/') };
  const body = Object.fromEntries(new URLSearchParams(await textOf(request)));
  const asked = Object.assign(request, { query, body, cookies: cookiesOf(request) });
  const send = (content: unknown) => response.end(content as string);
  const answered = Object.assign(response, {
    status: (code: number) => Object.assign(response, { statusCode: code }),
    json: (content: unknown) => response.setHeader('content-type', 'application/json').end(JSON.stringify(content)),
    send: (content: unknown) => (typeof content === 'object' ? response.end(JSON.stringify(content)) : send(content)),
  });
  await NextAuth(asked as never, answered as never, getAuthOptions());
}
