import { describe, expect, it } from 'vitest';
import { probeSections } from '@/lib/sizing/probe-sections';
import type { StoredInput } from '@/lib/intake/rows/input-rows';

const input = (sheets: Readonly<Record<string, readonly (readonly string[])[]>>): StoredInput => ({
  sheets: Object.keys(sheets).map((name) => ({ name, file: 'shed.xlsx', decimalMark: null })),
  rows: Object.entries(sheets).flatMap(([sheet, rows], part) =>
    rows.map((cells, i) => ({ sheet, row: i + 1, cells: [...cells], part, marks: null })),
  ),
});

const shed = input({
  Setup: [['setting', 'value'], ['material', 'S275']],
  Sections: [['section', 'designation'], ['rafter', 'IPE 330'], ['wrong', 'IPE 3333333']],
  Materials: [['material', 'grade', 'fy by thickness', 'density [kg/m3]'], ['plate', 'S355', '355 MPa to 12 mm; 335 MPa to 40 mm', '8000']],
}); // prettier-ignore

describe('sections as a change would find them', () => {
  it('are the batch’s own before the library’s, with each material for its thickness', () => {
    const [own, thick] = probeSections(shed, {}, [
      { name: 'rafter', materials: ['S275', 'plate'] },
      { name: 'he300m', materials: ['S275', 'plate'] },
    ]);
    if (!own || 'unfit' in own || !thick || 'unfit' in thick) throw new Error('expected both');
    expect(own.section).toMatchObject({ name: 'rafter', designation: 'IPE 330' });
    // EN 10025-2 table 6: S275 is 275 N/mm² up to 16 mm and 265 up to 40; t_f is 11.5 mm of IPE 330, 39 mm of HE 300 M (EN 10365)
    expect(own.materials['S275']?.fy_Pa).toBe(275e6);
    expect(thick.section.name).toBe('HE 300 M');
    expect(thick.materials['S275']?.fy_Pa).toBe(265e6);
    expect(own.materials['plate']).toMatchObject({ density_kg_m3: 8000, fy_Pa: 355e6 });
    expect(thick.materials['plate']?.fy_Pa).toBe(335e6);
  });

  it('are the office’s own where the batch has none of the name, in what they are offered as', () => {
    const bar = { kind: 'section', name: 'Bar 100x20', units: 'metric', cells: { shape: 'bar', h: '100', b: '20' }, version: 2, note: '', retired: false } as const; // prettier-ignore
    const [own] = probeSections(shed, { own: [bar] }, [{ name: 'bar 100x20', materials: ['S275'] }]);
    // 100 × 20 = 2000 mm²
    expect(own).toMatchObject({ section: { name: 'Bar 100x20', shape: 'bar' }, materials: { S275: { grade: 'S275' } } });
    if (own && 'section' in own) expect(own.section.properties.A_m2).toBeCloseTo(0.002, 12);
    const [retired] = probeSections(shed, { own: [{ ...bar, retired: true }] }, [{ name: 'bar 100x20', materials: ['S275'] }]);
    expect(retired).toHaveProperty('unfit');
  });

  it('that are nowhere, or whose row is wrong, are refused with the sheets’ own words', () => {
    const found = probeSections(shed, {}, [
      { name: 'IPE 9999', materials: ['S275'] },
      { name: 'wrong', materials: ['S275'] },
    ]);
    expect(found[0]).toHaveProperty('unfit');
    expect(JSON.stringify(found[0])).toContain('IPE 9999');
    expect(found[1]).toHaveProperty('unfit');
  });
});
