import type { Frame, LoadCase, Material, Member, Section } from '@/lib/model/frame';

/** A section by its area and second moment alone, for tests. */
export function plainSection(name: string, A_m2: number, I_m4: number, depth_m: number | null = null): Section {
  return {
    name,
    designation: null,
    shape: null,
    made: null,
    dimensions: null,
    properties: {
      A_m2, I_m4, depth_m, Wtop_m3: null, Wbottom_m3: null, width_m: null, AvTyped_m2: null, AvPeak_m2: null,
      AvPeakTurned_m2: null, AvShear_m2: null, AvShearTurned_m2: null, Wpl_m3: null, Iminor_m4: null, Wminor_m3: null,
      WplMinor_m3: null, It_m4: null, Iw_m6: null, t_m: null,
    }, // prettier-ignore
    sources: {},
  };
}

const plainSteel: Material = {
  name: 'steel', grade: null, standard: null, E_Pa: 210e9, G_Pa: null, fy_Pa: null, fu_Pa: null, density_kg_m3: 7850,
  expansion_perK: 12e-6, sources: {},
}; // prettier-ignore

/** A rigid-jointed member of the first section and material, with what differs. */
export function plainMember(id: string, start: number, end: number, other: Partial<Member> = {}): Member {
  return {
    id, start, end, section: 0, material: 0, role: null, startJoint: 'rigid', endJoint: 'rigid', axialOnly: false,
    tensionOnly: false, turned: false, span: null, lengthMajor_m: null, lengthMinor_m: null, lengthLtbTop_m: null,
    lengthLtbBottom_m: null, group: null, ...other,
  }; // prettier-ignore
}

export function plainCase(name: string, selfWeight = 0): LoadCase {
  return { name, kind: 'other', selfWeight, alternative: null, reversible: false, note: null };
}

/** A frame of one section (IPE 300: A 53.81 cm², I 8356 cm⁴) and one steel, for tests: what is not given is empty. */
export function plainFrame(
  parts: Partial<Omit<Frame, 'nodes'>> & { readonly nodes: readonly (readonly [string, number, number])[] },
): Frame {
  return {
    id: 'F1', title: null, group: null, count: 1, note: null, family: null, members: [],
    sections: [plainSection('IPE 300', 53.81e-4, 8356e-8, 0.3)], materials: [plainSteel], supports: [],
    cases: [plainCase('loads')], nodeLoads: [], memberLoads: [], settlements: [], combinations: [], limits: [], notChecked: [],
    ...parts,
    nodes: parts.nodes.map(([id, x_m, y_m]) => ({ id, x_m, y_m, place: null })),
  }; // prettier-ignore
}
