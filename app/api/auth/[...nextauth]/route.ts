import { NextRequest } from 'next/server';
import NextAuth from 'next-auth';
import { appError } from '@/lib/errors';
import { getAuthOptions } from '@/lib/http/auth-options';
import { readBounded } from '@/lib/http/body';
import { isOwnOrigin } from '@/lib/http/origin';
import { errorResponse } from '@/lib/http/route';
import { createDeps } from '@/lib/workflows/deps';

interface AuthContext {
  readonly params: Promise<{ readonly nextauth: readonly string[] }>;
}

/** A form with an e-mail, a password or a token is all that next-auth is sent. */
const MAX_BYTES = 16 * 1024;

async function authenticate(request: Request, context: AuthContext): Promise<Response> {
  return (await NextAuth(request as never, context as never, getAuthOptions())) as Response;
}

/** next-auth asks for its own token on every POST; our origin check and our bound come before that. */
async function authenticateBounded(request: NextRequest, context: AuthContext): Promise<Response> {
  if (!isOwnOrigin(request.headers, createDeps().appUrl)) return errorResponse(appError('bad_origin'));
  const body = await readBounded(request, MAX_BYTES);
  if (!body.ok) return errorResponse(body.error);
  const bounded = new NextRequest(request.url, { method: 'POST', headers: request.headers, body: body.value });
  return authenticate(bounded, context);
}

export { authenticate as GET, authenticateBounded as POST };
