/** The README names every address of the application, and none that is not there. */
import { readdirSync, readFileSync } from 'node:fs';
import { describe, expect, it } from 'vitest';

const files = readdirSync('app', { recursive: true, encoding: 'utf8' }).map((path) => path.replaceAll('\\', '/'));
const lines = readFileSync('README.md', 'utf8').split('\n');

/** README's lines by the address in the first column of its tables. */
const lineOf = new Map(
  lines.flatMap((line) => {
    const address = /^\| `(\/[^`]*)` +\|/.exec(line)?.[1];
    return address === undefined ? [] : [[address, line] as const];
  }),
);
const told = [...lineOf.keys()];

/** "(desk)/people/page.tsx" is at "/people". */
const addressOf = (file: string): string =>
  `/${file
    .split('/')
    .slice(0, -1)
    .filter((part) => !part.startsWith('('))
    .join('/')}`;

describe('README.md', () => {
  it('lists every page', () => {
    const pages = files.filter((file) => /(^|\/)page\.tsx$/.test(file)).map(addressOf);
    expect(told.filter((address) => !address.startsWith('/api/')).sort()).toEqual([...new Set(pages)].sort());
  });

  it('lists every address of the API with its methods', () => {
    const routes = files.filter((file) => /(^|\/)route\.ts$/.test(file));
    expect(told.filter((address) => address.startsWith('/api/')).sort()).toEqual(routes.map(addressOf).sort());
    for (const route of routes) {
      const line = lineOf.get(addressOf(route)) ?? '';
      if (/\| any:/.test(line)) continue;
      const source = readFileSync(`app/${route}`, 'utf8');
      const offered = ['GET', 'POST', 'PUT', 'PATCH', 'DELETE'].filter((method) =>
        new RegExp(`export (const|async function|function) ${method}\\b|export \\{[^}]*\\b${method}\\b`).test(source),
      );
      const named = offered.filter((method) => new RegExp(`\\b${method}\\b`).test(line));
      expect(named, addressOf(route)).toEqual(offered);
    }
  });
});
