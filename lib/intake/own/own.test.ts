import { strToU8 } from 'fflate';
import { describe, expect, it } from 'vitest';
import { readFiles } from '@/lib/intake/files/read-files';
import type { InputFile, Intake } from '@/lib/intake/intake';
import { originOfPart, type OwnThing } from '@/lib/intake/own/own-thing';
import { readOwnFiles, readOwnRecord, resolvedMaterial } from '@/lib/intake/own/read-own-records';
import { readIntake } from '@/lib/intake/read-intake';
import { readRows } from '@/lib/intake/rows/read-rows';
import { inputWorkbook } from '@/lib/reports/input-workbook/input-workbook';

const csv = (name: string, text: string): InputFile => ({ name, bytes: strToU8(text) });
const frames = (section: string, material = 'S275', more: readonly InputFile[] = []): InputFile[] => [
  csv('Setup.csv', `setting,value\nmaterial,${material}\n`),
  csv('Nodes.csv', 'frame,node,x [m],y [m]\nF1,A,0,0\nF1,B,6,0\n'),
  csv('Members.csv', `frame,member,start,end,section\nF1,AB,A,B,${section}\n`),
  csv('Supports.csv', 'frame,node,ux,uy,rz\nF1,A,fixed,fixed,fixed\n'),
  ...more,
];
const plated: OwnThing = {
  kind: 'section', name: 'PG 600', version: 3, units: 'metric', note: 'drawing 14', retired: false,
  cells: { shape: 'I', h: '600', b: '250', tw: '8', tf: '15' },
}; // prettier-ignore
const strong: OwnThing = {
  kind: 'material', name: 'Mill 420', version: 1, units: 'metric', note: '', retired: false,
  cells: { E: '210000', fu: '520', density: '7850', 'fy by thickness': '420 MPa to 16 mm; 400 MPa to 40 mm' },
}; // prettier-ignore
const sectionOf = ({ frames: [first] }: Intake) => first?.frame?.sections[0];
const stored = (read: Intake, own: readonly OwnThing[]): Intake =>
  readRows({ sheets: read.sheets, rows: read.rows, identity: read.input, problems: [] }, { own });

describe('the office’s own sections and materials', () => {
  it('come in where the sheets name them, with their version', async () => {
    const read = await readIntake(frames('pg 600', 'Mill 420'), { own: [plated, strong] });
    expect(read.problems.filter(({ severity }) => severity === 'error')).toEqual([]);
    // 2·25·1.5 + 57·0.8 cm²
    expect(sectionOf(read)?.properties.A_m2).toBeCloseTo(120.6e-4, 12);
    expect(read.frames[0]?.frame?.materials[0]).toMatchObject({ name: 'Mill 420', fy_Pa: 420e6, fu_Pa: 520e6 });
    expect(read.parts?.map((part) => [part.name, originOfPart(part), part.frames])).toEqual([
      ['PG 600', 'office v3 (drawing 14)', 1],
      ['Mill 420', 'office v1', 1],
    ]);
  });

  it('stand behind the sheets and before nothing of the standard ranges', async () => {
    const sheet = csv('Sections.csv', 'section,shape,h [mm],b [mm]\nPG 600,bar,100,20\n');
    const read = await readIntake(frames('PG 600', 'S275', [sheet]), { own: [plated] });
    expect(sectionOf(read)?.shape).toBe('bar');
    expect(read.parts?.[0]).toMatchObject({ origin: 'sheet', note: 'Sections row 2' });
    expect(read.sheets.some(({ name }) => name.startsWith('Office'))).toBe(false);
    const standard = await readIntake(frames('IPE 300'), { own: [plated] });
    expect(standard.parts?.map(originOfPart)).toEqual(['standard', 'standard']);
  });

  it('are held by the rows: the input written out gives the same frames without the office', async () => {
    const read = await readIntake(frames('PG 600', 'Mill 420'), { own: [plated, strong] });
    const again = await readIntake([inputWorkbook(read, 'bents A')]);
    expect(JSON.stringify(again.frames)).toBe(JSON.stringify(read.frames));
    expect(again.sheets.map(({ name }) => name)).toEqual(expect.arrayContaining(['Office sections', 'Office materials']));
    expect(again.parts?.map(originOfPart)).toEqual([
      'sheet (Office sections row 2: office v3: drawing 14)',
      'sheet (Office materials row 2: office v1)',
    ]);
  });

  it('stay as they were read when the office edits them since', async () => {
    const read = await readIntake(frames('PG 600'), { own: [plated] });
    const thinner = { ...plated, version: 4, cells: { ...plated.cells, tf: '10' } };
    const later = stored(read, [thinner]);
    expect(later).toEqual(read);
    expect(stored(read, [])).toEqual(read);
    const anew = await readIntake(frames('PG 600'), { own: [thinner] });
    expect(sectionOf(anew)?.dimensions?.tf).toBe(0.01);
  });

  it('may be given another material, or another name, by a row of Sections', async () => {
    const rows = 'section,designation,material\nPG 600,,S355\nrafter,PG 600,\n';
    const read = await readIntake(frames('rafter', 'S275', [csv('Sections.csv', rows)]), { own: [plated] });
    expect(sectionOf(read)).toMatchObject({ name: 'rafter', shape: 'I' });
    expect(read.parts?.[0]).toMatchObject({ name: 'rafter', origin: 'office', version: 3 });
    const second = await readIntake([inputWorkbook(read, 'x')]);
    expect(JSON.stringify(second.frames)).toBe(JSON.stringify(read.frames));
    const named = await readIntake(frames('PG 600', 'S275', [csv('Sections.csv', rows)]), { own: [plated] });
    expect(named.frames[0]?.frame?.materials[0]?.name).toBe('S355');
  });

  it('are not found without an office, nor when retired: the cell says so and what is near', async () => {
    const alone = await readIntake(frames('PG 600'));
    expect(alone.problems.find(({ code }) => code === 'unknown-section')).toMatchObject({ cell: 'E2', frames: ['F1'] });
    const near = await readIntake(frames('PG 610'), { own: [plated] });
    expect(near.problems.find(({ code }) => code === 'unknown-section')?.message).toContain('Did you mean PG 600?');
    const gone = await readIntake(frames('PG 600'), { own: [{ ...plated, retired: true }] });
    expect(gone.problems.find(({ code }) => code === 'unknown-section')?.message).toContain('no longer offered');
    expect(gone.frames[0]?.frame).toBeNull();
  });
});

describe('what a form or a table says of them', () => {
  const problemsOf = (cells: Record<string, string>, name = 'X 1') =>
    readOwnRecord('section', { name, units: 'metric', cells }, '').problems.filter(({ severity }) => severity === 'error');

  it('is kept as typed, in its unit', () => {
    const { records, problems } = readOwnRecord('section', { name: 'PG 12', units: 'us', cells: { shape: 'I', h: '12.25', b: '8', tw: '0.3125', tf: '.5' } }, 'sketch'); // prettier-ignore
    expect(problems).toEqual([]);
    expect(records[0]?.record.cells).toEqual({ shape: 'I', h: '12.25', b: '8', tw: '0.3125', tf: '0.5', r: '0' });
    expect(records[0]?.section?.dimensions?.h).toBe(12.25 * 0.0254);
  });

  it('is refused under a standard name, however typed, and with dimensions that cannot be', () => {
    const sound = { shape: 'bar', h: '100', b: '20' };
    expect(problemsOf(sound)).toEqual([]);
    expect(problemsOf(sound, 'ipe300')[0]?.message).toContain('IPE 300 is a standard one');
    expect(problemsOf(sound, 'HEA 200')[0]?.code).toBe('duplicate-id');
    expect(readOwnRecord('material', { name: 's355 j2', units: 'metric', cells: { E: '210000' } }, '').problems[0]?.code).toBe('duplicate-id'); // prettier-ignore
    expect(problemsOf({ shape: 'I', h: '100', b: '50', tw: '5', tf: '60' })[0]).toMatchObject({ column: 'tf [mm]' });
    expect(problemsOf({ shape: 'I', h: '100', b: '50', tw: '5' })[0]?.code).toBe('not-a-number');
    expect(problemsOf({ shape: 'bar', h: '-100', b: '50' })[0]?.code).toBe('not-positive');
  });

  it('of a published table is used as given, and derived where it is silent', async () => {
    const text =
      'Catalogue of welded beams\nsection,shape,h,b,tw,tf,A,Iy,Wy,It,source\n,,mm,mm,mm,mm,cm2,cm4,cm3,cm4,\n' +
      'WB 1,I,400,200,8,12,79.0,22500,1125,30.5,maker 2026\nWB 2,,300,150,,,50,8000,,,\n';
    const { sheets } = await readFiles([csv('beams.csv', text)]);
    const read = readOwnFiles('section', sheets, 'metric');
    expect(read?.problems.filter(({ severity }) => severity === 'error')).toEqual([]);
    const [first, second] = read?.records ?? [];
    expect(first?.section?.properties.A_m2).toBe(79e-4);
    expect(first?.section?.properties.It_m4).toBe(30.5e-8);
    expect(first?.section?.sources).toMatchObject({ A_m2: 'typed', Wpl_m3: 'derived', Wtop_m3: 'typed' });
    expect(first?.note).toBe('maker 2026');
    expect(second?.section).toMatchObject({ shape: null, properties: { depth_m: 0.3, width_m: 0.15 } });
    // W from I and depth, as the sheets take it: 2·8000/30
    expect(second?.section?.properties.Wtop_m3).toBeCloseTo(533.33e-6, 8);
  });

  it('of a table tells each slip at its cell', async () => {
    const text =
      'section,shape,h [mm],b [mm],A [cm2],I [cm4]\nOWN 1,bar,100,20,,\nOWN 1,bar,90,20,,\nIPE 300,bar,100,2O,,\nOWN 3,,,,1500,8000\n';
    const { sheets } = await readFiles([csv('Sections.csv', text)]);
    const { problems, records } = readOwnFiles('section', sheets, 'metric')!;
    expect(problems.filter(({ severity }) => severity === 'error').map(({ cell, code }) => `${cell} ${code}`)).toEqual([
      'A3 conflicting-row',
      'D4 not-a-number',
    ]);
    expect(records.map(({ record }) => record.name)).toEqual(['OWN 3']);
    const far = readOwnRecord(
      'section',
      { name: 'B', units: 'metric', cells: { shape: 'bar', h: '100', b: '20', A: '200' } },
      '',
    );
    expect(far.problems).toMatchObject([{ severity: 'warning', code: 'suspect-unit', column: 'A [cm²]' }]);
    expect(readOwnFiles('section', [], 'metric')).toBeNull();
  });

  it('yields by thickness; above the last step nothing is known', () => {
    const { cells, name } = strong;
    const record = { name, units: 'metric' as const, cells };
    const fy = (mm: number | null) => resolvedMaterial(record, mm === null ? null : mm / 1000).fy_Pa;
    expect([fy(16), fy(16.1), fy(40), fy(41), fy(null)]).toEqual([420e6, 400e6, 400e6, null, null]);
    const wrong = (text: string) =>
      readOwnRecord('material', { name, units: 'metric', cells: { E: '210000', 'fy by thickness': text } }, '').problems[0]?.code;
    expect(wrong('420 to 16')).toBe('not-a-number');
    expect(wrong('420 MPa to 16 mm; 400 MPa to 10 mm')).toBe('not-a-number');
    expect(readOwnRecord('material', { name, units: 'metric', cells: { ...cells, fy: '300' } }, '').problems[0]?.code).toBe('conflicting-row'); // prettier-ignore
  });
});
