/** What sections and materials of a batch's sheets are, asked by frames made up for it: they are read as every frame is. */
import type { InputRow } from '@/lib/intake/intake';
import type { IntakeOptions } from '@/lib/intake/read-input';
import type { InputSheet, StoredInput } from '@/lib/intake/rows/input-rows';
import { readRows } from '@/lib/intake/rows/read-rows';
import type { Material } from '@/lib/model/frame';
import type { Unfit } from '@/lib/sizing/with-sections';
import type { SectionTaken } from '@/lib/sizing/section-taken';

/** A section by its name as a member would name it, of each of these materials. */
export interface SectionAsked {
  readonly name: string;
  readonly materials: readonly string[];
}

/** Sheets that say nothing of sections and materials: an input without them is read in no time. */
const ofFrames: ReadonlySet<string> = new Set([
  'Frames', 'Nodes', 'Members', 'Supports', 'Load cases', 'Node loads', 'Member loads', 'Settlements', 'Combinations', 'Limits',
  'Families', 'Variants',
]); // prettier-ignore

/** Whether a sheet may say what a section, material or setting is. @param known the contract's name of it */
export const saysSections = (known: string | null): boolean => known === null || !ofFrames.has(known);

const file = 'asked.xlsx';

/**
 * Sections as a change would find them: the batch's own before the office's, before the library's; materials as they are for
 * their thickness and shape.
 *
 * @param input without the sheets of frames
 * @returns in the order of what was asked; why where one is not to be had
 */
export function probeSections(
  input: StoredInput,
  options: Pick<IntakeOptions, 'own'>,
  asked: readonly SectionAsked[],
): readonly (SectionTaken | Unfit)[] {
  const sheets: InputSheet[] = [...input.sheets];
  const rows: InputRow[] = [...input.rows];
  const sheet = (name: string, lines: readonly (readonly string[])[]): void => {
    const part = sheets.push({ name, file, decimalMark: null }) - 1;
    rows.push(...lines.map((cells, i) => ({ sheet: name, row: i + 1, cells: [...cells], part, marks: null, changedBy: null })));
  };
  const frames = asked.flatMap(({ name, materials }, a) => materials.map((material, m) => ({ id: `${a} ${m}`, name, material })));
  sheet('Nodes', [['frame', 'node', 'x', 'y'], ...frames.flatMap(({ id }) => [[id, 'A', '0', '0'], [id, 'B', '10', '0']])]); // prettier-ignore
  sheet('Members', [
    ['frame', 'member', 'start', 'end', 'section', 'material'],
    ...frames.map(({ id, name, material }) => [id, 'AB', 'A', 'B', name, material]),
  ]);
  sheet('Supports', [['frame', 'node', 'ux', 'uy', 'rz'], ...frames.map(({ id }) => [id, 'A', 'fixed', 'fixed', 'fixed'])]);
  const identity = { name: '', sha256: '', files: [] };
  const { frames: read, problems } = readRows({ sheets, rows, identity, problems: [] }, options);
  const byId = new Map(read.map(({ id, frame }) => [id, frame]));
  return asked.map(({ name, materials }, a): SectionTaken | Unfit => {
    let section: SectionTaken['section'] | null = null;
    const found: Record<string, Material> = {};
    let wrong: string | null = null;
    for (const [m, material] of materials.entries()) {
      const id = `${a} ${m}`;
      const frame = byId.get(id);
      const [only] = frame?.members ?? [];
      const of = frame && only ? { section: frame.sections[only.section], material: frame.materials[only.material] } : null;
      if (of?.section && of.material) {
        section = of.section;
        found[material] = of.material;
      } else wrong ??= problems.find(({ severity, frames: who }) => severity === 'error' && who.includes(id))?.message ?? null;
    }
    return section === null ? { unfit: wrong ?? `${name} is not to be had in this batch.` } : { section, materials: found };
  });
}
