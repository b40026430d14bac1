import type { Config } from 'tailwindcss';

const token = (name: string) => `var(--${name})`;
const tokens = [
  'paper', 'sheet', 'band', 'grid', 'hair', 'rule', 'ink', 'ink2', 'ink3',
  'blue', 'blue-deep', 'blue-wash', 'on-blue', 'red', 'red-wash', 'amber', 'amber-line', 'amber-wash',
  'green', 'green-wash', 'plain', 'plain-cap',
] as const; // prettier-ignore

/** The tokens of app/globals.css as theme colours and fonts; the default palette is switched off there. */
const config: Config = {
  content: ['./app/**/*.{ts,tsx}', './components/**/*.{ts,tsx}'],
  theme: {
    colors: {
      transparent: 'transparent',
      current: 'currentColor',
      ...Object.fromEntries(tokens.map((name) => [name, token(name)])),
    },
    fontFamily: { sans: [token('sans')], condensed: [token('condensed')], mono: [token('mono')] },
    borderRadius: { none: '0', DEFAULT: '2px' },
    boxShadow: { none: 'none' },
  },
};
export default config;
