import type { Frame, Material } from '@/lib/model/frame';
import type { Settings } from '@/lib/model/settings';
import { degreeM, degreeN, degreeV, flattened, headNumbers, ofM, ofN, ofV, segmentNumbers } from '@/lib/analysis/flat-line';
import type { StateLines } from '@/lib/analysis/flat-lines';
import type { MemberLine, ResultState } from '@/lib/results/result';
import { inPlane, type InPlane } from '@/lib/sections/in-plane';
import { keepGoverning, notCheckedRow, type Findings } from './check-row';
import { peakEquivalentStress } from './equivalent-stress';
import { lineBounds } from './line-bounds';
import { peakNormalStress } from './normal-stress';
import { peakShearStress } from './shear-stress';
import { plateProportions, slenderInCombination, type PlateProportions } from './slender-plates';
import { equivalentWithin, shortPeaks, type Governing } from './short-peaks';
import { StressBounds } from './stress-bounds';
import { StressRows, stressNames, stressSubject } from './stress-rows';

/** A slender plate of a physical member in a state: `find` is asked once for all of its pieces. */
export type SlenderIn = (state: number, find: (whole: MemberLine) => SlenderFound) => SlenderFound;
type SlenderFound = ReturnType<typeof slenderInCombination>;

/** Shear stress below this part of yield is what rounding leaves of none. */
const NO_SHEAR = 1e-6;

/** A row for each stress check of a member that can't be made at all. */
export function stressNotChecked(frame: Frame, member: number, reason: string, findings: Findings): void {
  for (const check of stressNames) keepGoverning(findings, [notCheckedRow(stressSubject(frame, member, check), null, reason)]);
}

/** What the stress checks of members of one section, material and turn share. */
interface StressKind {
  readonly of: InPlane;
  readonly plates: PlateProportions;
}

/** The kind of each member, worked out and its plates noted once for all members alike. */
export function stressKinds(frame: Frame, findings: Findings): (member: number) => StressKind {
  const known = new Map<number, StressKind>();
  return (member) => {
    const { section: s, material: m, turned } = frame.members[member]!;
    const key = 2 * (s * frame.materials.length + m) + (turned ? 1 : 0);
    let kind = known.get(key);
    if (!kind) {
      const section = frame.sections[s]!;
      const material = frame.materials[m]!;
      kind = { of: inPlane(section, turned), plates: plateProportions(section, turned, material) };
      notePlates(section.name, kind.plates, material.standard, findings);
      known.set(key, kind);
    }
    return kind;
  };
}

/**
 * Elastic stress of one member over all strength combinations: normal, shear and equivalent stress.
 * @param kind the member's (`stressKinds`)   @param lines the lines of each of `states`
 * @param slenderIn what is found of slender plates along the line of all pieces of its span of the same section, in a state: along
 *   the physical member, so that a node on it changes nothing; looked for once for all of them
 */
export function checkStress(
  frame: Frame,
  settings: Settings,
  member: number,
  { of, plates }: StressKind,
  states: readonly ResultState[],
  lines: readonly StateLines[],
  slenderIn: SlenderIn,
  findings: Findings,
): void {
  const m = frame.members[member]!;
  const section = frame.sections[m.section]!;
  const material = frame.materials[m.material]!;
  const fy = material.fy_Pa;
  const noYield =
    fy !== null ? null : material.grade !== null && section.properties.t_m === null ? 'needs t (fy depends on it)' : 'needs fy';
  const noAv = of.AvPeak_m2 === null ? 'needs Av' : null;
  if (fy === null || noYield !== null) return stressNotChecked(frame, member, noYield ?? 'needs fy', findings);

  const rows = new StressRows(frame, settings, member, of, fy, findings.all !== null);
  if (plates.watch.length === 0 && plates.shear === null && of.AvPeak_m2 !== null && findings.all === null) {
    const { Wtop_m3: top, Wbottom_m3: bottom } = of;
    if (top && bottom) {
      takePeaks(rows, states, lines, member, 1 / of.A_m2, 1 / top, 1 / bottom, 1 / of.AvPeak_m2);
      return rows.finish(findings);
    }
  }
  for (let c = 0; c < lines.length; c++) {
    const at = lines[c]!.at(member);
    const line = lines[c]!.numbers;
    const combination = states[c]!.name;
    const noW = modulusMissing(of, m.turned, line, at);
    const perTop = of.Wtop_m3 && !noW ? 1 / of.Wtop_m3 : 0;
    const perBottom = of.Wbottom_m3 && !noW ? 1 / of.Wbottom_m3 : 0;
    let noNormal = noW;
    if (!noW && plates.watch.length > 0) {
      const slender = slenderIn(c, (whole) => {
        const governing = peakNormalStress(flattened(whole), 0, 1 / of.A_m2, perTop, perBottom);
        return slenderInCombination(section, m.turned, material, plates.watch, whole, of, governing, settings.stressFactor);
      });
      if (slender) noNormal = `slender ${slender}`;
    }
    if (!noNormal && !noAv && plates.shear === null && rows.staysBelow(lineBounds(line, at), perTop, perBottom)) continue;
    const normal = noNormal ? 0 : rows.take(0, combination, peakNormalStress(line, at, 1 / of.A_m2, perTop, perBottom));
    if (noNormal) rows.refuse(0, combination, noNormal);
    if (noAv) {
      rows.refuse(1, combination, noAv);
      rows.refuse(2, combination, noNormal ?? noAv);
      continue;
    }
    const perAv = 1 / of.AvPeak_m2!;
    const peak = peakShearStress(line, at, perAv);
    if (plates.shear !== null && peak.value > NO_SHEAR * fy) {
      rows.refuse(1, combination, plates.shear);
      rows.refuse(2, combination, noNormal ?? plates.shear);
      continue;
    }
    const shear = rows.take(1, combination, peak);
    if (noNormal) rows.refuse(2, combination, noNormal);
    else {
      const bound = Math.sqrt(normal * normal + 3 * shear * shear);
      const floor = rows.floor(2);
      rows.take(2, combination, peakEquivalentStress(line, at, 1 / of.A_m2, perTop, perBottom, perAv, bound, floor));
    }
  }
  rows.finish(findings);
}

/** Peaks of a member of which nothing is refused in any state, at those states that may govern. */
function takePeaks(
  rows: StressRows,
  states: readonly ResultState[],
  lines: readonly StateLines[],
  member: number,
  perA: number,
  perTop: number,
  perBottom: number,
  perAv: number,
): void {
  const short = shortPeaks(lines, member, perA, perTop, perBottom, perAv);
  if (short) return takeShortPeaks(rows, states, lines, member, perA, perTop, perBottom, perAv, short);
  const bounds = new StressBounds(lines, member, perA, perTop, perBottom, perAv);
  for (let c = 0; c < lines.length; c++) {
    const both = bounds.mayGovern(2, c);
    const alone = bounds.mayGovern(0, c);
    const sheared = bounds.mayGovern(1, c);
    if (!alone && !sheared && !both) continue;
    const { name } = states[c]!;
    const at = lines[c]!.at(member);
    const line = lines[c]!.numbers;
    const normal = alone || both ? peakNormalStress(line, at, perA, perTop, perBottom) : null;
    const shear = sheared || both ? peakShearStress(line, at, perAv) : null;
    if (alone && normal) rows.take(0, name, normal);
    if (sheared && shear) rows.take(1, name, shear);
    if (!both || !normal || !shear) continue;
    const bound = Math.sqrt(normal.value * normal.value + 3 * shear.value * shear.value);
    const floor = rows.floor(2);
    // what is no number is kept, not passed over
    if (!(bound <= floor)) rows.take(2, name, peakEquivalentStress(line, at, perA, perTop, perBottom, perAv, bound, floor));
  }
}

/** The same where `shortPeaks` says which states govern. */
function takeShortPeaks(
  rows: StressRows,
  states: readonly ResultState[],
  lines: readonly StateLines[],
  member: number,
  perA: number,
  perTop: number,
  perBottom: number,
  perAv: number,
  { normal, shear }: Governing,
): void {
  const at = (c: number): number => lines[c]!.at(member);
  const { numbers } = lines[0]!;
  rows.take(0, states[normal]!.name, peakNormalStress(numbers, at(normal), perA, perTop, perBottom));
  rows.take(1, states[shear]!.name, peakShearStress(numbers, at(shear), perAv));
  for (let c = 0; c < lines.length; c++) {
    const bound = equivalentWithin(c);
    const floor = rows.floor(2);
    if (bound <= floor) continue;
    rows.take(2, states[c]!.name, peakEquivalentStress(numbers, at(c), perA, perTop, perBottom, perAv, bound, floor));
  }
}

/** Why bending stress can't be had: a modulus is missing though the member bends (moments of rounding's size count as none). */
function modulusMissing(of: InPlane, turned: boolean, lines: Float64Array, line: number): string | null {
  if (of.Wtop_m3 !== null && of.Wbottom_m3 !== null) return null;
  let moment = 0;
  let force = 0;
  for (let i = lines[line]!, o = line + headNumbers; i > 0; i--, o += segmentNumbers) {
    const h = lines[o + 1]! - lines[o]!;
    for (let k = 0; k <= lines[o + degreeM]!; k++) moment += Math.abs(lines[o + ofM + k]!) * h ** k;
    for (let k = 0; k <= lines[o + degreeN]!; k++) force += Math.abs(lines[o + ofN + k]!) * h ** k;
    for (let k = 0; k <= lines[o + degreeV]!; k++) force += Math.abs(lines[o + ofV + k]!) * h ** k;
  }
  if (moment <= 1e-9 * force * lines[line + 1]!) return null;
  if (turned) return 'needs W minor';
  if (of.Wtop_m3 === null && of.Wbottom_m3 === null) return 'needs W top, W bottom';
  return of.Wtop_m3 === null ? 'needs W top' : 'needs W bottom';
}

function notePlates(section: string, plates: PlateProportions, standard: Material['standard'], findings: Findings): void {
  if (plates.watch.length > 0 && standard !== 'ASTM')
    findings.assumptions.add(
      'Slender plates: EN 1993-1-1 Table 5.2 where the normal stress governs, eased by 5.5.2(9) where it is lower',
    );
  if (!plates.known)
    findings.assumptions.add(
      `Section ${section}: proportions not given, so its plates are taken as not slender (class 3 or better)`,
    );
}
