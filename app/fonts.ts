import localFont from 'next/font/local';

/**
 * Fira Sans, Fira Sans Condensed, Fira Mono (SIL Open Font License 1.1, see components/fonts/README.md).
 * The Latin cuts come from their packages; Greek and the signs of formulas (≤ ≥ → ▲ ⁴ …) stand in a small
 * subset of the full face, first in the stack and limited to its own range, so that no other face steps in mid-formula.
 */
const symbols = localFont({
  src: [
    { path: '../components/fonts/fira-symbols-400.woff2', weight: '400' },
    { path: '../components/fonts/fira-symbols-600.woff2', weight: '600' },
  ],
  variable: '--font-symbols',
  adjustFontFallback: false,
  preload: false,
  declarations: [
    {
      prop: 'unicode-range',
      value: 'U+0370-03FF, U+2070-209F, U+2190, U+2192, U+2194-2211, U+2213-2214, U+2216-22FF, U+25A0-25FF',
    },
  ],
});

const sans = localFont({
  src: [
    { path: '../node_modules/@fontsource/fira-sans/files/fira-sans-latin-400-normal.woff2', weight: '400' },
    { path: '../node_modules/@fontsource/fira-sans/files/fira-sans-latin-500-normal.woff2', weight: '500' },
    { path: '../node_modules/@fontsource/fira-sans/files/fira-sans-latin-600-normal.woff2', weight: '600' },
  ],
  variable: '--font-fira-sans',
});

const condensed = localFont({
  src: [
    { path: '../node_modules/@fontsource/fira-sans-condensed/files/fira-sans-condensed-latin-400-normal.woff2', weight: '400' },
    { path: '../node_modules/@fontsource/fira-sans-condensed/files/fira-sans-condensed-latin-500-normal.woff2', weight: '500' },
    { path: '../node_modules/@fontsource/fira-sans-condensed/files/fira-sans-condensed-latin-600-normal.woff2', weight: '600' },
  ],
  variable: '--font-fira-condensed',
});

const mono = localFont({
  src: [
    { path: '../node_modules/@fontsource/fira-mono/files/fira-mono-latin-400-normal.woff2', weight: '400' },
    { path: '../node_modules/@fontsource/fira-mono/files/fira-mono-latin-500-normal.woff2', weight: '500' },
  ],
  variable: '--font-fira-mono',
  preload: false,
});

/** Put on <html>: makes every family known by its variable. */
export const fontVariables = `${symbols.variable} ${sans.variable} ${condensed.variable} ${mono.variable}`;
