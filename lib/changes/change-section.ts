/** Members given another section, as an edit of the rows that gave them the one they have. */
import type { SectionChange } from '@/lib/changes/change';
import { asksFor } from '@/lib/changes/members-asked';
import { sectionSource, sourceKey, type SectionSource } from '@/lib/changes/section-source';
import { type CellEdits, withCells } from '@/lib/changes/with-cell';
import { withOwn } from '@/lib/changes/with-own';
import type { RawCell, RawRow } from '@/lib/intake/files/raw-sheet';
import { idText } from '@/lib/intake/ids';
import type { Intake } from '@/lib/intake/intake';
import type { OwnThing } from '@/lib/intake/own/own-thing';
import type { FrameSeen } from '@/lib/intake/read-input';
import { plainCell } from '@/lib/intake/rows/cell-marks';
import { partOf, rowsOfPart, type StoredInput } from '@/lib/intake/rows/input-rows';
import { readRows } from '@/lib/intake/rows/read-rows';
import { isTyped } from '@/lib/intake/rows/cell-marks';
import type { Section } from '@/lib/model/frame';

/** An input as read: its frames in order, and where their members stand. */
export interface InputRead {
  readonly intake: Intake;
  readonly seen: readonly FrameSeen[];
}

export interface Refused {
  /** A sentence: why it cannot be done, and what to do. */
  readonly refused: string;
}

export interface SectionChanged {
  readonly input: StoredInput;
  readonly section: Section;
  /** `frame member`, as compared, of every member whose section becomes another. */
  readonly members: ReadonlySet<string>;
}

/** A member of a frame as one text; ids hold no line breaks. */
export const memberKey = (frame: string, member: string): string => `${frame}\n${member}`;

const identity = { name: '', sha256: '', files: [] };

/** @param own what the office offers beside the sheets */
export function readForChange(input: StoredInput, own: readonly OwnThing[] = []): InputRead {
  const seen: FrameSeen[] = [];
  const intake = readRows({ ...input, identity, problems: [] }, { own, onFrame: (frame) => seen.push(frame) });
  return { intake, seen };
}

interface Asked {
  readonly frame: string;
  readonly member: string;
  readonly source: SectionSource;
  readonly asked: boolean;
}

/**
 * Writes the section into the cells that decide it. A cell that gives several members their section is changed where all of
 * them are asked for; of a template's row a row for the frame takes the place where only some frames are. What a cell
 * cannot say is refused, and nothing is changed.
 */
export function changeSection(input: StoredInput, read: InputRead, change: SectionChange, by: string): SectionChanged | Refused {
  const to = sectionNamed(read, change.to);
  if ('refused' in to) return to;
  const wanted = asksFor(change.what);
  const groups = new Map<string, Asked[]>();
  const changed = new Set<string>();
  let found = 0;
  for (const seen of read.seen) {
    for (const [place, member] of seen.frame.members.entries()) {
      const section = seen.frame.sections[member.section];
      const asked = section !== undefined && wanted.takes(seen.frame.id, member, section);
      const source = sectionSource(seen, place);
      if (asked) {
        found += 1;
        if ('why' in source) {
          return { refused: `The section of ${member.id} of ${seen.frame.id} cannot be changed here: ${source.why}.` };
        }
        if (section.name !== to.section.name) changed.add(memberKey(seen.frame.id, member.id));
      }
      if ('why' in source) continue;
      const key = sourceKey(source);
      const group = groups.get(key);
      const one = { frame: seen.frame.id, member: member.id, source, asked };
      if (group) group.push(one);
      else groups.set(key, [one]);
    }
  }
  const missing = wanted.missing();
  if (missing !== null) return { refused: `${missing} is no member of a frame that can run.` };
  if (found === 0) return { refused: 'No member of a frame that can run is what the change asks for.' };
  if (changed.size === 0) return { refused: `${found === 1 ? 'The member has' : 'They have'} the section ${to.typed} already.` };

  const edits = new Map<number, Map<number, Map<number, RawCell>>>();
  const added = new Map<number, RawRow[]>();
  for (const group of groups.values()) {
    const asked = group.filter((one) => one.asked);
    const [first] = asked;
    if (!first || !asked.some(({ frame, member }) => changed.has(memberKey(frame, member)))) continue;
    const { source } = first;
    const typed = isTyped(input.sheets[source.part]?.file ?? '');
    if (asked.length === group.length) {
      const rows = edits.get(source.part) ?? new Map<number, Map<number, RawCell>>();
      edits.set(source.part, rows);
      const cells = rows.get(source.row) ?? new Map<number, RawCell>();
      rows.set(source.row, cells.set(source.column, plainCell(to.typed, typed)));
      continue;
    }
    const other = group.find((one) => !one.asked);
    if (source.template === null) {
      const whose = other ? `${other.member} of ${other.frame}` : 'another member';
      const cell = source.parameter === null ? source.cell : `${source.cell} (${source.parameter})`;
      return {
        refused: `${first.member} of ${first.frame} takes its section from ${cell}, as ${whose} does: they change together or not at all. Add ${whose} to the change.`,
      };
    }
    for (const { frame, source: own } of asked) {
      if (own.template === null) continue;
      const rows = added.get(own.part) ?? [];
      added.set(own.part, rows);
      rows.push(rowForFrame(own.template.raw, {
        frameColumn: own.template.part.byName.get('frame')?.index ?? -1,
        frame: plainCell(idText(frame), typed),
        sectionColumn: own.column,
        section: plainCell(to.typed, typed),
        by,
      })); // prettier-ignore
    }
  }
  const after = edited(input, edits, added, by);
  return { input: withOwn(after, read.seen[0]?.batch.ownSections.taken ?? new Set()), section: to.section, members: changed };
}

/** A template's row once more for one frame, whose place it takes there. */
function rowForFrame(
  template: RawRow,
  own: { frameColumn: number; frame: RawCell; sectionColumn: number; section: RawCell; by: string },
): RawRow {
  const cells = template.cells.map((cell, column) => {
    if (column === own.frameColumn) return own.frame;
    if (column === own.sectionColumn) return own.section;
    if (cell?.mergedFrom === undefined) return cell;
    const { mergedFrom: _, ...loose } = cell;
    return loose as RawCell;
  });
  return { row: template.row, cells, changedBy: own.by };
}

/** The section of a name as a member would find it: the batch's own before the library's. */
export function sectionNamed({ seen }: InputRead, name: string): { section: Section; typed: string } | Refused {
  const sections = seen[0]?.batch.sections;
  if (!sections) return { refused: 'No frame of this revision can run, so no section can be changed. Mend its sheets first.' };
  const found = sections.find(name);
  if ('suggestion' in found) {
    const hint = found.suggestion === null ? 'Name a designation of the library, one of the office’s own or a section of the Sections sheet.' : `Did you mean ${found.suggestion}?`; // prettier-ignore
    if (found.retired) return { refused: `${name} is no longer offered by the office. Name another section.` };
    return { refused: `There is no section “${name}”. ${hint}` };
  }
  if (found.section === null) return { refused: `The row of ${name} on the Sections sheet is wrong. Mend it first.` };
  // a designation is written as the standard writes it, unless the batch calls something else so
  const typed = found.row === null ? (found.section.designation ?? name) : found.section.name;
  const again = sections.find(typed);
  return { section: found.section, typed: 'section' in again && again.section === found.section ? typed : name };
}

/** The input with cells changed and rows added at the end of their sheets; sheets that nothing touches keep their rows. */
function edited(
  { sheets, rows }: StoredInput,
  edits: ReadonlyMap<number, CellEdits>,
  added: ReadonlyMap<number, readonly RawRow[]>,
  by: string,
): StoredInput {
  const own = sheets.map((_, place) => rows.filter((row) => row.part === place));
  const after = sheets.flatMap((sheet, place) => {
    const before = own[place] ?? [];
    const cells = edits.get(place);
    const more = added.get(place) ?? [];
    if (!cells && more.length === 0) return before;
    const part = partOf(sheet, place, before);
    const last = part.rows.at(-1)?.row ?? 0;
    const kept = cells ? withCells(part.rows, cells, by) : part.rows;
    return rowsOfPart({ ...part, rows: [...kept, ...more.map((row, i) => ({ ...row, row: last + 1 + i }))] }, place);
  });
  return { sheets, rows: after };
}
