import { randomBytes } from 'node:crypto';
import { type NextRequest, NextResponse } from 'next/server';
import { getConfig } from '@/lib/config';
import { contentSecurityPolicy, fixedSecurityHeaders } from '@/lib/http/security-headers';

/** Every answer's security headers; and for pages the nonce, and where the sign-in page should come back to. */
export function proxy(request: NextRequest): NextResponse {
  const { appUrl, environment } = getConfig();
  const https = appUrl.startsWith('https:');
  const nonce = randomBytes(16).toString('base64');
  const policy = contentSecurityPolicy(nonce, { development: environment === 'development', https });
  const headers = new Headers(request.headers);
  // Next reads the nonce from the request's policy.
  headers.set('content-security-policy', policy);
  headers.set('x-nonce', nonce);
  headers.set('x-understave-path', request.nextUrl.pathname + request.nextUrl.search);
  const response = NextResponse.next({ request: { headers } });
  response.headers.set('content-security-policy', policy);
  for (const [name, value] of fixedSecurityHeaders(https)) response.headers.set(name, value);
  return response;
}

export const config = { matcher: ['/((?!_next/static|_next/image|favicon.ico).*)'] };
