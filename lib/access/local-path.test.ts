import { expect, it } from 'vitest';
import { localPath } from './local-path';

it('leads back to a page of this site', () => {
  for (const path of ['/', '/batches/3/B/glance?verdict=over&find=Süd%20A', '/issued/7#files'])
    expect(localPath(path)).toBe(path);
});

it('leads to no other site, however the address is dressed up', () => {
  const dressed = ['//evil.example', '/\\evil.example', '/\t/evil.example', '/\n/evil.example', '/\r\n//evil.example', '/a\\b'];
  const others = ['https://evil.example', 'evil.example', 'javascript:alert(1)', '', ' /', '\t//evil.example'];
  for (const path of [...dressed, ...others, undefined, ['/projects']]) expect(localPath(path)).toBeNull();
  // why a tab matters: an address is read without it
  expect(new URL('/\t/evil.example', 'https://frames.example').host).toBe('evil.example');
});
