import fc from 'fast-check';
import { expect, it } from 'vitest';
import { readSheets, sound, type TestCell, type TestSheets } from '@/lib/intake/sheets-of';

const odd: TestCell[] = [
  '', ' ', '0', '1', '-1', '*', '#', 'total', 'F1', 'A', 'AB', 'x', 'fixed', 'free', '1,234', '1e400', '±1.5', '{', '{span}', '{1/0}', '{1 = 1}', '{"A"}',
  'none', 'dead', 'm', '[kN]', 'point', 'moment', 'temperature', 'projected', 'portal', '__proto__', 'constructor', '= 1', '6 m', '−3', '\u0000', '💥', 0, -0, 1, -5, 1e300,
  NaN, Infinity, true, false, { date: '2026-01-02' }, { error: '#REF!' }, { formula: '=A1' }, { merged: 'A1', value: 'F1' }, { merged: 'A1', value: 3 },
]; // prettier-ignore

/** Sound sheets and a family with a variant, so that every part of the reader has something to read. */
function everything(): TestSheets {
  return {
    ...sound(),
    Frames: [['frame', 'title', 'run', 'count', 'spacing'], ['F1', 'one', 'yes', 2, 5]],
    Sections: [['section', 'shape', 'h', 'b', 't', 'A', 'I'], ['S', 'rhs', 100, 50, 5, null, null], ['P', null, null, null, null, 30, 2000]],
    Materials: [['material', 'grade', 'E', 'fy', 'density'], ['M', 'S355', null, null, null]],
    Settlements: [['frame', 'case', 'node', 'dx', 'dy', 'rz'], ['F1', 'dead', 'A', null, 3, null]],
    Limits: [['applies to', 'measure', 'ratio', 'absolute', 'combination', 'to node'], ['beam', 'deflection', 300, null, null, null]],
    Families: [['family', 'parameter', 'quantity', 'default', 'min', 'max', 'choices'], ['post', 'tall', 'length', 3, 1, 9, null]],
    Variants: [['frame', 'family', 'tall', 'span', 'eaves', 'rise', 'spacing', 'column', 'rafter'], ['V1', 'post', 4], ['V2', 'portal', null, 12, 4, 1, 5, 'HE 200 A', 'IPE 300']],
  }; // prettier-ignore
}

const slips = fc.array(fc.tuple(fc.nat(), fc.nat(), fc.nat(), fc.oneof(fc.constantFrom(...odd), fc.string({ maxLength: 12 }), fc.double())), { minLength: 1, maxLength: 6 }); // prettier-ignore

it('whatever stands in a cell, headings included, the sheets are read, and a wrong frame is stopped with its reason', () => {
  fc.assert(
    fc.property(slips, fc.boolean(), (changes, csv) => {
      const sheets = everything();
      const names = Object.keys(sheets);
      for (const [s, r, c, value] of changes) {
        const rows = sheets[names[s % names.length] ?? ''] ?? [];
        const row = rows[r % rows.length];
        if (row) row[c % (row.length + 1)] = value;
      }
      const intake = readSheets(sheets, { csv });
      const errors = intake.problems.filter((p) => p.severity === 'error' && p.code !== 'combination-without-case');
      for (const { id, frame } of intake.frames) {
        const told = errors.some((p) => p.stopsAll || p.frames.includes(id));
        expect(frame === null, `${id}: ${intake.problems.map((p) => `${p.code} ${p.sheet}!${p.cell}`).join(', ')}`).toBe(told);
        for (const node of frame?.nodes ?? []) expect([node.x_m, node.y_m].every(Number.isFinite)).toBe(true);
      }
    }),
    { seed: 20261201, numRuns: 80 },
  );
});
