import type { Draft } from '@/lib/intake/draft';
import { idKey } from '@/lib/intake/ids';
import { oneRowAKey } from '@/lib/intake/keyed-rows';
import type { Reading } from '@/lib/intake/reader';
import { level, type RowsByFrame } from '@/lib/intake/rows-by-frame';
import { resolveMaterial } from '@/lib/intake/sheets/member-material';
import { nodeOf } from '@/lib/intake/sheets/node-loads';
import { type Row, rawCell } from '@/lib/intake/table';
import { meansOff } from '@/lib/intake/words';
import { type Joint, type Member, roles, type Section } from '@/lib/model/frame';
import * as say from '@/lib/problems/wording';

const jointWords = ['rigid', 'pin'] as const;

export function readMembers(draft: Draft, rows: RowsByFrame): void {
  const { reader } = draft.batch;
  const { reading } = draft;
  const keyOf = (row: Row): { id: string; key: string } | undefined => {
    if (!reader.keeps(row, reading)) return undefined;
    const id = reader.needId(row, 'member', reading);
    if (id === undefined) draft.shapeTrouble = true;
    return id === undefined ? undefined : { id, key: idKey(id) };
  };
  const mine = rows.for(draft.entry).filter(({ row, level: at }) => {
    if (at !== level.all) return true;
    const here = ['start', 'end'].every((name) => draft.nodeIndex.has(idKey(rawCell(row, name)?.text ?? '')));
    if (here) rows.fits(row);
    return here;
  });
  const kept = oneRowAKey(mine, keyOf, (row, first, same) => {
    const message = same
      ? say.repeatedRow(first.raw.row)
      : say.duplicateId('member', reader.id(row, 'member', reading) ?? '', first.raw.row);
    reader.tell(row, 'member', { code: 'duplicate-id', message, severity: same ? 'warning' : 'error' }, reading);
  });
  for (const { row, id, key } of kept) {
    const member = readMember(draft, row, id);
    draft.memberIndex.set(key, member ? draft.members.length : -1);
    if (!member) {
      draft.shapeTrouble = true;
      continue;
    }
    const [a, b] = [draft.nodes[member.start], draft.nodes[member.end]];
    draft.members.push(member);
    draft.memberRows.push(row);
    draft.lengths.push(a && b ? Math.hypot(b.x_m - a.x_m, b.y_m - a.y_m) : 0);
  }
}

function readMember(draft: Draft, row: Row, id: string): Member | undefined {
  const { reader } = draft.batch;
  const { reading } = draft;
  let sound = !reader.faulty(row, reading);
  const need = <T>(value: T | undefined): T | null => {
    if (value === undefined) sound = false;
    return value ?? null;
  };
  const start = need(nodeOf(draft, row, 'start')) ?? -1;
  const end = need(nodeOf(draft, row, 'end')) ?? -1;
  const found = sectionOf(draft, row);
  const material = found ? need(resolveMaterial(draft, row, found)) : need(undefined);
  const role = need(reader.word(row, 'role', roles, reading));
  const axialOnly = need(reader.yesNo(row, 'axial only', reading)) ?? false;
  const tensionOnly = need(isTensionOnly(draft, row)) ?? false;
  const startJoint = need(joint(draft, row, 'start joint', tensionOnly)) ?? 'rigid';
  const endJoint = need(joint(draft, row, 'end joint', tensionOnly)) ?? 'rigid';
  const turned = need(reader.yesNo(row, 'turned', reading)) ?? false;
  if (turned && found?.section && found.section.properties.Iminor_m4 === null) {
    reader.tell(row, 'turned', { code: 'not-a-number', message: say.turnedNeedsMinor(found.section.name) }, reading);
    sound = false;
  }
  refuse(draft, row);
  const length = (name: string): number | null => need(positiveLength(draft, row, name));
  const both = length('length LTB');
  const top = length('length LTB top');
  const bottom = length('length LTB bottom');
  const major = length('length major');
  const minor = length('length minor');
  const span = need(reader.id(row, 'span', reading));
  const group = need(reader.id(row, 'group', reading));
  if (!sound || !found || start < 0 || end < 0 || typeof material !== 'number') return undefined;
  // a rod that goes slack holds nothing at its ends
  const pinned = axialOnly || tensionOnly || (startJoint === 'pin' && endJoint === 'pin');
  return {
    id,
    start,
    end,
    section: sectionIndex(draft, found),
    material,
    role,
    startJoint: pinned ? 'pin' : startJoint,
    endJoint: pinned ? 'pin' : endJoint,
    axialOnly: pinned,
    tensionOnly,
    turned,
    span,
    lengthMajor_m: major,
    lengthMinor_m: minor,
    lengthLtbTop_m: top ?? both,
    lengthLtbBottom_m: bottom ?? both,
    group,
  };
}

function sectionIndex({ sections, sectionRows }: Draft, { section, row }: Found): number {
  const at = sections.indexOf(section);
  if (at >= 0) return at;
  sectionRows.push(row);
  return sections.push(section) - 1;
}

interface Found {
  readonly section: Section;
  /** Its row of the Sections sheet, which may name a material. */
  readonly row: Row | null;
}

function sectionOf(draft: Draft, row: Row): Found | undefined {
  const { reader, sections, problems } = draft.batch;
  const { reading } = draft;
  const name = reader.id(row, 'section', reading);
  if (name === undefined) return undefined;
  if (name === null) {
    reader.tell(row, 'section', { code: 'missing-id', message: say.missingId('section') }, reading);
    return undefined;
  }
  const found = sections.find(name);
  if ('suggestion' in found) {
    const message = found.retired ? say.retired(name) : say.unknownSection(name, found.suggestion);
    reader.tell(row, 'section', { code: 'unknown-section', message }, reading);
    return undefined;
  }
  for (const entry of found.entries) problems.touch(entry, draft.entry.id);
  const taken = sections.noteOnce(name);
  if (taken) reader.tell(row, 'section', { code: 'derived', message: say.designationTaken(taken) }, reading);
  return found.section ? { section: found.section, row: found.row } : undefined;
}

function isTensionOnly({ batch, reading }: Draft, row: Row): boolean | undefined {
  return meansOff(rawCell(row, 'tension only')?.text ?? '') ? false : batch.reader.yesNo(row, 'tension only', reading);
}

function joint(draft: Draft, row: Row, name: string, tensionOnly: boolean): Joint | null | undefined {
  const { reader } = draft.batch;
  const value = reader.wordOrNumber(row, name, jointWords, draft.reading);
  if (value === 0) return 'pin';
  if (tensionOnly && value !== undefined && value !== null && value !== 'pin') {
    reader.tell(row, name, { code: 'unknown-word', message: say.tensionOnlyIsPinned() }, draft.reading);
    return undefined;
  }
  if (typeof value !== 'number') return value;
  if (value > 0) return value;
  reader.tell(row, name, { code: 'not-positive', message: say.negativeSpring(rawCell(row, name)?.text ?? '') }, draft.reading);
  return undefined;
}

function positiveLength(draft: Draft, row: Row, name: string): number | null | undefined {
  const value = draft.batch.reader.number(row, name, draft.reading);
  if (value === null || value === undefined || value > 0) return value;
  const fault = { code: 'not-positive', message: say.notPositive(name, rawCell(row, name)?.text ?? '') } as const;
  draft.batch.reader.tell(row, name, fault, draft.reading);
  return undefined;
}

/** Columns of the contract that are not computed yet: a frame that uses them is refused. */
function refuse(draft: Draft, row: Row): void {
  const { reader } = draft.batch;
  const reading: Reading = draft.reading;
  for (const name of ['end section', 'offset']) {
    const text = rawCell(row, name) ? reader.text(row, name, reading) : null;
    if (text && !meansOff(text)) {
      reader.tell(row, name, { code: 'not-supported', message: say.columnNotSupported(name) }, reading);
    }
  }
}
