import fc from 'fast-check';
import type { Frame, Joint, Member, MemberLoad, NodeLoad, Restraint, Settlement, Support } from '@/lib/model/frame';
import { plainCase, plainFrame, plainMember, plainSection } from './plain-frame';

const number = (min: number, max: number): fc.Arbitrary<number> =>
  fc.integer({ min: 0, max: 1000 }).map((k) => min + ((max - min) * k) / 1000);

const joint: fc.Arbitrary<Joint> = fc.oneof(
  { weight: 3, arbitrary: fc.constant<Joint>('rigid') },
  fc.constant<Joint>('pin'),
  number(1e5, 5e7),
);
const held: fc.Arbitrary<Restraint> = fc.oneof(fc.constant<Restraint>('fixed'), fc.constant<Restraint>('free'), number(1e5, 1e8));

interface Shape {
  readonly bays: number;
  readonly storeys: number;
}

/** A frame of one to three bays and one or two storeys, leaning and skew, with joints, supports and loads of every sort. */
export const randomFrame: fc.Arbitrary<Frame> = fc
  .record({ bays: fc.integer({ min: 1, max: 3 }), storeys: fc.integer({ min: 1, max: 2 }) })
  .chain((shape) => {
    const nodes = (shape.bays + 1) * (shape.storeys + 1);
    const members = shape.storeys * (2 * shape.bays + 1);
    return fc
      .record({
        wobble: fc.array(fc.tuple(number(-0.6, 0.6), number(-0.6, 0.6)), { minLength: nodes, maxLength: nodes }),
        joints: fc.array(fc.tuple(joint, joint, fc.boolean()), { minLength: members, maxLength: members }),
        bases: fc.array(fc.tuple(held, held, held, number(-1, 1)), { minLength: shape.bays, maxLength: shape.bays }),
        nodeLoads: fc.array(fc.tuple(fc.nat(), number(-5e4, 5e4), number(-5e4, 5e4), number(-3e4, 3e4)), { maxLength: 3 }),
        memberLoads: fc.array(
          fc.tuple(fc.nat(), fc.nat({ max: 8 }), number(-2e4, 2e4), number(-2e4, 2e4), number(0, 1), number(0, 1)),
          {
            minLength: 1,
            maxLength: 5,
          },
        ),
        settlement: fc.option(fc.tuple(number(-0.02, 0.02), number(-0.02, 0.02), number(-0.01, 0.01))),
      })
      .map((parts) => build(shape, parts));
  });

interface Parts {
  readonly wobble: readonly (readonly [number, number])[];
  readonly joints: readonly (readonly [Joint, Joint, boolean])[];
  readonly bases: readonly (readonly [Restraint, Restraint, Restraint, number])[];
  readonly nodeLoads: readonly (readonly [number, number, number, number])[];
  readonly memberLoads: readonly (readonly [number, number, number, number, number, number])[];
  readonly settlement: readonly [number, number, number] | null;
}

function build({ bays, storeys }: Shape, parts: Parts): Frame {
  const across = bays + 1;
  const at = (storey: number, line: number): number => storey * across + line;
  const nodes: [string, number, number][] = parts.wobble.map(([dx, dy], i) => [
    `N${i}`,
    (i % across) * 6 + dx,
    Math.floor(i / across) * 4 + dy,
  ]);
  const members: Member[] = [];
  for (let storey = 0; storey < storeys; storey++) {
    // columns are rigid throughout, so that every frame stands
    for (let line = 0; line < across; line++)
      members.push(plainMember(`C${storey}${line}`, at(storey, line), at(storey + 1, line), { section: 1 }));
    for (let bay = 0; bay < bays; bay++) {
      const [startJoint, endJoint, flip] = parts.joints[members.length]!;
      const ends = [at(storey + 1, bay), at(storey + 1, bay + 1)] as const;
      members.push(plainMember(`B${storey}${bay}`, ends[flip ? 1 : 0], ends[flip ? 0 : 1], { startJoint, endJoint }));
    }
  }
  const supports: Support[] = [{ node: 0, ux: 'fixed', uy: 'fixed', rz: 'fixed', angle_rad: 0.3 }];
  parts.bases.forEach(([ux, uy, rz, angle_rad], i) => supports.push({ node: i + 1, ux, uy, rz, angle_rad }));
  const nodeLoads = parts.nodeLoads.map(([node, Fx_N, Fy_N, Mz_Nm], i): NodeLoad => ({
    case: i % 2,
    node: node % nodes.length,
    Fx_N,
    Fy_N,
    Mz_Nm,
  }));
  const memberLoads = parts.memberLoads.map((load, i) => memberLoad(nodes, members, load, i % 2));
  const settlements: Settlement[] = parts.settlement
    ? [{ case: 1, node: 0, dx_m: parts.settlement[0], dy_m: parts.settlement[1], rz_rad: parts.settlement[2] }]
    : [];
  return plainFrame({
    nodes,
    members,
    sections: [plainSection('beam', 53.81e-4, 8356e-8, 0.3), plainSection('column', 91e-4, 8091e-8, 0.2)],
    supports,
    cases: [plainCase('dead', 1), plainCase('other')],
    nodeLoads,
    memberLoads,
    settlements,
    combinations: [{ name: 'C1', purpose: 'strength', terms: [{ case: 0, factor: 1.35 }, { case: 1, factor: -0.7 }] }], // prettier-ignore
  });
}

function memberLoad(
  nodes: readonly (readonly [string, number, number])[],
  members: readonly Member[],
  [which, kind, a, b, s, t]: readonly [number, number, number, number, number, number],
  loadCase: number,
): MemberLoad {
  const member = which % members.length;
  const from = nodes[members[member]!.start]!;
  const to = nodes[members[member]!.end]!;
  const L = Math.hypot(to[1] - from[1], to[2] - from[2]);
  const on = { case: loadCase, member };
  const [lo, hi] = s < t ? [s, t] : [t, s];
  const direction = a > 0 ? 'y' : 'x';
  if (kind < 3)
    return {
      ...on, kind: 'distributed', axes: (['global', 'local', 'projected'] as const)[kind]!, direction, q1_N_m: a, q2_N_m: b,
      from_m: lo * L, to_m: hi * L,
    }; // prettier-ignore
  if (kind < 6) return { ...on, kind: 'point', axes: kind === 3 ? 'global' : 'local', direction, P_N: 2 * a, at_m: s * L };
  if (kind === 6) return { ...on, kind: 'moment', M_Nm: a, at_m: s * L };
  return { ...on, kind: 'temperature', dT_K: a / 1000, dTAcross_K: kind === 7 ? 0 : b / 1000 };
}
