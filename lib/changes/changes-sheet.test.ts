import { readFileSync } from 'node:fs';
import { strToU8 } from 'fflate';
import { describe, expect, it } from 'vitest';
import { readForChange } from '@/lib/changes/change-section';
import { readChangesSheet } from '@/lib/changes/changes-sheet';
import { previewSection } from '@/lib/changes/section-preview';
import { readFiles } from '@/lib/intake/files/read-files';
import type { OwnThing } from '@/lib/intake/own/own-thing';
import { readIntake } from '@/lib/intake/read-intake';
import { changesTemplate } from '@/lib/reports/template/own-template';

const csv = (name: string, text: string) => ({ name, bytes: strToU8(text) });
const two = [
  csv('Setup.csv', 'setting,value\nmaterial,S275\n'),
  csv('Nodes.csv', 'frame,node,x [m],y [m]\nF1,A,0,0\nF1,B,0,4\nF1,C,6,4\nF2,A,0,0\nF2,B,0,4\nF2,C,6,4\n'),
  csv('Members.csv', 'frame,member,start,end,section,role\nF1,AB,A,B,HE 200 B,column\nF1,BC,B,C,IPE 300,beam\nF2,AB,A,B,HE 200 B,column\nF2,BC,B,C,IPE 300,beam\n'),
  csv('Supports.csv', 'frame,node,ux,uy,rz\nF1,A,fixed,fixed,fixed\nF2,A,fixed,fixed,fixed\n'),
]; // prettier-ignore
const plated: OwnThing = {
  kind: 'section', name: 'PG 600', version: 1, units: 'metric', note: '', retired: false,
  cells: { shape: 'I', h: '600', b: '250', tw: '8', tf: '15' },
}; // prettier-ignore

async function sheet(text: string, own: readonly OwnThing[] = [], name = 'Changes.csv') {
  const input = await readIntake(two);
  const { sheets } = await readFiles([csv(name, text)]);
  const read = readForChange(input, own);
  return { input, read, own, ...readChangesSheet(sheets, read)! };
}
const named = (change: { readonly what: { readonly members?: readonly { frame: string; member: string }[] | undefined } }) =>
  (change.what.members ?? []).map(({ frame, member }) => `${frame} ${member}`);

describe('a Changes sheet', () => {
  it('names members, roles of a frame and roles of every frame; the closest row holds', async () => {
    const read = await sheet('frame,member,role,section\n,,beam,ipe360\nF2,,beam,IPE 400\nF1,BC,,PG 600\n*,,column,HE 200 B\n', [
      plated,
    ]);
    expect(read.problems).toEqual([]);
    expect(read.changes.map((change) => [change.to, named(change)])).toEqual([
      ['PG 600', ['F1 BC']],
      ['IPE 400', ['F2 BC']],
    ]);
    expect(read.rows).toBe(4);
  });

  it('is previewed row by row as a change on screen is, own sections coming in with it', async () => {
    const { changes, input, read, own } = await sheet(
      'frame,member,section\nF1,BC,PG 600\nF2,BC,IPE 400\n',
      [plated],
      'anything.csv',
    );
    const first = previewSection(input, changes[0]!, 'Ana Lyst', own, read);
    if ('refused' in first) throw new Error(first.refused);
    expect(first.preview.touched).toEqual([{ number: 1, frame: 'F1' }]);
    const second = previewSection(first.input, changes[1]!, 'Ana Lyst', own, first.read);
    if ('refused' in second) throw new Error(second.refused);
    expect(second.preview).toMatchObject({ carriedOver: 1, touched: [{ frame: 'F2' }] });
    // the rows alone now give the office's own section
    const after = readForChange(second.input);
    expect(after.intake.frames.map(({ frame }) => frame?.sections.map(({ name }) => name))).toEqual([
      ['HE 200 B', 'PG 600'],
      ['HE 200 B', 'IPE 400'],
    ]);
  });

  it('tells every slip at its cell', async () => {
    const { problems } = await sheet(
      'frame,member,role,section\nF1,BC,beam,IPE 360\nF1,,,IPE 360\n,BC,,IPE 360\nF9,BC,,IPE 360\nF1,XX,,IPE 360\nF1,,strut,IPE 360\nF1,,baem,IPE 360\nF1,BC,,IPE 310\nF1,BC,,\n',
    );
    expect(problems.map(({ cell, code }) => `${cell} ${code}`)).toEqual([
      'C2 conflicting-row', 'B3 missing-id', 'A4 missing-id', 'A5 unknown-node', 'B6 unknown-member', 'C7 unknown-member',
      'C8 unknown-word', 'D9 unknown-section', 'D10 missing-id',
    ]); // prettier-ignore
    expect(problems.find(({ cell }) => cell === 'D9')?.message).toContain('Did you mean IPE 300?');
  });

  it('refuses two rows that give one member different sections, and a sheet without its headings', async () => {
    const clash = await sheet('frame,member,section\nF1,BC,IPE 360\nf1,bc,IPE 400\nF1,BC,IPE 360\n');
    expect(clash.problems).toMatchObject([{ cell: 'C3', code: 'conflicting-row' }]);
    const bare = await sheet('frame,profile\nF1,IPE 360\n');
    expect(bare.problems.map(({ code }) => code)).toContain('missing-column');
    const none = await readFiles(two);
    expect(readChangesSheet(none.sheets, readForChange(await readIntake(two)))).toBeNull();
  });

  it('has a template that says nothing by itself', async () => {
    for (const format of ['csv', 'xlsx'] as const) {
      const { sheets } = await readFiles([{ name: `Changes.${format}`, bytes: changesTemplate(format) }]);
      const read = readChangesSheet(sheets, readForChange(await readIntake(two)));
      expect([read?.rows, read?.problems, read?.changes]).toEqual([0, [], []]);
    }
  });

  it('reaches 240 frames of a family by their role in one change', async () => {
    const input = await readIntake([{ name: 'sheds.xlsx', bytes: readFileSync('samples/portal-sheds-240.xlsx') }]);
    const read = readForChange(input);
    const { sheets } = await readFiles([csv('Changes.csv', 'role,section\nrafter,IPE 600\n')]);
    const { changes, problems } = readChangesSheet(sheets, read)!;
    expect(problems).toEqual([]);
    expect(changes[0]?.what.members).toHaveLength(480);
    const made = previewSection(input, changes[0]!, 'Ana Lyst', [], read);
    expect('preview' in made && made.preview.touched.length).toBe(240);
  });
});
