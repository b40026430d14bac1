import 'server-only';
import type { NumbersData, NumberStep, NumberTable } from '@/components/numbers/numbers-data';
import { behindFrame } from '@/lib/analysis/behind/behind-frame';
import { behindMember, type BehindMember } from '@/lib/analysis/behind/behind-member';
import type { Frame } from '@/lib/model/frame';
import type { ResultState } from '@/lib/results/result';
import { describeState } from '@/lib/results/describe-state';
import { directionColumns, directionName, directionRows, frameStep } from './frame-step';
import { loadsStep } from './loads-step';
import { memberStep } from './member-step';
import { inUnits, unitText, type NumberUnits } from './number-units';
import { asForce, asMove, forceUnit, moveUnit, sixth, stiffnessTable, turnTable } from './step-matrices';

const q = ['X₁', 'Y₁', 'm₁', 'X₂', 'Y₂', 'm₂'];
const u = ['u₁', 'v₁', 'φ₁', 'u₂', 'v₂', 'φ₂'];

/** The calculation of a member's end forces in one result, step by step, in the units asked for. */
export function numbersData(frame: Frame, state: ResultState, index: number, units: NumberUnits): NumbersData {
  const behind = behindMember(frame, state, index);
  const whole = behindFrame(frame, state);
  const { id, start, end } = frame.members[index]!;
  const ends = [start, end].flatMap((node) => whole.directions.slice(3 * node, 3 * node + 3));
  const d = ends.map((one) => directionName(frame, one));
  const axes = axesWords(frame, behind, [start, end]);
  const place: NumberStep = {
    title: 'Its ends among the unknowns',
    words: [`The six directions of ${id}’s ends, in ${axes}, with their rows of K, loads and movements.`],
    tables: [{ id: 'own-unknowns', title: 'Directions of its ends', corner: 'direction', columns: directionColumns, rows: directionRows(frame, ends, [], units) }], // prettier-ignore
  };
  const stiffness: NumberStep = {
    title: 'Stiffness in local axes',
    words: [
      'X, Y, m: what the nodes do to the member along local x, local y and anticlockwise; u, v, φ: how its ends move. q = k u.',
    ],
    tables: [
      stiffnessTable(
        behind.local,
        { id: 'k', title: 'k, local axes', corner: 'force on, for unit of', rows: q, columns: u },
        units,
      ),
    ],
  };
  const turned: NumberStep = {
    title: `Turned into ${axes}`,
    words: ['u = T d. Tᵀ k T is added to K at the rows named; directions without a row are held and left out.'],
    tables: [
      turnTable(behind.turn, {
        id: 'T',
        title: 'T, turns the axes of the nodes to local axes',
        corner: 'local, of',
        rows: u,
        columns: d,
      }),
      stiffnessTable(
        behind.global,
        {
          id: 'K',
          title: `Tᵀ k T, ${axes}`,
          corner: 'force on, for unit of',
          rows: ends.map((one, i) => `${d[i]}${one.row === null ? '' : ` · row ${one.row}`}`),
          columns: d,
        },
        units,
      ),
    ],
  };
  return {
    member: id,
    result: state.name,
    description: state.kind === 'case' ? null : describeState(frame, state),
    steps: [
      place,
      memberStep(frame, state, index, behind, units),
      stiffness,
      turned,
      loadsStep(frame, state, index, behind, { q, d }, units),
      movesStep(behind, d, units),
      forcesStep(behind, units),
      internalStep(state, index, behind, units),
    ],
    frame: frameStep(frame, whole, [start, end], units),
  };
}

function movesStep({ displacements, localDisplacements }: BehindMember, d: readonly string[], units: NumberUnits): NumberStep {
  const column = (title: string, id: string, labels: readonly string[], values: readonly number[]) => ({
    id,
    title,
    corner: 'direction',
    columns: [{ label: id === 'd' ? 'd' : 'u = T d' }],
    rows: sixth.map((i) => ({ label: labels[i]!, unit: moveUnit(i, units), cells: [asMove(values[i]!, i, units)] })),
  });
  return {
    title: 'How its ends move',
    words: [],
    tables: [column('d, axes of the nodes', 'd', d, displacements), column('u = T d, local axes', 'u', u, localDisplacements)],
  };
}

function forcesStep({ byDisplacements, fixedEnd, endForces, stored }: BehindMember, units: NumberUnits): NumberStep {
  return {
    title: 'Its end forces',
    words: ['q = k T d + q_F, beside the end forces that are stored, checked and printed.'],
    tables: [
      {
        id: 'q',
        title: 'q = k u + q_F, local axes',
        corner: 'what the nodes do to the member',
        columns: [{ label: 'k u' }, { label: 'q_F' }, { label: 'q' }, { label: 'stored' }, { label: 'difference', power: true }],
        rows: sixth.map((i) => ({
          label: q[i]!,
          unit: forceUnit(i, units),
          cells: [byDisplacements[i]!, fixedEnd[i]!, endForces[i]!, stored[i]!, endForces[i]! - stored[i]!].map((value) =>
            asForce(value, i, units),
          ),
        })),
      },
    ],
  };
}

/** The same as N, V and M at both ends. */
function internalStep({ endForces }: ResultState, index: number, { bent, data }: BehindMember, units: NumberUnits): NumberStep {
  const at = (place: number) => endForces[6 * index + place]!;
  const shears = Number.isFinite(data.GAv);
  const square = shears
    ? (['(Y₁ + N ψ₁)/(1 + N/GAv)', '(−Y₂ + N ψ₂)/(1 + N/GAv)'] as const)
    : (['Y₁ + N ψ₁', '−Y₂ + N ψ₂'] as const);
  const V = bent ? square : (['Y₁', '−Y₂'] as const);
  const lines = [
    ['N', 0, '−X₁', 'X₂', 'tension positive'],
    ['V', 0, ...V, 'V = dM/dx'],
    ['M', 1, '−m₁', 'm₂', 'positive where it pulls the local −y face'],
  ] as const;
  const turned: NumberTable = {
    id: 'turns',
    title: 'Rotations ψ of its own ends, within its joints',
    corner: 'rotation',
    columns: [
      { label: 'start', unit: 'rad' },
      { label: 'end', unit: 'rad' },
    ],
    rows: [{ label: 'ψ', cells: bent?.turns ?? [] }],
  };
  return {
    title: 'The same as internal forces',
    words: bent ? ['Second order: V stands square to the deflected axis, Y square to the undeformed one.'] : [],
    tables: [
      ...(bent ? [turned] : []),
      {
        id: 'internal',
        title: 'N, V, M at its ends',
        corner: 'force',
        columns: [
          { label: 'at the start is', words: true },
          { label: 'start' },
          { label: 'at the end is', words: true },
          { label: 'end' },
          { label: 'sign', words: true },
        ],
        rows: lines.map(([label, lengths, first, last, sign], i) => ({
          label,
          unit: unitText(units, 1, lengths),
          cells: [first, inUnits(at(i), units, 1, lengths), last, inUnits(at(3 + i), units, 1, lengths), sign],
        })),
      },
    ],
  };
}

/** "global axes", or which node has axes of its own. */
function axesWords(frame: Frame, { angles }: BehindMember, ends: readonly [number, number]): string {
  const turned = ends.flatMap((node, i) => {
    const angle = angles[i === 0 ? 0 : 1];
    return angle === 0 ? [] : [`${frame.nodes[node]!.id} turned ${((angle * 180) / Math.PI).toFixed(2)}° with its support`];
  });
  return turned.length === 0 ? 'global axes' : `the axes of its nodes (${turned.join(', ')})`;
}
