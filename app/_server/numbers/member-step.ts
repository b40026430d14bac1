import type { NumberStep, NumberTable } from '@/components/numbers/numbers-data';
import type { BehindMember } from '@/lib/analysis/behind/behind-member';
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
  const { data, k, joints } = behind;
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
  const rigid = joints.f1 === 1 && joints.f2 === 1 && joints.shear === 0;
  const terms: Line[] = [
    ...(shears ? [['Φ', '12EI/(GAv L²)', joints.shear] as const] : []),
    ...(rigid
      ? []
      : ([
          ['f₁', 'fixity of the start: 1 rigid, 0 pinned; k/(k + a)', joints.f1],
          ['f₂', 'fixity of the end', joints.f2],
          ['c', 'carry-over, S₁₂/a with rigid ends', joints.carry],
          ['D', '1 − c²(1 − f₁)(1 − f₂)', joints.D],
        ] as const)),
    made('S₁₁', rigid ? '4EI/L' : 'a f₁(1 − c²(1 − f₂))/D, a with rigid ends', k.S11, 1, 1),
    made('S₁₂', rigid ? '2EI/L' : 'c a f₁ f₂/D', k.S12, 1, 1),
    made('S₂₂', rigid ? '4EI/L' : 'a f₂(1 − c²(1 − f₁))/D', k.S22, 1, 1),
    made('k_a', 'EA/L', k.ka, 1, -1),
    made('k_vv', '(S₁₁ + 2S₁₂ + S₂₂)/L²', k.kvv, 1, -1),
    made('k_v1', '(S₁₁ + S₁₂)/L', k.kv1, 1, 0),
    made('k_v2', '(S₁₂ + S₂₂)/L', k.kv2, 1, 0),
  ];
  return {
    title: 'The member',
    words: [],
    tables: [
      table('member-data', 'Geometry, section, material, joints', facts),
      table('member-terms', 'Terms of its stiffness', terms),
    ],
  };
}

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
