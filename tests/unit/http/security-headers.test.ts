import { describe, expect, it } from 'vitest';
import { contentSecurityPolicy, fixedSecurityHeaders } from '@/lib/http/security-headers';

function directives(development: boolean, https: boolean): ReadonlyMap<string, readonly string[]> {
  const policy = contentSecurityPolicy('bm9uY2U=', { development, https });
  return new Map(policy.split('; ').map((directive) => {
    const [name = '', ...sources] = directive.split(' ');
    return [name, sources];
  }));
}

// Source: W3C Content Security Policy Level 3; OWASP Content Security Policy Cheat Sheet (strict policy by nonce).
describe('contentSecurityPolicy', () => {
  it('runs scripts only with the nonce, and never text as code', () => {
    const scripts = directives(false, true).get('script-src');
    expect(scripts).toContain("'nonce-bm9uY2U='");
    expect(scripts).not.toContain("'unsafe-inline'");
    expect(scripts).not.toContain("'unsafe-eval'");
  });

  it('takes no style element without the nonce', () => {
    expect(directives(false, true).get('style-src')).toEqual(["'self'", "'nonce-bm9uY2U='"]);
  });

  it('can be framed by nobody, has no plugins, no base, no foreign form target', () => {
    const policy = directives(false, true);
    expect(policy.get('frame-ancestors')).toEqual(["'none'"]);
    expect(policy.get('object-src')).toEqual(["'none'"]);
    expect(policy.get('base-uri')).toEqual(["'none'"]);
    expect(policy.get('form-action')).toEqual(["'self'"]);
  });

  it('loosens for the developers’ loop only there', () => {
    expect(directives(true, false).get('script-src')).toContain("'unsafe-eval'");
    expect(directives(true, false).has('upgrade-insecure-requests')).toBe(false);
  });
});

describe('fixedSecurityHeaders', () => {
  it('asks for https from now on only over https', () => {
    const names = (https: boolean) => fixedSecurityHeaders(https).map(([name]) => name);
    expect(names(true)).toContain('strict-transport-security');
    expect(names(false)).not.toContain('strict-transport-security');
  });
});
