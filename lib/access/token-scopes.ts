/** What a personal token for scripts may be used for. Never more than its person may do: `may` is asked besides. */
import type { Act } from './may';

export const tokenScopes = ['read', 'upload and run'] as const;
export type TokenScope = (typeof tokenScopes)[number];

/** Completes "This token is …". */
export const scopeWords: Readonly<Record<TokenScope, string>> = {
  read: 'for reading',
  'upload and run': 'for bringing sheets in and running them',
};

const reading: readonly Act[] = [
  'read projects',
  'read sections',
  'read limits',
  'read combination sets',
  'read a batch',
  'take results away',
  'read activity',
  'read issues',
  'read what was issued',
];
const working: readonly Act[] = [...reading, 'add a project', 'bring sheets in', 'change a revision', 'run', 'size sections'];

/** Acts that are not named here are closed to every token: people, letters, tokens themselves, checking, issuing. */
export function scopeAllows(scope: TokenScope, act: Act): boolean {
  return (scope === 'read' ? reading : working).includes(act);
}

/** Days after which a token ends, as its maker chooses. */
export const tokenDays = [7, 30, 90, 365] as const;
