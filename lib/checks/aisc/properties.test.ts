import { describe, expect, it } from 'vitest';
import type { Section } from '@/lib/model/frame';
import { sectionFromShape } from '@/lib/sections/section-from-shape';
import { interaction } from './combined';
import { KIP, KIPFT, memberOf, rowNamed, rowsOf } from './hand-made-aisc';
import { memberStrength } from './member-strength';

/** Numbers in 0…1, the same on every run. */
function numbers(seed: number): () => number {
  let state = seed;
  return () => (state = (state * 16807) % 2147483647) / 2147483647;
}

const I = (h: number, b: number, tw: number, tf: number): Section => {
  const made = sectionFromShape('I', { h, b, tw, tf, r: 0.012 }, 'rolled');
  if (!('section' in made)) throw new Error('no section');
  return { ...made.section, name: 'I', designation: null };
};
const strength = (section: Section | string, length: number, method: 'LRFD' | 'ASD' = 'LRFD') => {
  const found = memberStrength(memberOf(section, length), method);
  if (typeof found === 'string') throw new Error(found);
  return found;
};
const names = ['W14X132', 'W18X50', 'W16X26', 'W21X48', 'HSS8X4X1/4', 'HSS12X10X3/8', 'HSS10.000X0.188', 'UPE 300'];

describe('strengths by AISC 360-22', () => {
  it('fall, or stay, as the member grows longer: compression and bending', () => {
    for (const name of names) {
      let [axial, moment] = [Infinity, Infinity];
      for (let feet = 2; feet < 60; feet += 1) {
        const { compression, bending } = strength(name, feet);
        if (compression.refused === null) {
          expect(compression.Pc, `${name} at ${feet} ft`).toBeLessThanOrEqual(axial);
          axial = compression.Pc;
        }
        if ('reason' in bending) throw new Error(bending.reason);
        const L = feet * 0.3048;
        const Mn = bending.lateral ? Math.min(bending.local, bending.lateral.moment(L, 1)) : bending.local;
        expect(Mn, `${name} at ${feet} ft`).toBeLessThanOrEqual(moment * (1 + 1e-3));
        moment = Mn;
      }
    }
  });

  it('rise with thickness of flange and web', () => {
    const random = numbers(7);
    for (let i = 0; i < 200; i++) {
      const [h, b] = [0.25 + 0.4 * random(), 0.15 + 0.15 * random()];
      const [tw, tf] = [0.007 + 0.008 * random(), 0.01 + 0.015 * random()];
      const feet = 4 + 30 * random();
      const [thin, thick] = [strength(I(h, b, tw, tf), feet), strength(I(h, b, tw * 1.1, tf * 1.1), feet)];
      expect(thick.tension.Pc).toBeGreaterThan(thin.tension.Pc);
      expect(thick.compression.Pc).toBeGreaterThan(thin.compression.Pc);
      expect(thick.shear.Vc).toBeGreaterThan(thin.shear.Vc);
      if ('reason' in thin.bending || 'reason' in thick.bending) continue;
      const M = (of: typeof thin.bending): number => Math.min(of.local, of.lateral!.moment(feet * 0.3048, 1));
      expect(M(thick.bending)).toBeGreaterThan(M(thin.bending));
    }
  });

  it('drop by no jump where a plate passes from noncompact to slender (compression)', () => {
    // the reduction of E7 begins beyond λr √(Fy/Fn), never at a stress below it
    let before = Infinity;
    for (let tw = 0.012; tw > 0.005; tw -= 0.00005) {
      const { compression } = strength(I(0.4, 0.2, tw, 0.016), 12);
      expect(compression.Pc).toBeLessThan(before);
      if (before < Infinity) expect(compression.Pc / before).toBeGreaterThan(0.99);
      before = compression.Pc;
    }
  });

  it('LRFD and ASD agree: φR_n is 1.5 times R_n/Ω, with 0.9 × 1.67 = 1.503, exactly so for rolled webs in shear', () => {
    for (const name of names) {
      const [lrfd, asd] = [strength(name, 15), strength(name, 15, 'ASD')];
      expect(lrfd.tension.Pc / asd.tension.Pc).toBeCloseTo(1.503, 12);
      if (lrfd.compression.refused === null) expect(lrfd.compression.Pc / asd.compression.Pc).toBeCloseTo(1.503, 12);
      const rolled = name.startsWith('W') && name !== 'W16X26';
      expect(lrfd.shear.Vc / asd.shear.Vc).toBeCloseTo(rolled ? 1.5 : 1.503, 12);
      const moments = [rowsOf(memberOf(name, 15), [{ moment: 10 }]), rowsOf(memberOf(name, 15), [{ moment: 10 }], 'ASD')].map(
        ({ rows }) => rows[0]!.limit!,
      );
      expect(moments[0]! / moments[1]!).toBeCloseTo(1.503, 12);
    }
  });

  it('the interaction is 1 on its surface, and grows with either part', () => {
    const random = numbers(11);
    const { Pc } = strength('W14X132', 20).compression;
    const Mc = rowsOf(memberOf('W14X132', 20), [{ moment: 1 }]).rows[0]!.limit!;
    for (let i = 0; i < 200; i++) {
      const p = random();
      const m = p >= 0.2 ? (9 / 8) * (1 - p) : 1 - p / 2;
      expect(interaction(p, m)).toBeCloseTo(1, 12);
      const found = rowsOf(memberOf('W14X132', 20), [{ compression: (p * Pc) / KIP, moment: (m * Mc) / KIPFT }]);
      expect(rowNamed(found, 'H1.1 combined').ratio).toBeCloseTo(1, 9);
      expect(interaction(p + 0.01, m)).toBeGreaterThan(1);
      expect(interaction(p, m + 0.01)).toBeGreaterThan(1);
    }
  });
});
