/**
 * The network address a request came from: the last one in X-Forwarded-For, which the proxy nearest to us wrote (each
 * proxy appends the peer it saw; what stands before may be the client's own invention). Without a proxy Next writes
 * the peer itself unless the client sent the header, so an address limit holds only behind a proxy; the limit per
 * account always does.
 */
export function addressOf(headers: Pick<Headers, 'get'>): string {
  const last = headers.get('x-forwarded-for')?.split(',').at(-1)?.trim();
  return last ? last : 'unknown';
}
