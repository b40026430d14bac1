import type { Draft } from '@/lib/intake/draft';
import { samePoint_m } from '@/lib/intake/geometry/check-geometry';
import { idKey } from '@/lib/intake/ids';
import { LoadFigures } from '@/lib/intake/sheets/load-figures';
import { caseOf, loadRows } from '@/lib/intake/sheets/node-loads';
import type { RowsByFrame } from '@/lib/intake/rows-by-frame';
import { type Row, rawCell } from '@/lib/intake/table';
import { type LoadAxes, type LoadDirection } from '@/lib/model/frame';
import * as say from '@/lib/problems/wording';
import { inPlane } from '@/lib/sections/in-plane';

const kinds = ['distributed', 'point', 'moment', 'temperature'] as const;
const axesWords = ['global', 'local', 'projected'] as const;
const directionWords = ['x', 'y'] as const;

/** What a row must leave blank, by its load: a figure that would be passed over in silence is an error. */
const blankFor = {
  distributed: ['dT', 'dT across'],
  point: ['to', 'end value', 'width', 'dT', 'dT across'],
  moment: ['to', 'end value', 'width', 'dT', 'dT across', 'axes', 'direction'],
  temperature: ['value', 'end value', 'from', 'to', 'width', 'axes', 'direction'],
} as const;

export function readMemberLoads(draft: Draft, rows: RowsByFrame): void {
  for (const row of loadRows(draft, rows, 'member')) readMemberLoad(draft, row);
}

function readMemberLoad(draft: Draft, row: Row): void {
  const { reader } = draft.batch;
  const { reading } = draft;
  const loadCase = caseOf(draft, row);
  const member = memberOf(draft, row);
  const kind = reader.word(row, 'load', kinds, reading);
  if (kind === null) reader.tell(row, 'load', { code: 'unknown-word', message: say.unknownWord('load', '', kinds) }, reading);
  if (!kind) return;
  const axes = reader.word<LoadAxes>(row, 'axes', axesWords, reading);
  const direction = reader.word<LoadDirection>(row, 'direction', directionWords, reading);
  let sound = loadCase !== undefined && member !== undefined && axes !== undefined && direction !== undefined;
  for (const name of blankFor[kind]) {
    const cell = rawCell(row, name);
    if (!cell || reader.text(row, name, reading) === null) continue;
    const word = name === 'axes' || name === 'direction';
    reader.tell(row, name, { code: word ? 'unknown-word' : 'out-of-range', message: say.mustBeBlank(name, kind) }, reading);
    sound = false;
  }
  if (kind === 'point' && axes === 'projected') {
    reader.tell(row, 'axes', { code: 'unknown-word', message: say.projectedIsDistributed() }, reading);
    sound = false;
  }
  // a member of no length has said so: what stands beyond its end would only say it again
  const length = member === undefined || member < 0 ? 0 : (draft.lengths[member] ?? 0);
  const L = length < samePoint_m ? null : length;
  const figures = new LoadFigures(draft, row, kind, L);
  if (kind === 'temperature') {
    const change = readTemperature(draft, row, member);
    if (sound && change && loadCase !== undefined && member !== undefined && member >= 0) {
      draft.memberLoads.push({ kind, case: loadCase, member, dT_K: change.dT, dTAcross_K: change.across });
    }
    return;
  }
  const value = figures.value();
  const ends = kind === 'distributed' ? figures.stretch() : figures.position();
  const end = kind === 'distributed' ? figures.endValue() : null;
  if (!sound || value === undefined || end === undefined || !ends || loadCase === undefined || member === undefined || member < 0)
    return;
  if ((value !== 0 || end) && draft.members[member]?.tensionOnly) {
    reader.tell(row, 'member', { code: 'not-supported', message: say.loadOnTensionOnly() }, reading);
    return;
  }
  const way = direction ?? 'y';
  if (kind === 'distributed') {
    draft.memberLoads.push({
      kind,
      case: loadCase,
      member,
      axes: axes ?? 'global',
      direction: way,
      q1_N_m: value,
      q2_N_m: end ?? value,
      from_m: ends.from,
      to_m: ends.to,
    });
  } else if (kind === 'point') {
    if (axes === 'projected') return;
    draft.memberLoads.push({ kind, case: loadCase, member, axes: axes ?? 'global', direction: way, P_N: value, at_m: ends.from });
  } else draft.memberLoads.push({ kind, case: loadCase, member, M_Nm: value, at_m: ends.from });
}

function memberOf(draft: Draft, row: Row): number | undefined {
  const { reader } = draft.batch;
  const id = reader.needId(row, 'member', draft.reading);
  if (id === undefined) return undefined;
  const index = draft.memberIndex.get(idKey(id));
  // a frame without any members has been told so
  if (index === undefined && draft.memberIndex.size > 0) {
    reader.tell(row, 'member', { code: 'unknown-member', message: say.unknownMember(id, draft.entry.id) }, draft.reading);
  }
  return index;
}

function readTemperature(draft: Draft, row: Row, member: number | undefined): { dT: number; across: number } | undefined {
  const { reader } = draft.batch;
  const dT = reader.number(row, 'dT', draft.reading);
  const across = reader.number(row, 'dT across', draft.reading);
  if (dT === undefined || across === undefined) return undefined;
  if (dT === null && across === null) {
    reader.tell(row, 'dT', { code: 'not-a-number', message: say.numberMissing('dT') }, draft.reading);
    return undefined;
  }
  const on = member === undefined ? undefined : draft.members[member];
  const section = on && draft.sections[on.section];
  const material = on && draft.materials[on.material];
  let sound = true;
  if (across && section && inPlane(section, on.turned).depth_m === null) {
    reader.tell(row, 'dT across', { code: 'not-a-number', message: say.gradientNeedsDepth(section.name) }, draft.reading);
    sound = false;
  }
  if ((dT || across) && material && material.expansion_perK === null) {
    const at = dT ? 'dT' : 'dT across';
    reader.tell(row, at, { code: 'not-a-number', message: say.temperatureNeedsExpansion(material.name) }, draft.reading);
    sound = false;
  }
  return sound ? { dT: dT ?? 0, across: across ?? 0 } : undefined;
}
