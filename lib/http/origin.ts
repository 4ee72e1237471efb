/**
 * Whether a request that changes something comes from our own pages: its Origin names the host it was sent to, or the
 * configured address. Without an Origin (some same-origin requests), the browser's own word for the site counts. A
 * browser sets all three headers itself; a script on another site cannot.
 */
export function isOwnOrigin(headers: Pick<Headers, 'get'>, appUrl: string): boolean {
  const origin = headers.get('origin');
  if (origin === null) return headers.get('sec-fetch-site') === 'same-origin';
  if (origin === new URL(appUrl).origin) return true;
  const host = headers.get('x-forwarded-host') ?? headers.get('host');
  return URL.canParse(origin) && new URL(origin).host === host;
}
