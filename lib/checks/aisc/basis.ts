import type { Section } from '@/lib/model/frame';
import type { CodeMember } from '../design-code/code-member';
import type { Method } from './strength';
import { platesOf, type Plates } from './width-limits';

/** What every clause needs of a member, known and in SI; about the section's own axes, x major and y minor. */
export interface Basis {
  readonly method: Method;
  readonly E: number;
  /** Null = not known: only torsional buckling (E4) needs it. */
  readonly G: number | null;
  readonly Fy: number;
  readonly EperFy: number;
  readonly Ag: number;
  readonly Ix: number;
  readonly Iy: number;
  readonly rx: number;
  readonly ry: number;
  readonly Zx: number;
  readonly Zy: number;
  /** The smaller modulus of either face. */
  readonly Sx: number;
  readonly Sy: number;
  /** Open sections: J and C_w; of closed ones J, and C_w = 0. */
  readonly J: number;
  readonly Cw: number;
  readonly plates: Plates;
  readonly dimensions: NonNullable<Section['dimensions']>;
  readonly turned: boolean;
  /** A rolled I, for φ of its web in shear. */
  readonly rolledI: boolean;
}

/** The basis of a member, or in words why AISC 360-22 can't be applied to it here. */
export function basisOf(member: CodeMember, method: Method): Basis | string {
  const { section, material, turned } = member;
  const { properties: p, dimensions, shape } = section;
  const plates = platesOf(section);
  if (plates === null || dimensions === null)
    return 'shape not covered (I, channels and hollow sections with their dimensions are)';
  if (material.fy_Pa === null) return 'needs the yield strength of the material';
  const open = shape === 'I' || shape === 'channel';
  const missing: string[] = [];
  const needed = (value: number | null, name: string): number => {
    if (value === null) missing.push(name);
    return value ?? NaN;
  };
  const Iy = needed(p.Iminor_m4, 'I minor');
  const Zx = needed(p.Wpl_m3, 'Z major');
  const Zy = needed(p.WplMinor_m3, 'Z minor');
  const Sx = Math.min(needed(p.Wtop_m3, 'S top'), needed(p.Wbottom_m3, 'S bottom'));
  const Sy = needed(p.Wminor_m3, 'S minor');
  const J = needed(p.It_m4, 'J');
  const Cw = open ? needed(p.Iw_m6, 'C_w') : 0;
  if (missing.length > 0) {
    const tapered = open && (p.It_m4 === null || p.Iw_m6 === null) && section.designation !== null;
    return `needs ${missing.join(', ')}${tapered ? ', not available for tapered flanges' : ''}`;
  }
  const [E, Fy, Ag] = [material.E_Pa, material.fy_Pa, p.A_m2];
  return {
    method,
    E,
    G: material.G_Pa,
    Fy,
    EperFy: E / Fy,
    Ag,
    Ix: p.I_m4,
    Iy,
    rx: Math.sqrt(p.I_m4 / Ag),
    ry: Math.sqrt(Iy / Ag),
    Zx,
    Zy,
    Sx,
    Sy,
    J,
    Cw,
    plates,
    dimensions,
    turned,
    rolledI: shape === 'I' && section.made === 'rolled',
  };
}
