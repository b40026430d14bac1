/** What a change of section would do, read from its rows before anything runs. */
import type { SectionChange } from '@/lib/changes/change';
import { changeSection, memberKey, readForChange, type InputRead, type Refused } from '@/lib/changes/change-section';
import type { OwnThing } from '@/lib/intake/own/own-thing';
import type { FrameSeen } from '@/lib/intake/read-input';
import type { StoredInput } from '@/lib/intake/rows/input-rows';
import type { Material, Member, Section } from '@/lib/model/frame';

/** Figures by which sections are compared, SI; null = not known. */
export interface SectionFigures {
  readonly section: string;
  readonly A_m2: number;
  readonly I_m4: number;
  /** The smaller of both faces. */
  readonly W_m3: number | null;
  /** Of the member's material; null = it has no density. */
  readonly mass_kg_m: number | null;
}

export interface MemberChange {
  readonly frame: string;
  /** Place of the frame in sheet order, from 1. */
  readonly number: number;
  readonly member: string;
  readonly role: string | null;
  readonly length_m: number;
  readonly before: SectionFigures;
  readonly after: SectionFigures;
}

export interface SectionPreview {
  /** The section as it will stand in the sheets. */
  readonly to: string;
  /** Sections that go, each with how many members have it. */
  readonly from: readonly { readonly before: SectionFigures; readonly after: SectionFigures; readonly members: number }[];
  /** Frames that run again; the others keep their results. */
  readonly touched: readonly { readonly number: number; readonly frame: string }[];
  readonly carriedOver: number;
  readonly members: readonly MemberChange[];
  /** Steel of the members changed, in all frames with their number off; null where a material has no density. */
  readonly mass: { readonly before_kg: number; readonly after_kg: number } | null;
}

export interface Previewed {
  readonly preview: SectionPreview;
  readonly input: StoredInput;
  /** The rows as changed, read. */
  readonly read: InputRead;
}

/**
 * Makes the change to the rows and reads them again: every member asked for has the new section then, every other member the
 * one it had, no frame stops that could run and no member takes another material. Else the change is refused with the reason.
 */
export function previewSection(
  input: StoredInput,
  change: SectionChange,
  by: string,
  own: readonly OwnThing[] = [],
  before: InputRead = readForChange(input, own),
): Previewed | Refused {
  const made = changeSection(input, before, change, by);
  if ('refused' in made) return made;
  const after = readForChange(made.input, own);
  const wrong = refuse(before, after, made.members);
  if (wrong !== null) return { refused: wrong };

  const numbers = new Map(before.intake.frames.map(({ id }, i) => [id, i + 1]));
  const members: MemberChange[] = [];
  const afterById = new Map(after.seen.map((seen) => [seen.frame.id, seen]));
  for (const seen of before.seen) {
    const { frame } = seen;
    const own = afterById.get(frame.id);
    for (const [place, member] of frame.members.entries()) {
      if (!own || !made.members.has(memberKey(frame.id, member.id))) continue;
      members.push({
        frame: frame.id,
        number: numbers.get(frame.id) ?? 0,
        member: member.id,
        role: member.role,
        length_m: lengthOf(seen, member),
        before: figures(seen, member),
        after: figures(own, own.frame.members[place] ?? member),
      });
    }
  }
  const touched = [...new Map(members.map(({ frame, number }) => [number, frame]))];
  return {
    input: made.input,
    read: after,
    preview: {
      to: members[0]?.after.section ?? change.to,
      from: bySection(members),
      touched: touched.map(([number, frame]) => ({ number, frame })),
      carriedOver: before.intake.frames.filter(({ frame }) => frame !== null).length - touched.length,
      members,
      mass: massOf(members, new Map(before.seen.map(({ frame }) => [frame.id, frame.count]))),
    },
  };
}

/** Why the rows as changed do not say what was asked; null where they do. */
function refuse(before: InputRead, after: InputRead, changed: ReadonlySet<string>): string | null {
  const afterById = new Map(after.seen.map((seen) => [seen.frame.id, seen]));
  for (const { id, frame } of after.intake.frames) {
    if (frame !== null || !before.intake.frames.some((one) => one.id === id && one.frame !== null)) continue;
    const problem = after.intake.problems.find(({ severity, frames }) => severity === 'error' && frames.includes(id));
    return `With that section ${id} can’t run: ${problem?.message ?? 'its sheets would be wrong.'}`;
  }
  for (const seen of before.seen) {
    const own = afterById.get(seen.frame.id);
    for (const [place, member] of seen.frame.members.entries()) {
      const next = own?.frame.members[place];
      if (!own || !next || next.id !== member.id) return `The members of ${seen.frame.id} would not be the same. Change its sheets instead.`; // prettier-ignore
      const [had, has] = [sectionOf(seen, member), sectionOf(own, next)];
      const asked = changed.has(memberKey(seen.frame.id, member.id));
      if (!asked && had.name !== has.name) {
        return `${member.id} of ${seen.frame.id} would become ${has.name} too, by an expression of its family. Add it to the change, or change the family’s sheets.`;
      }
      const [was, becomes] = [materialOf(seen, member), materialOf(own, next)];
      if (was?.name !== becomes?.name) {
        return `${member.id} of ${seen.frame.id} takes its material ${was?.name ?? ''} from the Sections sheet, and would become ${becomes?.name ?? 'without one'}. Name the material on Members first.`;
      }
    }
  }
  return null;
}

function sectionOf({ frame }: FrameSeen, { section }: Member): Section {
  const found = frame.sections[section];
  if (!found) throw new RangeError(`Expected section ${section} of ${frame.id}`);
  return found;
}

const materialOf = ({ frame }: FrameSeen, { material }: Member): Material | undefined => frame.materials[material];

function lengthOf({ frame }: FrameSeen, { start, end }: Member): number {
  const [a, b] = [frame.nodes[start], frame.nodes[end]];
  return a && b ? Math.hypot(b.x_m - a.x_m, b.y_m - a.y_m) : 0;
}

function figures(seen: FrameSeen, member: Member): SectionFigures {
  const section = sectionOf(seen, member);
  const { A_m2, I_m4, Wtop_m3, Wbottom_m3 } = section.properties;
  const density = materialOf(seen, member)?.density_kg_m3 ?? null;
  const faces = [Wtop_m3, Wbottom_m3].filter((one) => one !== null);
  return {
    section: section.name,
    A_m2,
    I_m4,
    W_m3: faces.length === 2 ? Math.min(...faces) : null,
    mass_kg_m: density === null ? null : A_m2 * density,
  };
}

function bySection(members: readonly MemberChange[]): SectionPreview['from'] {
  const groups = new Map<string, { before: SectionFigures; after: SectionFigures; members: number }>();
  for (const { before, after } of members) {
    const key = `${before.section}\n${before.mass_kg_m}`;
    const group = groups.get(key);
    if (group) group.members += 1;
    else groups.set(key, { before, after, members: 1 });
  }
  return [...groups.values()];
}

function massOf(members: readonly MemberChange[], counts: ReadonlyMap<string, number>): SectionPreview['mass'] {
  let [before_kg, after_kg] = [0, 0];
  for (const { frame, length_m, before, after } of members) {
    if (before.mass_kg_m === null || after.mass_kg_m === null) return null;
    const metres = length_m * (counts.get(frame) ?? 1);
    before_kg += before.mass_kg_m * metres;
    after_kg += after.mass_kg_m * metres;
  }
  return { before_kg, after_kg };
}
