/** An office's own sections and materials, and what revisions are made of, for Kysely. */
import type { Generated } from 'kysely';
import type { OwnKind, PartOrigin } from '@/lib/intake/own/own-thing';
import type { System } from '@/lib/units/quantity';

export interface OwnPartTables {
  own_part: {
    id: Generated<number>;
    office: number;
    kind: OwnKind;
    name: string;
    /** As ids are compared: one of a name in an office, for ever. */
    name_key: string;
    /** Since when it is no longer offered. */
    retired_at: string | null;
    retired_by: number | null;
  };
  own_part_version: {
    part: number;
    version: number;
    units: System;
    /** Cells of its row of Sections or Materials, as JSON. */
    cells: string;
    /** The Section, or the Material for a thickness not known, as JSON. */
    resolved: string;
    note: string;
    person: number;
    at: string;
  };
  revision_part: {
    revision: number;
    ordinal: number;
    kind: OwnKind;
    name: string;
    origin: PartOrigin['origin'];
    own_part: number | null;
    version: number | null;
    note: string | null;
    frames: number;
  };
}
