import { describe, expect, it } from 'vitest';
import { librarySheet } from '@/lib/library/library-sheet';
import { libraryRow, libraryRows, libraryViewFrom } from '@/lib/library/library-view';
import { designationsOf, rangeNames } from '@/lib/sections/library';

const found = (search: string) => libraryRows(libraryViewFrom(new URLSearchParams(search)).view);
const names = (search: string) => found(search).rows.map(({ section }) => section.designation);

describe('a view of the section library', () => {
  it('shows every section of every range in the order of the ranges', () => {
    expect(names('')).toEqual(rangeNames.flatMap((range) => designationsOf(range)));
    expect(names('range=IPE')).toEqual(designationsOf('IPE'));
  });

  it('finds a designation however it is typed, and says what was understood', () => {
    expect(names('q=305+x+165+x+40+UB')).toEqual(['UB 305x165x40']);
    expect(names('q=w12x26')).toEqual(['W12X26']);
    expect(found('q=RHS+200x100x6.3').note).toMatch(/hot finished/);
    expect(names('q=IPE+A')).toContain('IPE A 300');
  });

  it('takes a part of a designation for its start where any starts so', () => {
    expect(names('q=IPE+5')).toEqual(['IPE 500', 'IPE 550']);
    expect(names('q=120x60x')).toContain('HFRHS 120x60x5');
  });

  it('suggests the nearest for a near miss, and names a section of another range', () => {
    expect(found('q=IPE+310')).toMatchObject({ rows: [], suggestion: 'IPE 300' });
    expect(found('q=HE+200+A&range=IPE')).toMatchObject({ rows: [], suggestion: 'HE 200 A' });
    expect(found('q=a+beam').suggestion).toBeNull();
  });

  it('is bounded in the units it is shown in', () => {
    // A of IPE 300 is 53.8 cm², of IPE 330 62.6 cm² (EN 10365)
    expect(names('range=IPE&min-A=53&max-A=54&min-depth=299')).toEqual(['IPE 300']);
    // W12X26 has 7.65 in² (AISC Shapes Database v15.0)
    expect(names('range=W&units=us&min-A=7.6&max-A=7.7&q=W12')).toContain('W12X26');
  });

  it('sorts by a property up and down', () => {
    const mass = (search: string) => found(search).rows.map(({ section }) => section.properties.A_m2);
    const up = mass('range=HE+A&sort=mass');
    expect(up).toEqual([...up].sort((a, b) => a - b));
    expect(mass('range=HE+A&sort=-mass')).toEqual([...up].reverse());
  });

  it('puts sections whose property is not available last, whichever way it is sorted', () => {
    for (const sort of ['Iw', '-Iw']) {
      const known = found(`sort=${sort}`).rows.map(({ section }) => section.properties.Iw_m6 !== null);
      expect(known.indexOf(false)).toBe(known.lastIndexOf(true) + 1);
    }
  });

  it('says what of an address is no view', () => {
    const { wrong } = libraryViewFrom(new URLSearchParams('range=IPN&units=cubits&sort=colour&min-A=much'));
    expect(Object.keys(wrong).sort()).toEqual(['min-A', 'range', 'sort', 'units']);
  });
});

describe('the library as a file', () => {
  it('has the rows and order of the view in its units, labelled as derived', () => {
    const sheet = librarySheet(found('range=IPE&min-A=53&max-A=54&min-depth=299').rows, 'metric');
    const headings = sheet.columns.map(({ heading }) => heading);
    const rows = [...(sheet.rows() as Iterable<readonly unknown[]>)];
    expect(rows).toHaveLength(1);
    const cell = (heading: string) => rows[0]?.[headings.indexOf(heading)];
    expect(rows[0]?.slice(0, 4)).toEqual(['IPE 300', 'IPE', 'EN 10365', 'derived']);
    // EN 10365: IPE 300 has 42.2 kg/m, I = 8356 cm⁴, W = 557 cm³
    expect(cell('Mass [kg/m]')).toBeCloseTo(42.2, 1);
    expect(cell('I [cm⁴]')).toBeCloseTo(8356, -1);
    expect(cell('W [cm³]')).toBeCloseTo(557, 0);
  });

  it('says “not available” where there is no closed form', () => {
    const sheet = librarySheet(found('q=S24X121').rows, 'us');
    expect([...(sheet.rows() as Iterable<readonly unknown[]>)][0]).toContain('not available');
  });

  it('writes US figures in US units', () => {
    const sheet = librarySheet(found('q=W12X26').rows, 'us');
    const at = sheet.columns.findIndex(({ heading }) => heading === 'Mass [lb/ft]');
    expect([...(sheet.rows() as Iterable<readonly unknown[]>)][0]?.[at]).toBeCloseTo(26, 0);
  });
});

it('gives the row of a designation, and none for what is no designation', () => {
  expect(libraryRow('ipe300')?.section.designation).toBe('IPE 300');
  expect(libraryRow('IPE 310')).toBeNull();
});
