/** An office's own combination sets; a version once kept is never changed. */
import type { Generated } from 'kysely';

export interface CombinationSetTables {
  combination_set: {
    id: Generated<number>;
    office: number;
    name: string;
    person: number;
    at: string;
    /** Since when it is not offered any more; what was made by it stays. */
    withdrawn_at: string | null;
  };
  combination_set_version: {
    office: number;
    set_id: number;
    version: number;
    /** The published set that it was begun from, as written in Setup. */
    based_on: string | null;
    level: 'factored' | 'allowable';
    together: number;
    /** OfficeRule[] as JSON (lib/combinations/office-set.ts). */
    rules: string;
    provenance: string;
    person: number;
    at: string;
  };
}
