/**
 * What a page may load and do. Scripts run only with the request's nonce (Next stamps it on its own). Style attributes
 * are allowed, because the engraver and React write them; style elements only from our own files, or with the nonce.
 * In development Next evaluates code and injects styles for its reloads, and only there is that allowed.
 */
export function contentSecurityPolicy(nonce: string, options: { readonly development: boolean; readonly https: boolean }): string {
  const { development, https } = options;
  const directives: readonly (string | false)[] = [
    "default-src 'self'",
    `script-src 'self' 'nonce-${nonce}' 'strict-dynamic'${development ? " 'unsafe-eval'" : ''}`,
    development ? "style-src 'self' 'unsafe-inline'" : `style-src 'self' 'nonce-${nonce}'`,
    "style-src-attr 'unsafe-inline'",
    "img-src 'self' data: blob:",
    "font-src 'self' data:",
    `connect-src 'self'${development ? ' ws: wss:' : ''}`,
    "media-src 'self' blob:",
    "worker-src 'self' blob:",
    "frame-src 'self' blob:",
    "object-src 'none'",
    "base-uri 'none'",
    "form-action 'self'",
    "frame-ancestors 'none'",
    https && 'upgrade-insecure-requests',
  ];
  return directives.filter(Boolean).join('; ');
}

/** On every answer, whatever it is. */
export function fixedSecurityHeaders(https: boolean): readonly (readonly [string, string])[] {
  return [
    ['x-content-type-options', 'nosniff'],
    ['x-frame-options', 'DENY'],
    ['referrer-policy', 'same-origin'],
    ['cross-origin-opener-policy', 'same-origin'],
    ['cross-origin-resource-policy', 'same-origin'],
    ['permissions-policy', 'camera=(), microphone=(), geolocation=(), payment=(), usb=(), browsing-topics=()'],
    ...(https ? [['strict-transport-security', 'max-age=31536000; includeSubDomains'] as const] : []),
  ];
}
