import { describe, expect, it } from 'vitest';
import { isSameOrigin } from './same-origin';

const sent = (headers: Record<string, string>) => isSameOrigin(new Headers(headers), 'frames.example:3000');

describe('a write', () => {
  it('is taken from a page of the same site', () => {
    expect(sent({ origin: 'http://frames.example:3000' })).toBe(true);
    expect(sent({ origin: 'http://frames.example:3000', 'sec-fetch-site': 'same-origin' })).toBe(true);
    expect(sent({ 'sec-fetch-site': 'same-origin' })).toBe(true);
  });

  it('is refused from another site, another port, a sandboxed page, or nowhere', () => {
    expect(sent({ origin: 'http://other.example' })).toBe(false);
    expect(sent({ origin: 'http://frames.example:4000' })).toBe(false);
    expect(sent({ origin: 'null' })).toBe(false);
    expect(sent({})).toBe(false);
    expect(sent({ origin: 'http://frames.example:3000', 'sec-fetch-site': 'cross-site' })).toBe(false);
    expect(sent({ 'sec-fetch-site': 'none' })).toBe(false);
  });
});
