/** An office's own sections and materials, as rows of the sheets that they would stand on. */
import type { System } from '@/lib/units/quantity';

export type OwnKind = 'section' | 'material';

/** What decides a section or a material: cells of a row of Sections or Materials, in the units of the system. */
export interface OwnRecord {
  readonly name: string;
  readonly units: System;
  /** Text by column of its sheet (`h`, `I minor`, `fy by thickness`), without name and source. */
  readonly cells: Readonly<Record<string, string>>;
}

/** One version of it. */
export interface OwnThing extends OwnRecord {
  readonly kind: OwnKind;
  /** From 1. */
  readonly version: number;
  /** Where its figures come from, in words; '' = nothing said. */
  readonly note: string;
  /** No longer offered: whoever names it is told so. */
  readonly retired: boolean;
}

/** Where a section or a material of a batch's frames comes from. */
export interface PartOrigin {
  readonly kind: OwnKind;
  readonly name: string;
  readonly origin: 'sheet' | 'office' | 'library';
  /** Of the office's own. */
  readonly version: number | null;
  /** "Sections row 4", the office's note, or what a sheet says as its source; null = nothing more is known. */
  readonly note: string | null;
  /** The office's own name for it, where it is the office's. */
  readonly own: string | null;
  /** Frames that are made of it. */
  readonly frames: number;
}

/** "office v3 (mill sheet 12)", "standard", "Sections row 4": a part's origin in words. */
export function originOfPart({ origin, version, note }: Pick<PartOrigin, 'origin' | 'version' | 'note'>): string {
  const more = note === null || note === '' ? '' : ` (${note})`;
  if (origin === 'office') return `office v${version ?? '?'}${more}`;
  return origin === 'library' ? 'standard' : `sheet${more}`;
}
