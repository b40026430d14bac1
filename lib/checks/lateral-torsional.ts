import type { Material, Section } from '@/lib/model/frame';

/** What the elastic critical moment of a section rests on. */
export type LateralTorsional =
  | { readonly kind: 'none'; readonly why: string }
  | {
      readonly kind: 'formula';
      readonly Iz: number;
      readonly It: number;
      readonly Iw: number;
      readonly G: number;
      readonly note: string | null;
    }
  | { readonly kind: 'needs'; readonly needs: readonly string[] };

/**
 * Whether and how a section bent in the plane of the frame can buckle laterally: not where it is closed, or doubly symmetric
 * and bent about its weaker axis; by formula where it is a doubly symmetric I (or properties typed with equal W);
 * otherwise it is not computed here.
 */
export function lateralTorsional(section: Section, turned: boolean, material: Material): LateralTorsional {
  const p = section.properties;
  const { shape } = section;
  if (shape === 'rhs' || shape === 'chs') return { kind: 'none', why: 'closed section' };
  if (shape === 'round') return { kind: 'none', why: 'same stiffness about every axis' };
  if (shape === 'I' && turned)
    // flanges wide enough make the minor axis the stiffer one
    return (p.Iminor_m4 ?? Infinity) <= p.I_m4
      ? { kind: 'none', why: 'bent about its minor axis' }
      : { kind: 'needs', needs: ['M_cr of an I turned onto its stiffer axis, which is not computed'] };
  if (shape === 'bar') {
    const weak = turned ? (p.Iminor_m4 ?? Infinity) <= p.I_m4 : p.I_m4 <= (p.Iminor_m4 ?? 0);
    if (weak) return { kind: 'none', why: 'bent about its weaker axis' };
    return { kind: 'needs', needs: ['M_cr of a flat bar, which is not computed'] };
  }
  if (shape === 'channel') return { kind: 'needs', needs: ['M_cr of a channel, which is not computed'] };
  if (turned) return { kind: 'needs', needs: ['a shape (M_cr of a turned section is not computed from properties)'] };
  const symmetric = p.Wtop_m3 !== null && p.Wbottom_m3 !== null && Math.abs(p.Wtop_m3 / p.Wbottom_m3 - 1) < 1e-6;
  if (!symmetric) return { kind: 'needs', needs: ['a doubly symmetric section for M_cr'] };
  const missing: string[] = [];
  if (p.Iminor_m4 === null) missing.push('I minor');
  if (p.It_m4 === null) missing.push('It');
  if (p.Iw_m6 === null) missing.push('Iw');
  if (material.G_Pa === null) missing.push('G');
  if (p.Iminor_m4 === null || p.It_m4 === null || p.Iw_m6 === null || material.G_Pa === null)
    return { kind: 'needs', needs: missing };
  const note =
    shape === null ? `Section ${section.name}: taken as doubly symmetric for M_cr, since W top and W bottom are equal` : null;
  return { kind: 'formula', Iz: p.Iminor_m4, It: p.It_m4, Iw: p.Iw_m6, G: material.G_Pa, note };
}

/**
 * Elastic critical moment of a doubly symmetric section, uniform moment (C1 = 1), load at the shear centre, N·m:
 * M_cr = (π²EIz/L²) √(Iw/Iz + L²GIt/(π²EIz)).
 */
export function criticalMoment(E: number, G: number, Iz: number, It: number, Iw: number, L: number): number {
  const P = (Math.PI ** 2 * E * Iz) / (L * L);
  return P * Math.sqrt(Iw / Iz + (G * It) / P);
}

/** Euler's load of a strut, N_cr = π²EI/L², N. */
export function eulerLoad(E: number, I: number, L: number): number {
  return (Math.PI ** 2 * E * I) / (L * L);
}
