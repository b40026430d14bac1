import type { Section, ShapeDimensions } from '@/lib/model/frame';
import { propertiesOfChannel } from './channel-section';
import { propertiesOfChs, propertiesOfRhs } from './hollow-section';
import { propertiesOfI } from './i-section';
import { c } from './ranges/c';
import { cfChs } from './ranges/cf-chs';
import { cfRhs } from './ranges/cf-rhs';
import { cfShs } from './ranges/cf-shs';
import { heA } from './ranges/he-a';
import { heAA } from './ranges/he-aa';
import { heB } from './ranges/he-b';
import { heM } from './ranges/he-m';
import { hfChs } from './ranges/hf-chs';
import { hfRhs } from './ranges/hf-rhs';
import { hfShs } from './ranges/hf-shs';
import { hp } from './ranges/hp';
import { hssRect } from './ranges/hss-rect';
import { hssRound } from './ranges/hss-round';
import { hssSquare } from './ranges/hss-square';
import { ipe } from './ranges/ipe';
import { mc } from './ranges/mc';
import { pfc } from './ranges/pfc';
import { pipe } from './ranges/pipe';
import type { Range, RangeDimensions, RangeRow } from './ranges/range';
import { s } from './ranges/s';
import { ub } from './ranges/ub';
import { uc } from './ranges/uc';
import { upe } from './ranges/upe';
import { upn } from './ranges/upn';
import { w } from './ranges/w';
import { derived, sourcesOf, type ShapedSection } from './section-from-shape';
import { propertiesOfTaperedChannel, propertiesOfTaperedI } from './tapered-section';

/** The standard ranges held, in the order a list shows them. */
export const ranges = {
  IPE: ipe,
  'HE AA': heAA,
  'HE A': heA,
  'HE B': heB,
  'HE M': heM,
  UB: ub,
  UC: uc,
  UPN: upn,
  UPE: upe,
  PFC: pfc,
  HFSHS: hfShs,
  HFRHS: hfRhs,
  HFCHS: hfChs,
  CFSHS: cfShs,
  CFRHS: cfRhs,
  CFCHS: cfChs,
  W: w,
  HP: hp,
  S: s,
  C: c,
  MC: mc,
  'HSS rectangular': hssRect,
  'HSS square': hssSquare,
  'HSS round': hssRound,
  Pipe: pipe,
} as const satisfies Record<string, Range>;
export type RangeName = keyof typeof ranges;
export const rangeNames = Object.keys(ranges) as readonly RangeName[];

/** Every designation of a range, in the order of its table. */
export function designationsOf(range: RangeName): readonly string[] {
  return ranges[range].rows.map((row) => row.designation);
}

const made = new Map<string, Section>();

/** The section of a row of a range: its name is the designation, its properties are derived and labelled as the library's. */
export function librarySection(range: RangeName, row: RangeRow): Section {
  const known = made.get(row.designation);
  if (known) return known;
  const { unit, made: how } = ranges[range];
  const shaped = shapedOf(row.dimensions, unit === 'mm' ? 0.001 : 0.0254, how);
  const { designation } = row;
  const section: Section = { ...shaped, name: designation, designation, sources: sourcesOf(shaped.properties, 'library') };
  made.set(designation, section);
  return section;
}

const none: ShapeDimensions = { h: null, b: null, tw: null, tf: null, r: null, t: null, d: null };

function shapedOf(dims: RangeDimensions, k: number, how: Section['made']): ShapedSection {
  if (dims.shape === 'chs') {
    const [d, t] = [dims.d * k, dims.t * k];
    return derived('chs', { ...none, d, t }, propertiesOfChs(d, t), how);
  }
  const [h, b] = [dims.h * k, dims.b * k];
  if (dims.shape === 'rhs') {
    const [t, r] = [dims.t * k, dims.ro * k];
    return derived('rhs', { ...none, h, b, t, r }, propertiesOfRhs(h, b, t, r, dims.ri * k), how);
  }
  const [tw, tf, r] = [dims.tw * k, dims.tf * k, dims.r * k];
  const outline = { ...none, h, b, tw, tf, r };
  if (!('toe' in dims))
    return dims.shape === 'I'
      ? derived('I', outline, propertiesOfI(h, b, tw, tf, r), how)
      : derived('channel', outline, propertiesOfChannel(h, b, tw, tf, r), how);
  const tapered = { h, b, tw, tf, r, toe: dims.toe * k, slope: dims.slope, at: dims.at * k };
  return dims.shape === 'tapered I'
    ? derived('I', outline, propertiesOfTaperedI(tapered), how)
    : derived('channel', outline, propertiesOfTaperedChannel(tapered), how);
}
