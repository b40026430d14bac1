import type { Family } from '@/lib/intake/families/family';
import type { Place, ProblemList } from '@/lib/intake/problem-list';
import type { Offered } from '@/lib/intake/own/offered';
import type { PartOrigins } from '@/lib/intake/own/part-origins';
import type { Reader, Reading } from '@/lib/intake/reader';
import type { LoadCases } from '@/lib/intake/sheets/load-cases';
import type { Materials } from '@/lib/intake/sheets/materials';
import type { Sections } from '@/lib/intake/sheets/sections';
import type { SheetName } from '@/lib/intake/sheet-definitions';
import type { Row, Table } from '@/lib/intake/table';
import type { FamilyOrigin, Section } from '@/lib/model/frame';
import type { OfficeLimit } from '@/lib/model/office-limit';
import type { SettingName, SettingOrigins, Settings } from '@/lib/model/settings';
import type { System } from '@/lib/units/quantity';

/** A frame as Frames, Variants and Nodes define it, before its rows are read. */
export interface FrameEntry {
  readonly index: number;
  /** As typed where first defined. */
  readonly id: string;
  readonly key: string;
  /** Where it was first defined. */
  readonly place: Place;
  title: string | null;
  group: string | null;
  note: string | null;
  count: number;
  spacing_m: number | null;
  run: boolean;
  variant: Variant | null;
  reading: Reading;
}

export interface Variant {
  readonly family: Family;
  readonly origin: FamilyOrigin;
  readonly row: Row;
  /** False where a parameter is missing or wrong: its expressions would only say so again. */
  readonly complete: boolean;
}

/** Everything that is read once for the batch. */
export interface Batch {
  readonly problems: ProblemList;
  readonly reader: Reader;
  readonly system: System;
  readonly settings: Settings;
  readonly origins: SettingOrigins;
  /** Cells of Setup that gave a setting. */
  readonly settingPlaces: ReadonlyMap<SettingName, Place>;
  readonly tables: ReadonlyMap<SheetName, Table>;
  readonly families: ReadonlyMap<string, Family>;
  readonly frames: readonly FrameEntry[];
  readonly framesByKey: ReadonlyMap<string, FrameEntry>;
  readonly sections: Sections;
  readonly materials: Materials;
  /** The office's own sections: what the batch has taken of them and its rows don't hold yet. */
  readonly ownSections: Offered<Section>;
  readonly cases: LoadCases;
  readonly partOrigins: PartOrigins;
  /** The office's own limits on movement, where the sheets give none. */
  readonly officeLimits: readonly OfficeLimit[];
}
