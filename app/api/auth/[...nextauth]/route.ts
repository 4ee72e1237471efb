import NextAuth from 'next-auth';
import { getAuthOptions } from '@/lib/http/auth-options';

/** next-auth checks its own token on every POST and bounds nothing it stores; the sign-ins themselves are workflows. */
async function authenticate(request: Request, context: { params: Promise<{ nextauth: string[] }> }): Promise<Response> {
  return (await NextAuth(request as never, context as never, getAuthOptions())) as Response;
}

export { authenticate as GET, authenticate as POST };
