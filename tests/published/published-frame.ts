import type { Frame, Material, Member, Restraint, Section, Support, MemberLoad, NodeLoad, Settlement } from '@/lib/model/frame';

/** One case as kept in the JSON files beside this one: inputs and results in the source's own units. */
export interface PublishedCase {
  readonly id: string;
  readonly title: string;
  readonly source: string;
  readonly fromMemory: boolean;
  readonly units: { readonly length: string; readonly force: string };
  readonly nodes: Readonly<Record<string, readonly number[]>>;
  readonly members: Readonly<Record<string, PublishedMember>>;
  readonly supports: Readonly<Record<string, PublishedSupport>>;
  readonly loads: readonly PublishedLoad[];
  readonly expected: readonly Expected[];
  /** Printed formulas that ask nothing of a solution. */
  readonly formulas?: readonly PrintedFormula[];
}
export interface PrintedFormula {
  readonly what: string;
  readonly formula: string;
  readonly value: number;
  readonly relative: number;
}
interface PublishedMember {
  readonly ends: readonly string[];
  readonly E: number;
  readonly A: number;
  readonly I: number;
  readonly joints?: readonly string[];
  readonly axialOnly?: boolean;
  /** Shear modulus and area, where shear deformation is asked for. */
  readonly G?: number;
  readonly Av?: number;
}
interface PublishedSupport {
  readonly ux?: string | number;
  readonly uy?: string | number;
  readonly rz?: string | number;
  readonly angle_deg?: number;
  readonly moves?: { readonly dx?: number; readonly dy?: number; readonly rz?: number };
}
interface PublishedLoad {
  readonly node?: string;
  readonly Fx?: number;
  readonly Fy?: number;
  readonly Mz?: number;
  readonly member?: string;
  readonly axes?: string;
  readonly direction?: string;
  readonly q?: readonly number[];
  readonly between?: readonly number[];
  readonly P?: number;
  readonly M?: number;
  readonly at?: number;
  readonly expansion?: number;
  readonly dT?: number;
  readonly dTAcross?: number;
  readonly depth?: number;
}
export interface Expected {
  readonly what: string;
  readonly value: number;
  readonly unit: string;
  readonly relative?: number;
  readonly absolute?: number;
  readonly ask: Ask;
}
export interface Ask {
  readonly of: string;
  readonly node?: string;
  readonly along?: string;
  readonly supportAxes?: boolean;
  readonly member?: string;
  readonly x?: number;
  readonly end?: string;
  readonly quantity?: string;
  readonly sign?: number;
  /** With shear deformation. */
  readonly shear?: boolean;
}

const metres: Readonly<Record<string, number>> = { m: 1, mm: 1e-3, in: 0.0254, ft: 0.3048 };
const newtons: Readonly<Record<string, number>> = { kN: 1e3, N: 1, lbf: 4.4482216152605, kip: 4448.2216152605 };

/** SI value of one of the source's units of length and force. */
export function unitsOf(published: PublishedCase): { length: number; force: number } {
  const length = metres[published.units.length];
  const force = newtons[published.units.force];
  if (!length || !force) throw new RangeError(`Expected units of ${published.id} to be known`);
  return { length, force };
}

/** The case as a frame in SI with one load case `loads` and one strength combination `all` of it. */
export function publishedFrame(published: PublishedCase): Frame {
  const { length, force } = unitsOf(published);
  const nodeNames = Object.keys(published.nodes);
  const memberNames = Object.keys(published.members);
  const nodes = nodeNames.map((id) => {
    const [x, y] = published.nodes[id]!;
    return { id, x_m: x! * length, y_m: y! * length, place: null };
  });
  const thermal = published.loads.filter((load) => load.dT !== undefined);
  const sections: Section[] = [];
  const materials: Material[] = [];
  const members = memberNames.map((id, i): Member => {
    const m = published.members[id]!;
    const heat = thermal.find((load) => load.member === id);
    sections.push(
      section(
        id,
        m.A * length ** 2,
        m.I * length ** 4,
        heat?.depth === undefined ? null : heat.depth * length,
        m.Av === undefined ? null : m.Av * length ** 2,
      ),
    );
    materials.push(
      material(id, (m.E * force) / length ** 2, heat?.expansion ?? null, m.G === undefined ? null : (m.G * force) / length ** 2),
    );
    return {
      id,
      start: nodeNames.indexOf(m.ends[0]!),
      end: nodeNames.indexOf(m.ends[1]!),
      section: i,
      material: i,
      role: null,
      startJoint: m.axialOnly || m.joints?.[0] === 'pin' ? 'pin' : 'rigid',
      endJoint: m.axialOnly || m.joints?.[1] === 'pin' ? 'pin' : 'rigid',
      axialOnly: m.axialOnly ?? false,
      tensionOnly: false,
      turned: false,
      span: null,
      lengthMajor_m: null,
      lengthMinor_m: null,
      lengthLtbTop_m: null,
      lengthLtbBottom_m: null,
      group: null,
    };
  });
  const supports = Object.entries(published.supports).map(([node, s]): Support => ({
    node: nodeNames.indexOf(node),
    ux: restraint(s.ux, force / length),
    uy: restraint(s.uy, force / length),
    rz: restraint(s.rz, force * length),
    angle_rad: ((s.angle_deg ?? 0) * Math.PI) / 180,
  }));
  const settlements = Object.entries(published.supports).flatMap(([node, s]): Settlement[] =>
    s.moves
      ? [
          {
            case: 0,
            node: nodeNames.indexOf(node),
            dx_m: s.moves.dx === undefined ? null : s.moves.dx * length,
            dy_m: s.moves.dy === undefined ? null : s.moves.dy * length,
            rz_rad: s.moves.rz ?? null,
          },
        ]
      : [],
  );
  const nodeLoads = published.loads
    .filter((load) => load.node !== undefined)
    .map((load): NodeLoad => ({
      case: 0,
      node: nodeNames.indexOf(load.node!),
      Fx_N: (load.Fx ?? 0) * force,
      Fy_N: (load.Fy ?? 0) * force,
      Mz_Nm: (load.Mz ?? 0) * force * length,
    }));
  const memberLoads = published.loads
    .filter((load) => load.member !== undefined)
    .map((load) => memberLoad(load, memberNames.indexOf(load.member!), members, nodes, length, force));
  return {
    id: published.id,
    title: published.title,
    group: null,
    count: 1,
    note: null,
    family: null,
    nodes,
    members,
    sections,
    materials,
    supports,
    cases: [{ name: 'loads', kind: 'other', selfWeight: 0, alternative: null, reversible: false, note: null }],
    nodeLoads,
    memberLoads,
    settlements,
    combinations: [{ name: 'all', purpose: 'strength', terms: [{ case: 0, factor: 1 }] }],
    limits: [],
    notChecked: [],
  };
}

function restraint(word: string | number | undefined, unit: number): Restraint {
  return word === 'fixed' ? 'fixed' : typeof word === 'number' ? word * unit : 'free';
}

function memberLoad(
  load: PublishedLoad,
  member: number,
  members: readonly Member[],
  nodes: readonly { x_m: number; y_m: number }[],
  length: number,
  force: number,
): MemberLoad {
  const on = { case: 0, member };
  const a = nodes[members[member]!.start]!;
  const b = nodes[members[member]!.end]!;
  const L = Math.hypot(b.x_m - a.x_m, b.y_m - a.y_m);
  const direction = load.direction === 'x' ? 'x' : 'y';
  const axes = load.axes === 'local' || load.axes === 'projected' ? load.axes : 'global';
  if (load.q)
    return {
      ...on,
      kind: 'distributed',
      axes,
      direction,
      q1_N_m: (load.q[0]! * force) / length,
      q2_N_m: (load.q[1]! * force) / length,
      from_m: load.between ? load.between[0]! * length : 0,
      to_m: load.between ? load.between[1]! * length : L,
    };
  if (load.P !== undefined)
    return {
      ...on,
      kind: 'point',
      axes: axes === 'local' ? 'local' : 'global',
      direction,
      P_N: load.P * force,
      at_m: load.at! * length,
    };
  if (load.M !== undefined) return { ...on, kind: 'moment', M_Nm: load.M * force * length, at_m: load.at! * length };
  return { ...on, kind: 'temperature', dT_K: load.dT!, dTAcross_K: load.dTAcross ?? 0 };
}

function section(name: string, A_m2: number, I_m4: number, depth_m: number | null, AvTyped_m2: number | null): Section {
  return {
    name,
    designation: null,
    shape: null,
    made: null,
    dimensions: null,
    properties: {
      A_m2, I_m4, depth_m, Wtop_m3: null, Wbottom_m3: null, width_m: null, AvTyped_m2, AvPeak_m2: null,
      AvPeakTurned_m2: null, AvShear_m2: null, AvShearTurned_m2: null, Wpl_m3: null, Iminor_m4: null, Wminor_m3: null,
      WplMinor_m3: null, It_m4: null, Iw_m6: null, t_m: null,
    }, // prettier-ignore
    sources: {},
  };
}

function material(name: string, E_Pa: number, expansion_perK: number | null, G_Pa: number | null): Material {
  return {
    name, grade: null, standard: null, E_Pa, G_Pa, fy_Pa: null, fu_Pa: null, density_kg_m3: null, expansion_perK,
    sources: {},
  }; // prettier-ignore
}
