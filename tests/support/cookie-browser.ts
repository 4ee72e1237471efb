/** A browser as far as redirects and cookies go: one jar for each origin, enough for a sign-in. */
export interface CookieBrowser {
  /** Asks, and follows redirects to the end or to the first address that `stop` takes. */
  visit(url: string, init?: RequestInit, stop?: (url: string) => boolean): Promise<{ readonly url: string; readonly response: Response }>;
  cookie(origin: string, name: string): string | undefined;
}

const MOST_REDIRECTS = 20;

export function createCookieBrowser(): CookieBrowser {
  const jars = new Map<string, Map<string, string>>();
  const jarOf = (url: string) => {
    const { origin } = new URL(url);
    const jar = jars.get(origin) ?? new Map<string, string>();
    jars.set(origin, jar);
    return jar;
  };
  const ask = async (url: string, init: RequestInit) => {
    const cookie = [...jarOf(url)].map(([name, value]) => `${name}=${value}`).join('; ');
    const response = await fetch(url, { ...init, redirect: 'manual', headers: { ...init.headers, cookie } });
    for (const line of response.headers.getSetCookie()) keep(jarOf(url), line);
    return response;
  };
  return {
    async visit(url, init = {}, stop = () => false) {
      let [address, request] = [url, init];
      for (let n = 0; n < MOST_REDIRECTS; n += 1) {
        const response = await ask(address, request);
        const location = response.headers.get('location');
        if (response.status < 300 || response.status > 399 || !location) return { url: address, response };
        [address, request] = [new URL(location, address).href, {}];
        if (stop(address)) return { url: address, response };
      }
      throw new Error(`more than ${MOST_REDIRECTS} redirects from ${url}`);
    },
    cookie: (origin, name) => jars.get(origin)?.get(name),
  };
}

function keep(jar: Map<string, string>, line: string): void {
  const [pair = '', ...attributes] = line.split(';');
  const at = pair.indexOf('=');
  const isGone = attributes.some((attribute) => /^\s*max-age=0$/i.test(attribute) || /^\s*expires=Thu, 01 Jan 1970/i.test(attribute));
  if (isGone) jar.delete(pair.slice(0, at));
  else jar.set(pair.slice(0, at), pair.slice(at + 1));
}
