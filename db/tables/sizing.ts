/** Tables of sizings, for Kysely. */
import type { Generated } from 'kysely';
import type { JobState } from '@/db/schema';

export interface SizingTables {
  sizing: {
    id: Generated<number>;
    office: number;
    revision: number;
    person: number;
    at: string;
    /** What was asked for (lib/sizing/sizing.ts, SizingRequest) as JSON. */
    request: string;
    /** SHA-256 over the request, the content addresses of the frames and the engine; null until it has begun. */
    input_hash: string | null;
    engine: string;
    state: JobState;
    /** Frames × candidates; the total is an estimate until the search is over. */
    total: Generated<number>;
    done: Generated<number>;
    /** Time it took, pauses left out. */
    seconds: Generated<number>;
    /** SizingFound as JSON. */
    found: string | null;
    reason: string | null;
    finished_at: string | null;
  };
  sizing_piece: { id: Generated<number>; sizing: number; choice: string; packed: Buffer };
}
