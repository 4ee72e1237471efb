import { describe, expect, it } from 'vitest';
import { addressOf } from '@/lib/http/address';

const from = (value?: string) => addressOf(new Headers(value === undefined ? {} : { 'x-forwarded-for': value }));

describe('addressOf', () => {
  it('takes what the nearest proxy wrote, not what the client claims', () => {
    expect(from('203.0.113.7, 198.51.100.2')).toBe('198.51.100.2');
    expect(from('198.51.100.2')).toBe('198.51.100.2');
  });

  it('says when there is none', () => {
    expect(from()).toBe('unknown');
    expect(from(' ')).toBe('unknown');
  });
});
