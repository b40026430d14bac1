import type { Generated } from 'kysely';
import type { TokenScope } from '@/lib/access/token-scopes';

export interface TokenTables {
  /** A personal token for scripts. */
  token: {
    id: Generated<number>;
    office: number;
    person: number;
    /** What its person calls it. */
    name: string;
    /** SHA-256 of the token, which is shown once and kept nowhere. */
    hash: string;
    scope: TokenScope;
    created_at: string;
    expires_at: string;
    used_at: string | null;
    ended_at: string | null;
  };
}
