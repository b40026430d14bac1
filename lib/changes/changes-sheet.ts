/** A Changes sheet: rows that say which members take which section, resolved to changes against the frames as read. */
import type { SectionChange } from '@/lib/changes/change';
import { type InputRead, memberKey, sectionNamed } from '@/lib/changes/change-section';
import type { RawSheet } from '@/lib/intake/files/raw-sheet';
import { idKey } from '@/lib/intake/ids';
import { ProblemList } from '@/lib/intake/problem-list';
import { readTable } from '@/lib/intake/read-table';
import { forNobody, Reader } from '@/lib/intake/reader';
import type { SheetDefinition } from '@/lib/intake/sheet-definitions';
import type { Row } from '@/lib/intake/table';
import { sheetKey } from '@/lib/intake/words';
import { type Role, roles } from '@/lib/model/frame';
import type { Problem } from '@/lib/problems/problem';
import * as say from '@/lib/problems/wording';

const changesDefinition: SheetDefinition = {
  name: 'Changes',
  columns: new Map([
    ['frame', null],
    ['member', null],
    ['role', null],
    ['section', null],
    ['note', null],
  ]),
  required: [['member', 'role'], ['section']],
};

export interface ChangesSheetRead {
  /** One for each section that members take, in order of first mention, its members named one by one. */
  readonly changes: readonly SectionChange[];
  /** Rows that say something. */
  readonly rows: number;
  readonly problems: readonly Problem[];
}

/** A row as understood; the closer it names a member, the more it counts. */
interface Said {
  readonly row: Row;
  readonly to: string;
  readonly closeness: number;
}

/**
 * Reads the sheet called Changes, or the only sheet there is. A row names a member of a frame, a role of a frame, or a role of
 * every frame (frame blank or `*`); of rows that fit one member the closest holds, and equally close ones must agree.
 *
 * @returns null where none of the sheets is one; every slip is a problem at its cell
 */
export function readChangesSheet(sheets: readonly RawSheet[], read: InputRead): ChangesSheetRead | null {
  const named = sheets.filter(({ name }) => sheetKey(name) === sheetKey('Changes'));
  const own = named.length === 0 && sheets.length === 1 ? sheets : named;
  if (own.length === 0) return null;
  const problems = new ProblemList();
  const reader = new Reader(problems);
  const table = readTable({ name: 'Changes', parts: own.flatMap(({ parts }) => parts) }, changesDefinition, 'metric', problems);
  const members = new Members(read);
  const said = new Map<string, Said>();
  for (const row of table.rows) readRow(row, reader, read, members, said);
  return { changes: grouped(said, members), rows: table.rows.length, problems: problems.list() };
}

function readRow(row: Row, reader: Reader, read: InputRead, members: Members, said: Map<string, Said>): void {
  const tell = (at: string, code: Problem['code'], message: string): void => reader.tell(row, at, { code, message }, forNobody);
  const frame = reader.id(row, 'frame', forNobody);
  const member = reader.id(row, 'member', forNobody);
  const role = reader.word(row, 'role', roles, forNobody);
  const section = reader.needId(row, 'section', forNobody);
  if (frame === undefined || member === undefined || role === undefined || section === undefined) return;
  const everywhere = frame === null || frame === '*';
  if (member !== null && role !== null) return tell('role', 'conflicting-row', say.memberAndRole());
  if (member === null && role === null) return tell('member', 'missing-id', say.memberOrRole());
  if (member !== null && everywhere) return tell('frame', 'missing-id', say.memberNeedsFrame(member));
  const to = sectionNamed(read, section);
  if ('refused' in to) return tell('section', 'unknown-section', to.refused.replace(/\.$/, ''));
  if (!everywhere && !members.hasFrame(frame)) return tell('frame', 'unknown-node', say.frameNotRun(frame));
  const fits = members.fitting(everywhere ? null : frame, member, role);
  if (fits.length === 0) {
    const message =
      member !== null ? say.noSuchMember(member, frame ?? '') : say.noSuchRole(role ?? '', everywhere ? null : frame);
    return tell(member !== null ? 'member' : 'role', 'unknown-member', message);
  }
  const closeness = member !== null ? 2 : everywhere ? 0 : 1;
  for (const key of fits) {
    const before = said.get(key);
    if (before && before.closeness > closeness) continue;
    if (before && before.closeness === closeness && before.to !== to.typed)
      return tell('section', 'conflicting-row', say.changedTwice(before.to, before.row.raw.row));
    said.set(key, { row, to: to.typed, closeness });
  }
}

/** Members that keep the section they have are left out: nothing changes for them. */
function grouped(said: ReadonlyMap<string, Said>, members: Members): SectionChange[] {
  const changes = new Map<string, { frame: string; member: string }[]>();
  for (const [key, { to }] of said) {
    const one = members.byKey.get(key);
    if (!one || idKey(one.section) === idKey(to)) continue;
    const same = changes.get(to);
    const named = { frame: one.frame, member: one.member };
    if (same) same.push(named);
    else changes.set(to, [named]);
  }
  return [...changes].map(([to, list]) => ({ kind: 'section', what: { members: list }, to }));
}

interface Known {
  readonly frame: string;
  readonly member: string;
  readonly section: string;
}

/** Members of the frames that can run, by frame, by role and by key. */
class Members {
  readonly byKey = new Map<string, Known>();
  private readonly byRole = new Map<Role, string[]>();
  private readonly ofFrame = new Map<string, { key: string; member: string; role: Role | null }[]>();

  constructor({ seen }: InputRead) {
    for (const { frame } of seen) {
      const own: { key: string; member: string; role: Role | null }[] = [];
      this.ofFrame.set(idKey(frame.id), own);
      for (const member of frame.members) {
        const key = memberKey(frame.id, member.id);
        own.push({ key, member: idKey(member.id), role: member.role });
        this.byKey.set(key, { frame: frame.id, member: member.id, section: frame.sections[member.section]?.name ?? '' });
        if (member.role === null) continue;
        const alike = this.byRole.get(member.role);
        if (alike) alike.push(key);
        else this.byRole.set(member.role, [key]);
      }
    }
  }

  hasFrame(frame: string): boolean {
    return this.ofFrame.has(idKey(frame));
  }

  /** @param frame null = every one */
  fitting(frame: string | null, member: string | null, role: Role | null): readonly string[] {
    if (frame === null) return (role && this.byRole.get(role)) ?? [];
    const own = this.ofFrame.get(idKey(frame)) ?? [];
    const fits = member === null ? own.filter((one) => one.role === role) : own.filter((one) => one.member === idKey(member));
    return fits.map(({ key }) => key);
  }
}
