import type { NumberStep, NumberTable } from '@/components/numbers/numbers-data';
import type { BehindMember } from '@/lib/analysis/behind/behind-member';
import type { BentMember } from '@/lib/analysis/behind/bent-member';
import type { JointStiffness } from '@/lib/analysis/joint-stiffness';
import type { MemberData } from '@/lib/analysis/member-data';
import type { Frame } from '@/lib/model/frame';
import type { ResultState } from '@/lib/results/result';
import { inPlane } from '@/lib/sections/in-plane';
import { fromSI, unitLabel } from '@/lib/units/batch-unit';
import type { Quantity } from '@/lib/units/quantity';
import { inUnits, unitText, type NumberUnits } from './number-units';

type Line = readonly [symbol: string, what: string, value: number | string | null, unit?: string];

/** What the member is: geometry, section, material, joints. */
export function memberStep(
  frame: Frame,
  state: ResultState,
  index: number,
  behind: BehindMember,
  units: NumberUnits,
): NumberStep {
  const member = frame.members[index]!;
  const { data, k, joints, bent } = behind;
  const section = frame.sections[member.section]!;
  const material = frame.materials[member.material]!;
  const plane = inPlane(section, member.turned);
  const given = (symbol: string, what: string, si: number | null, quantity: Quantity, siUnit: string): Line =>
    units.name === 'si' || si === null ? [symbol, what, si, siUnit] : [symbol, what, fromSI(si, quantity, units.name), unitLabel(quantity, units.name)]; // prettier-ignore
  const made = (symbol: string, what: string, si: number, forces: 0 | 1, lengths: number): Line =>
    [symbol, what, inUnits(si, units, forces, lengths), unitText(units, forces, lengths)]; // prettier-ignore
  const [EA, EI] = [state.method?.stiffness?.[2 * index], state.method?.stiffness?.[2 * index + 1]];
  const at = (node: number) => {
    const { id, x_m, y_m } = frame.nodes[node]!;
    const [x, y] = [x_m, y_m].map((si) => Number(inUnits(si, units, 0, 1).toPrecision(8)));
    return `${id} at x ${x}, y ${y} ${units.length}`;
  };
  const shears = Number.isFinite(data.GAv);
  const facts: Line[] = [
    ['start', 'local x runs from here', at(member.start)],
    ['end', 'to here; local y stands 90° anticlockwise from it', at(member.end)],
    ['section', member.turned ? 'turned: bent about its minor axis' : 'bent about its major axis', section.name],
    ['material', '', material.name],
    made('L', 'length', data.length, 0, 1),
    ['cos', 'Δx/L', data.cos],
    ['sin', 'Δy/L', data.sin],
    given('A', 'area', plane.A_m2, 'area', 'm²'),
    given('I', 'second moment of area in the plane', plane.I_m4, 'secondMoment', 'm⁴'),
    given('E', 'Young’s modulus', material.E_Pa, 'stress', 'Pa'),
    ...(EA === undefined ? [] : [['', 'factor on EA (stiffness reduction)', EA] as const]),
    ...(EI === undefined ? [] : [['', 'factor on EI (stiffness reduction)', EI] as const]),
    made('EA', EA === undefined ? 'axial stiffness' : 'axial stiffness, factor put in', data.EA, 1, 0),
    made('EI', EI === undefined ? 'bending stiffness' : 'bending stiffness, factor put in', data.EI, 1, 2),
    shears ? made('GAv', 'shear stiffness', data.GAv, 1, 0) : ['GAv', 'shear stiffness', 'taken as stiff: it does not shear'],
    ['start joint', '', jointWords(data.startSpring, units)],
    ['end joint', '', jointWords(data.endSpring, units)],
  ];
  const terms: Line[] = bent ? bentTerms(bent, data, made) : plainTerms(joints, shears);
  terms.push(
    made('k_a', 'EA/L', k.ka, 1, -1),
    made('k_vv', bent ? 'across, under N' : '(S₁₁ + 2S₁₂ + S₂₂)/L²', k.kvv, 1, -1),
    made('k_v1', bent ? 'across, for a turn of the start, under N' : '(S₁₁ + S₁₂)/L', k.kv1, 1, 0),
    made('k_v2', bent ? 'across, for a turn of the end, under N' : '(S₁₂ + S₂₂)/L', k.kv2, 1, 0),
    made('S₁₁', bent ? 'with its joints, under N' : rotational(joints, '4EI/L', 'a f₁(1 − c²(1 − f₂))/D'), k.S11, 1, 1),
    made('S₁₂', bent ? 'with its joints, under N' : rotational(joints, '2EI/L', 'c a f₁ f₂/D'), k.S12, 1, 1),
    made('S₂₂', bent ? 'with its joints, under N' : rotational(joints, '4EI/L', 'a f₂(1 − c²(1 − f₁))/D'), k.S22, 1, 1),
  );
  return {
    title: 'The member',
    words: [],
    tables: [
      table('member-data', 'Geometry, section, material, joints', facts),
      table('member-terms', 'Terms of its stiffness', terms),
    ],
  };
}

type Made = (symbol: string, what: string, si: number, forces: 0 | 1, lengths: number) => Line;

/** Stability-function terms of a member under its axial force (README §5). */
function bentTerms(bent: BentMember, data: MemberData, made: Made): Line[] {
  const { N, phi, s, sc, pieces, loadScale } = bent;
  const scaled = loadScale === 1 ? '' : `, ${loadScale} times the result’s`;
  const [first, last] = N;
  const forces: Line[] =
    Math.abs(first - last) <= 1e-9 * Math.max(Math.abs(first), Math.abs(last))
      ? [made('N', `axial force it is bent under, tension positive${scaled}`, first, 1, 0)]
      : [
          made('N₁', `axial force at the start, tension positive${scaled}; it varies to`, first, 1, 0),
          made('N₂', 'at the end', last, 1, 0),
        ];
  return [
    ...forces,
    ['φ', 'L √(|N|/EI), the larger N', phi],
    ['s', 'S₁₁L/EI with rigid ends: 4 without axial force', s],
    ['s c', 'S₁₂L/EI with rigid ends: 2 without axial force', sc],
    ['pieces', pieces === 1 ? 'exact in one' : 'exact pieces, put together by elimination', pieces],
    ...(Number.isFinite(data.GAv)
      ? [['1 + N/GAv', 'share by which shear changes what N does', 1 + first / data.GAv] as const]
      : []),
  ];
}

function plainTerms(joints: JointStiffness, shears: boolean): Line[] {
  return [
    ...(shears ? [['Φ', '12EI/(GAv L²)', joints.shear] as const] : []),
    ...(isRigid(joints)
      ? []
      : ([
          ['f₁', 'fixity of the start: 1 rigid, 0 pinned; k/(k + a)', joints.f1],
          ['f₂', 'fixity of the end', joints.f2],
          ['c', 'carry-over S₁₂/S₁₁ with rigid ends', joints.carry],
          ['D', '1 − c²(1 − f₁)(1 − f₂)', joints.D],
        ] as const)),
  ];
}

const isRigid = ({ f1, f2, shear }: JointStiffness): boolean => f1 === 1 && f2 === 1 && shear === 0;
const rotational = (joints: JointStiffness, rigid: string, jointed: string): string =>
  isRigid(joints) ? rigid : `${jointed}, a = (4 + Φ)/(1 + Φ) EI/L`;

const table = (id: string, title: string, lines: readonly Line[]): NumberTable => ({
  id,
  title,
  corner: 'symbol',
  columns: [{ label: 'what', words: true }, { label: 'value' }, { label: 'unit', words: true }],
  rows: lines.map(([label, what, value, unit]) => ({ label, cells: [what, value, unit ?? ''] })),
  mixed: true,
});

function jointWords(spring: number, units: NumberUnits): string {
  if (spring === Infinity) return 'rigid';
  if (spring === 0) return 'pinned';
  return `spring, ${Number(inUnits(spring, units, 1, 1).toPrecision(6))} ${unitText(units, 1, 1)}/rad`;
}
