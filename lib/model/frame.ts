/**
 * The one vocabulary that everything shares: a plane frame in SI base units (m, N, N·m, Pa, rad, kg, K).
 *
 * Axes and signs (kept by every folder that computes):
 * - Global X right, Y up, rotations and moments anticlockwise.
 * - A member's local x runs from its start to its end, local y stands 90° anticlockwise from it;
 *   "top" is the local +y face, "bottom" the local −y face.
 * - N tension positive; M positive when it puts the local −y face in tension; V = dM/dx.
 *   With q along local +x, +y: dN/dx = −q_x, dV/dx = q_y. At a point force V⁺ = V⁻ + P_y,
 *   N⁺ = N⁻ − P_x; at an anticlockwise moment M⁺ = M⁻ − M₀.
 * - Reactions are what a support does to the frame, in global axes.
 *
 * Nodes, members, sections, materials and cases refer to one another by index within the frame;
 * names are kept as typed where first defined. Loads stay as typed (axes, direction, positions);
 * only an area load has been multiplied by its width.
 */
export interface Frame {
  readonly id: string;
  readonly title: string | null;
  readonly group: string | null;
  /** Number off, for mass totals. */
  readonly count: number;
  readonly note: string | null;
  /** The family a variant came from, with its parameters in SI (numbers) or as chosen (text). */
  readonly family: FamilyOrigin | null;
  readonly nodes: readonly FrameNode[];
  readonly members: readonly Member[];
  readonly sections: readonly Section[];
  readonly materials: readonly Material[];
  readonly supports: readonly Support[];
  /** The load cases that apply to this frame, in sheet order. */
  readonly cases: readonly LoadCase[];
  readonly nodeLoads: readonly NodeLoad[];
  readonly memberLoads: readonly MemberLoad[];
  readonly settlements: readonly Settlement[];
  readonly combinations: readonly Combination[];
  readonly limits: readonly Limit[];
  /** Reasons known from the sheets why this frame's verdict is at best "not checked". */
  readonly notChecked: readonly string[];
}

export interface FamilyOrigin {
  readonly name: string;
  readonly parameters: Readonly<Record<string, FamilyParameter>>;
}

export interface FamilyParameter {
  readonly value: number | string;
  /** Quantity of the families sheet (length, angle, line load …), for units on screen. */
  readonly quantity: string;
}

export interface FrameNode {
  readonly id: string;
  readonly x_m: number;
  readonly y_m: number;
  /** base, eaves, apex, tip … : a name that limits may use across frames. */
  readonly place: string | null;
}

export const roles = ['beam', 'column', 'rafter', 'arm', 'cantilever', 'strut', 'tie', 'brace', 'other'] as const;
export type Role = (typeof roles)[number];

/** How a member's end is joined: rigidly, by a pin, or by a rotational spring in N·m/rad. */
export type Joint = 'rigid' | 'pin' | number;

export interface Member {
  readonly id: string;
  readonly start: number;
  readonly end: number;
  readonly section: number;
  readonly material: number;
  readonly role: Role | null;
  /** Already 'pin' at both ends where the member is axial only. */
  readonly startJoint: Joint;
  readonly endJoint: Joint;
  readonly axialOnly: boolean;
  readonly tensionOnly: boolean;
  /** Section turned 90° about its own axis: in-plane bending is about its minor axis. */
  readonly turned: boolean;
  /** Members with the same word form one physical member; null = the member alone. */
  readonly span: string | null;
  /** Effective lengths for buckling about the section's major and minor axis; null = length of the span. */
  readonly lengthMajor_m: number | null;
  readonly lengthMinor_m: number | null;
  /** Between restraints of the top (local +y) and bottom face when in compression; null = length of the span. */
  readonly lengthLtbTop_m: number | null;
  readonly lengthLtbBottom_m: number | null;
  readonly group: string | null;
}

export type Shape = 'I' | 'channel' | 'rhs' | 'chs' | 'bar' | 'round';

/** Where a property's value came from. */
export type PropertySource = 'typed' | 'derived' | 'library';

/** Dimensions in m; a field that its shape does not use is null. */
export interface ShapeDimensions {
  readonly h: number | null;
  readonly b: number | null;
  readonly tw: number | null;
  readonly tf: number | null;
  /** Root radius (I, channel) or outer corner radius (rhs). */
  readonly r: number | null;
  readonly t: number | null;
  readonly d: number | null;
}

/** Properties about the section's own axes (major, minor), SI. Null = not known: a check that needs it is "not checked". */
export interface SectionProperties {
  readonly A_m2: number;
  readonly I_m4: number;
  /** Elastic moduli of the top and bottom face for bending about the major axis. */
  readonly Wtop_m3: number | null;
  readonly Wbottom_m3: number | null;
  readonly depth_m: number | null;
  readonly width_m: number | null;
  /** Shear area as typed; used as given both for stress and for shear deformation. */
  readonly AvTyped_m2: number | null;
  /** Shear area of the elastic peak, I·b/S, shear along the depth; and across it (section turned). */
  readonly AvPeak_m2: number | null;
  readonly AvPeakTurned_m2: number | null;
  /** Shear area for shear deformation, along the depth and across it. */
  readonly AvShear_m2: number | null;
  readonly AvShearTurned_m2: number | null;
  readonly Wpl_m3: number | null;
  readonly Iminor_m4: number | null;
  /** Smaller elastic modulus about the minor axis. */
  readonly Wminor_m3: number | null;
  readonly WplMinor_m3: number | null;
  readonly It_m4: number | null;
  readonly Iw_m6: number | null;
  /** Governing thickness, for yield by thickness. */
  readonly t_m: number | null;
}

export interface Section {
  readonly name: string;
  /** Library designation as the standard writes it, if it is one. */
  readonly designation: string | null;
  readonly shape: Shape | null;
  /** For hollow sections: how made; for I: rolled or welded; null = not known. */
  readonly made: 'rolled' | 'welded' | 'hot finished' | 'cold formed' | null;
  readonly dimensions: ShapeDimensions | null;
  readonly properties: SectionProperties;
  readonly sources: Readonly<Partial<Record<keyof SectionProperties, PropertySource>>>;
}

/** A material as resolved for one section (yield by its thickest part). */
export interface Material {
  readonly name: string;
  readonly grade: string | null;
  readonly standard: 'EN' | 'ASTM' | null;
  readonly E_Pa: number;
  readonly G_Pa: number | null;
  readonly fy_Pa: number | null;
  readonly fu_Pa: number | null;
  readonly density_kg_m3: number | null;
  readonly expansion_perK: number | null;
  readonly sources: Readonly<
    Partial<Record<'E_Pa' | 'G_Pa' | 'fy_Pa' | 'fu_Pa' | 'density_kg_m3' | 'expansion_perK', PropertySource>>
  >;
}

/** A support direction: held, free, or a spring (N/m, N·m/rad). */
export type Restraint = 'fixed' | 'free' | number;

export interface Support {
  readonly node: number;
  readonly ux: Restraint;
  readonly uy: Restraint;
  readonly rz: Restraint;
  /** Turns ux, uy, their springs and settlements anticlockwise from global X. */
  readonly angle_rad: number;
}

export const caseKinds = ['dead', 'live', 'roof live', 'snow', 'wind', 'seismic', 'crane', 'temperature', 'other'] as const;
export type CaseKind = (typeof caseKinds)[number];

export interface LoadCase {
  readonly name: string;
  readonly kind: CaseKind;
  /** Factor on density × A × g in global −Y; 0 = none. */
  readonly selfWeight: number;
  readonly alternative: string | null;
  readonly reversible: boolean;
  readonly note: string | null;
}

export interface NodeLoad {
  readonly case: number;
  readonly node: number;
  readonly Fx_N: number;
  readonly Fy_N: number;
  readonly Mz_Nm: number;
}

export type LoadAxes = 'global' | 'local' | 'projected';
export type LoadDirection = 'x' | 'y';

/** A load on a member; positions are distances along it from its start. */
export type MemberLoad = DistributedLoad | PointLoad | MomentLoad | TemperatureLoad;

interface OnMember {
  readonly case: number;
  readonly member: number;
}
/** Linear from q1 at `from` to q2 at `to`; projected: per metre of the member's projection square to the direction. */
export interface DistributedLoad extends OnMember {
  readonly kind: 'distributed';
  readonly axes: LoadAxes;
  readonly direction: LoadDirection;
  readonly q1_N_m: number;
  readonly q2_N_m: number;
  readonly from_m: number;
  readonly to_m: number;
}
export interface PointLoad extends OnMember {
  readonly kind: 'point';
  readonly axes: 'global' | 'local';
  readonly direction: LoadDirection;
  readonly P_N: number;
  readonly at_m: number;
}
/** Anticlockwise positive. */
export interface MomentLoad extends OnMember {
  readonly kind: 'moment';
  readonly M_Nm: number;
  readonly at_m: number;
}
export interface TemperatureLoad extends OnMember {
  readonly kind: 'temperature';
  /** At the centroid. */
  readonly dT_K: number;
  /** Temperature at the top (+y) face minus that at the bottom face: free curvature v″ = −α dT/depth. */
  readonly dTAcross_K: number;
}

/** Prescribed movement along the support's own axes; null = not prescribed. */
export interface Settlement {
  readonly case: number;
  readonly node: number;
  readonly dx_m: number | null;
  readonly dy_m: number | null;
  readonly rz_rad: number | null;
}

export type Purpose = 'strength' | 'service';

export interface Combination {
  readonly name: string;
  readonly purpose: Purpose;
  readonly terms: readonly { readonly case: number; readonly factor: number }[];
}

export type Measure = 'deflection' | 'sway' | 'displacement' | 'spread';

/**
 * A limit on movement as it applies to this frame. `target` says what the sheet's "applies to" word
 * is in this frame, found in the order member, span, node, place, group, role, all.
 */
export interface Limit {
  readonly target: 'member' | 'span' | 'node' | 'place' | 'group' | 'role' | 'all';
  readonly name: string;
  readonly measure: Measure;
  readonly direction: 'x' | 'y' | 'resultant' | null;
  /** The other node of a spread. */
  readonly toNode: string | null;
  /** n of L/n. */
  readonly ratio: number | null;
  readonly absolute_m: number | null;
  /** Null = every service combination. */
  readonly combination: string | null;
  /** True where the sheet named this frame rather than leaving the column blank or `*`. */
  readonly namedFrame: boolean;
  /** Where the limit was given: "Limits row 5", "Setup B7", "office". */
  readonly source: string;
}
