import { getConfig } from '@/lib/config';

/** What the sign-in page calls the OpenID provider; null when none is configured. */
export function getProviderName(): string | null {
  return getConfig().oidc?.name ?? null;
}
