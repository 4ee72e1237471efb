import { describe, expect, it } from 'vitest';
import { isOwnOrigin } from '@/lib/http/origin';

const APP = 'https://understave.example';
const check = (headers: Record<string, string>) => isOwnOrigin(new Headers(headers), APP);

describe('isOwnOrigin', () => {
  it('takes the configured address', () => {
    expect(check({ origin: APP, host: 'internal:3000' })).toBe(true);
  });

  it('takes the host that the browser sent the request to', () => {
    expect(check({ origin: 'http://127.0.0.1:3000', host: '127.0.0.1:3000' })).toBe(true);
    expect(check({ origin: 'https://harmony.example', host: 'internal:3000', 'x-forwarded-host': 'harmony.example' })).toBe(true);
  });

  it('refuses another site, another port and an opaque origin', () => {
    expect(check({ origin: 'https://elsewhere.example', host: 'understave.example' })).toBe(false);
    expect(check({ origin: 'http://127.0.0.1:4000', host: '127.0.0.1:3000' })).toBe(false);
    expect(check({ origin: 'null', host: 'understave.example' })).toBe(false);
    expect(check({ origin: 'https://understave.example.evil.example', host: 'understave.example' })).toBe(false);
  });

  it('without an Origin takes only what the browser calls the same origin', () => {
    expect(check({ host: 'understave.example' })).toBe(false);
    expect(check({ 'sec-fetch-site': 'cross-site' })).toBe(false);
    expect(check({ 'sec-fetch-site': 'same-site' })).toBe(false);
    expect(check({ 'sec-fetch-site': 'same-origin' })).toBe(true);
  });
});
