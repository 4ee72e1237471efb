import { ERRORS } from '@/lib/errors';

const OTHER = 'Signing in did not work. Try again.';

/** What a person reads for an `error` that came back from signing in: a code of our table, or next-auth's own. */
export function signInErrorMessage(code: string): string {
  if (code === 'bad_credentials') return 'This e-mail and password do not match, or nobody here has this e-mail.';
  if (code === 'rate_limited') return 'Too many tries. Wait a quarter of an hour, or let us send you a link.';
  if (Object.hasOwn(ERRORS, code)) return ERRORS[code as keyof typeof ERRORS].message;
  return OTHER;
}
