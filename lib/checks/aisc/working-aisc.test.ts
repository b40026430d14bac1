import { describe, expect, it } from 'vitest';
import { workingFormat } from '../working-format';
import { printer, type WorkingLine, type WorkingPart } from '../working-parts';
import { aiscLrfd } from './aisc';
import { checkFrom, sectionOfLibrary, memberOf, ofFy, rowNamed, rowsOf, type Asked } from './hand-made-aisc';
import { aiscWorking } from './working-aisc';

const print = printer(workingFormat('us', 0.9));

function words(parts: readonly WorkingPart[]): string {
  return parts
    .map((part) => {
      switch (part.kind) {
        case 'text':
          return part.text;
        case 'symbol':
          return `${part.symbol}${part.sub ? `_${part.sub}` : ''}${part.sup ? `^${part.sup}` : ''}`;
        case 'fraction':
          return `(${words(part.over)})/(${words(part.under)})`;
        case 'root':
          return `√(${words(part.of)})`;
        default:
          return `${part.text}${part.unit ? ` ${part.unit}` : ''}`;
      }
    })
    .join(' ');
}

function working(
  member: ReturnType<typeof memberOf>,
  asked: Asked,
  check: string,
  method: 'LRFD' | 'ASD' = 'LRFD',
): readonly string[] {
  const lines = aiscWorking(checkFrom(rowNamed(rowsOf(member, [asked], method), check)), print) as readonly WorkingLine[];
  const text = lines.map((line) => `${line.what}: ${words(line.parts)} [${line.source ?? ''}]`);
  for (const line of text) expect(line).not.toMatch(/NaN|undefined|null|= =|= \[/);
  return text;
}
const sources = (lines: readonly string[]): string[] => lines.map((line) => /\[(.*)\]$/.exec(line)![1]!).filter((s) => s !== '');

describe('the working of a clause, from its inputs only', () => {
  it('D2: F_y A_g, then φ or Ω', () => {
    const lines = working(memberOf('W14X132', 10), { tension: 100 }, 'D2 tension');
    expect(lines[1]).toMatch(/P_n = F_y A_g = 50\.0\d* ksi · 38\.\d+ in² = 19\d\d kip/);
    expect(lines[2]).toMatch(/^design strength: φ P_n = 0\.9\d* · 19\d\d kip = 17\d\d kip \[B3\.1\]$/);
    expect(working(memberOf('W14X132', 10), { tension: 100 }, 'D2 tension', 'ASD')[2]).toMatch(
      /\(P_n\)\/\(Ω\) = \(19\d\d kip\)\/\(1\.67\d*\)/,
    );
  });

  it('E3: both of its branches, and that twisting does not govern', () => {
    const short = working(memberOf('W14X132', 30), { compression: 500 }, 'E3 flexural buckling');
    expect(sources(short)).toEqual(['E2', '(E3-4)', '(E4-2)', '(E3-2)', '(E3-1)', 'B3.1']);
    expect(short.some((line) => line.startsWith('torsional buckling does not govern'))).toBe(true);
    expect(sources(working(memberOf('W10X33', 25), { compression: 5 }, 'E3 flexural buckling'))).toContain('(E3-3)');
    expect(sources(working(memberOf('HSS8X8X3/8', 12), { compression: 5 }, 'E3 flexural buckling'))).not.toContain('(E4-2)');
  });

  const held = { minor: { length_m: 1, from: 'typed' }, major: { length_m: 1, from: 'typed' }, outOfPlane: { length_m: 1, from: 'typed' } } as const; // prettier-ignore
  it('E4, and E3 saying that it governs', () => {
    expect(sources(working(memberOf('W14X132', 60, held), { compression: 5 }, 'E4 torsional buckling'))).toEqual([
      '(E4-2)',
      '(E3-2)',
      '(E4-1)',
      'B3.1',
    ]);
    const e3 = working(memberOf('W14X132', 60, held), { compression: 5 }, 'E3 flexural buckling');
    expect(e3.some((line) => line.startsWith('torsional buckling governs'))).toBe(true);
  });

  it('E7: web, flange, round wall; by E3 or by E4', () => {
    const web = working(memberOf('W16X26', 8), { compression: 5 }, 'E7 slender elements');
    expect(web.some((line) => line.startsWith('slender web'))).toBe(true);
    expect(sources(working(memberOf('W16X26', 20, held), { compression: 5 }, 'E7 slender elements'))).toContain('(E4-2)');
    const section = sectionOfLibrary('W14X90');
    const thin = { ...section, dimensions: { ...section.dimensions!, tf: 0.008 } };
    expect(
      working(memberOf(thin, 8), { compression: 5 }, 'E7 slender elements').some((line) => line.startsWith('slender flange')),
    ).toBe(true);
    const tube = sectionOfLibrary('HSS10.000X0.188');
    const round = { ...tube, dimensions: { ...tube.dimensions!, t: 0.0025 } };
    expect(sources(working(memberOf(round, 8), { compression: 5 }, 'E7 slender elements'))).toContain('(E7-7)');
  });

  it('F2: plastic, inelastic and elastic; C_b by F1-1 or why not', () => {
    const at = (Lb: number): string[] => sources(working(memberOf('W18X50', 40), { moment: 50, Lb }, 'F2 bending'));
    expect(at(4)).toContain('F2.2(a)');
    expect(at(10)).toContain('(F2-2)');
    expect(at(30)).toContain('(F2-3), (F2-4)');
    expect(at(30)).toContain('(F1-1)');
    const free = working(memberOf('W18X50', 10), { moment: 50, stretch: { heldAtEnd: false } }, 'F2 bending');
    expect(free.some((line) => line.includes('an end is free'))).toBe(true);
    expect(sources(working(memberOf('UPE 300', 10), { moment: 50 }, 'F2 bending'))).toContain('(F2-7), (F2-8b)');
  });

  const flange = (name: string, tf: number): ReturnType<typeof sectionOfLibrary> => {
    const section = sectionOfLibrary(name);
    return { ...section, dimensions: { ...section.dimensions!, tf } };
  };
  it('F3 and F6: noncompact and slender flanges', () => {
    expect(sources(working(memberOf('W21X48', 10), { moment: 50 }, 'F3 bending'))).toContain('(F3-1)');
    expect(sources(working(memberOf(flange('W14X90', 0.006), 10), { moment: 5 }, 'F3 bending'))).toContain('(F3-2)');
    const turned = { turned: true };
    expect(sources(working(memberOf('W10X33', 10, turned), { moment: 5 }, 'F6 bending'))).not.toContain('(F6-2)');
    expect(sources(working(memberOf('W21X48', 10, turned), { moment: 5 }, 'F6 bending'))).toContain('(F6-2)');
    expect(sources(working(memberOf(flange('W14X90', 0.006), 10, turned), { moment: 5 }, 'F6 bending'))).toContain(
      '(F6-3), (F6-4)',
    );
  });

  it('F7: noncompact and slender walls, a noncompact web, buckling sideways', () => {
    const of = (name: string, Lb: number, t?: number): string[] => {
      const section = sectionOfLibrary(name);
      const box = t === undefined ? section : { ...section, dimensions: { ...section.dimensions!, t } };
      return sources(working(memberOf(box, Lb), { moment: 5, Lb }, 'F7 bending'));
    };
    expect(of('HSS10X6X3/16', 5)).toContain('(F7-2)');
    expect(of('HSS8X8X3/16', 5)).toContain('(F7-3)');
    expect(of('HSS12X4X3/16', 5)).toContain('(F7-6)');
    expect(of('HSS8X4X1/4', 2)).toContain('F7.4(a)');
    expect(of('HSS8X4X1/4', 40)).toContain('(F7-10)');
    expect(of('HSS8X4X1/4', 400)).toContain('(F7-11)');
  });

  it('F8 and G5: round', () => {
    const material = ofFy(46);
    const lines = working(memberOf('HSS10.000X0.188', 10, { material }), { moment: 5 }, 'F8 bending');
    expect(sources(lines)).toContain('(F8-2)');
    expect(lines.some((line) => line.startsWith('wall D/t'))).toBe(true);
    const tube = sectionOfLibrary('HSS10.000X0.188');
    const thin = { ...tube, dimensions: { ...tube.dimensions!, t: 0.001 } };
    expect(sources(working(memberOf(thin, 8), { moment: 1 }, 'F8 bending'))).toContain('(F8-3), (F8-4)');
    expect(sources(working(memberOf('HSS10.000X0.188', 10), { shear: 5 }, 'G5 shear'))).toContain('(G5-1)');
  });

  it('G2 rolled and not, G4, G6', () => {
    expect(sources(working(memberOf('W18X50', 10), { shear: 5 }, 'G2 shear'))).toContain('G2.1(a), (G2-2)');
    expect(sources(working(memberOf('W24X55', 10), { shear: 5 }, 'G2 shear'))).toContain('G2.1(b), (G2-3), (G2-4)');
    expect(sources(working(memberOf('W18X50', 10), { shear: 5 }, 'G2 shear', 'ASD'))).toContain('G2.1(a), (G2-2)');
    expect(sources(working(memberOf('HSS8X8X3/8', 10), { shear: 5 }, 'G4 shear'))).toContain('(G4-1)');
    const thinner = (name: string, change: object): ReturnType<typeof memberOf> => {
      const section = sectionOfLibrary(name);
      return memberOf({ ...section, dimensions: { ...section.dimensions!, ...change } }, 10);
    };
    const shear = { shear: 5 };
    expect(sources(working(thinner('W18X50', { tw: 0.006 }), shear, 'G2 shear'))).toContain('(G2-4)');
    expect(sources(working(thinner('HSS12X4X1/4', { t: 0.0045 }), shear, 'G4 shear'))).toContain('(G2-10)');
    expect(sources(working(thinner('HSS12X4X1/4', { t: 0.003 }), shear, 'G4 shear'))).toContain('(G2-11)');
    expect(
      working(memberOf('W18X50', 10, { turned: true }), { shear: 5 }, 'G6 shear').some((line) => line.startsWith('flange')),
    ).toBe(true);
  });

  it('H1: both branches, with the clauses that its strengths come from', () => {
    const high = working(memberOf('W14X132', 20), { compression: 500, moment: 50 }, 'H1.1 combined');
    expect(sources(high)).toEqual(['(H1-1a)']);
    expect(high[0]).toMatch(/^axial force, by E3/);
    expect(sources(working(memberOf('W14X132', 20), { tension: 5, moment: 50 }, 'H1.2 combined'))).toEqual(['(H1-1b)']);
  });

  it('has nothing to say of a row that was not checked, and none of another code', () => {
    const check = checkFrom(rowNamed(rowsOf(memberOf('C15X50', 10), [{ moment: 1 }]), 'AISC 360-22 LRFD'));
    expect(aiscWorking(check, print)).toEqual([]);
    expect(aiscLrfd.working({ ...check, reference: 'EN 1993-1-1 6.2.3' }, print)).toBeNull();
  });
});
