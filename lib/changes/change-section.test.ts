import { describe, expect, it } from 'vitest';
import type { Change, SectionChange } from '@/lib/changes/change';
import { applyChanges } from '@/lib/changes/apply-changes';
import { previewSection } from '@/lib/changes/section-preview';
import type { InputFile, Intake } from '@/lib/intake/intake';
import { readIntake } from '@/lib/intake/read-intake';
import { readRows } from '@/lib/intake/rows/read-rows';
import { readSheets, sound, type TestSheets } from '@/lib/intake/sheets-of';
import { inputWorkbook } from '@/lib/reports/input-workbook/input-workbook';

const identity = { name: 'batch.xlsx', sha256: '0'.repeat(64), files: [] };
const to = (section: string, what: SectionChange['what']): SectionChange => ({ kind: 'section', what, to: section });

function changed(sheets: TestSheets, change: SectionChange, csv = false) {
  const before = readSheets(sheets, { csv });
  const answer = previewSection(before, change, 'Ana Lyst');
  if ('refused' in answer) throw new Error(answer.refused);
  return { before, ...answer, after: readRows({ ...answer.input, identity, problems: [] }) };
}
function refused(sheets: TestSheets, change: SectionChange): string {
  const answer = previewSection(readSheets(sheets), change, 'Ana Lyst');
  return 'refused' in answer ? answer.refused : 'not refused';
}
/** "F1 AB IPE 300" for every member of every frame. */
const sectionsOf = ({ frames }: Intake): string[] =>
  frames.flatMap(({ id, frame }) =>
    (frame?.members ?? []).map((member) => `${id} ${member.id} ${frame?.sections[member.section]?.name ?? ''}`),
  );
const rowsOf = (intake: Pick<Intake, 'rows'>, sheet: string) => intake.rows.filter((row) => row.sheet === sheet).map(({ cells }) => cells); // prettier-ignore

/** Three portals of the built-in family, and a family of the file with a section written in its template. */
function families(): TestSheets {
  return {
    Setup: [['setting', 'value'], ['material', 'S275']],
    Variants: [
      ['frame', 'family', 'span', 'eaves', 'rise', 'spacing', 'column', 'rafter', 'length', 'beam'],
      ['P1', 'portal', 12, 5, 1, 6, 'IPE 400', 'IPE 330', null, null],
      ['P2', 'portal', 15, 5, 1, 6, 'IPE 400', 'IPE 330', null, null],
      ['B1', 'shelf', null, null, null, null, null, null, 4, null],
      ['B2', 'shelf', null, null, null, null, null, null, 5, 'IPE 240'],
    ],
    Families: [
      ['family', 'parameter', 'quantity', 'default'],
      ['shelf', 'length', 'length', 3],
      ['shelf', 'beam', 'section', 'IPE 200'],
      ['shelf', 'post', 'section', 'HE 100 A'],
    ],
    Nodes: [
      ['frame', 'node', 'x', 'y'],
      ['shelf', 'A', 0, 0],
      ['shelf', 'B', 0, 3],
      ['shelf', 'C', '{length}', 3],
      ['shelf', 'D', '{length}', 0],
    ],
    Members: [
      ['frame', 'member', 'start', 'end', 'section', 'role'],
      ['shelf', 'AB', 'A', 'B', '{post}', 'column'],
      ['shelf', 'BC', 'B', 'C', '{length > 4.5 ? beam : "IPE 180"}', 'beam'],
      ['shelf', 'CD', 'C', 'D', 'HE 120 A', 'column'],
    ],
    Supports: [
      ['frame', 'node', 'ux', 'uy', 'rz'],
      ['shelf', 'A', 'fixed', 'fixed', 'fixed'],
      ['shelf', 'D', 'fixed', 'fixed', 'fixed'],
    ],
    'Load cases': [['case', 'kind', 'self weight'], ['own', 'dead', 1]],
  }; // prettier-ignore
}

describe('members given another section', () => {
  it('change in their own cell of Members, and every other row stays as it was', () => {
    const { before, after, input } = changed(sound(), to('ipe330', { members: [{ frame: 'f1', member: 'ab' }] }));
    expect(sectionsOf(after)).toEqual(['F1 AB IPE 330', 'F2 AB HE 200 A', 'F2 BC IPE 300', 'F2 CD HE 200 A']);
    const other = input.rows.filter((row, i) => JSON.stringify(row) !== JSON.stringify(before.rows[i]));
    expect(other.map(({ sheet, row, changedBy }) => [sheet, row, changedBy])).toEqual([['Members', 2, 'Ana Lyst']]);
    expect(after.problems).toEqual(before.problems);
  });

  it('may be asked for by section, role, group and span together', () => {
    const sheets = sound();
    sheets.Members = sheets.Members.map((row, i) => [
      ...row,
      i === 0 ? 'group' : i === 3 ? 'roof' : null,
      i === 0 ? 'span' : null,
    ]);
    expect(sectionsOf(changed(sheets, to('IPE 360', { section: 'IPE 300' })).after).filter((one) => one.endsWith('IPE 360'))).toHaveLength(2); // prettier-ignore
    expect(sectionsOf(changed(sheets, to('HE 220 A', { role: 'column' })).after)).toContain('F2 CD HE 220 A');
    const roof = changed(sheets, to('IPE 360', { section: 'IPE 300', group: 'Roof' }));
    expect(roof.preview.members.map(({ frame, member }) => `${frame} ${member}`)).toEqual(['F2 BC']);
    expect(refused(sheets, to('IPE 360', { span: 'ridge' }))).toMatch(/No member/);
  });

  it('show figures before and after, the frames that run again and those that keep their results', () => {
    const { preview } = changed(sound(), to('IPE 330', { role: 'beam', frame: 'F1' }));
    expect(preview).toMatchObject({ to: 'IPE 330', touched: [{ number: 1, frame: 'F1' }], carriedOver: 1 });
    // EN 10365: IPE 300 53.8 cm², 8356 cm⁴, 557 cm³, 42.2 kg/m; IPE 330 62.6 cm², 11770 cm⁴, 713 cm³, 49.1 kg/m
    const [{ before, after } = { before: null, after: null }] = preview.members;
    expect([before!.A_m2 * 1e4, before!.I_m4 * 1e8, before!.mass_kg_m].map((x) => Math.round(x!))).toEqual([54, 8356, 42]);
    expect([after!.A_m2 * 1e4, after!.I_m4 * 1e8, after!.mass_kg_m].map((x) => Math.round(x!))).toEqual([63, 11767, 49]);
    expect(after!.W_m3! * 1e6).toBeCloseTo(713, 0);
    expect(preview.mass!.after_kg / preview.mass!.before_kg).toBeCloseTo(62.6 / 53.8, 2);
  });

  it('may become a section of the Sections sheet', () => {
    const sheets = {
      ...sound(),
      Sections: [
        ['section', 'shape', 'h [mm]', 'b', 'tw', 'tf'],
        ['G1', 'I', 500, 200, 8, 14],
      ],
    };
    const { after } = changed(sheets, to('g1', { section: 'IPE 300' }));
    expect(sectionsOf(after)).toContain('F1 AB G1');
  });

  it('are read in text files too', () => {
    expect(sectionsOf(changed(sound(), to('IPE 330', { section: 'IPE 300' }), true).after)).toContain('F2 BC IPE 330');
  });
});

describe('members of families', () => {
  it('change by the variant’s cell of their parameter, and stay variants', () => {
    const { after, preview } = changed(families(), to('IPE 360', { role: 'rafter', frame: 'P2' }));
    expect(rowsOf(after, 'Variants')[2]?.[7]).toBe('IPE 360');
    expect(after.frames.map(({ frame }) => frame?.family?.name)).toEqual(['portal', 'portal', 'shelf', 'shelf']);
    expect(preview.touched).toEqual([{ number: 2, frame: 'P2' }]);
    expect(preview.carriedOver).toBe(3);
    expect(sectionsOf(after)).toEqual(expect.arrayContaining(['P1 BC IPE 330', 'P2 BC IPE 360', 'P2 CD IPE 360']));
  });

  it('change by the default where no variant gives the parameter', () => {
    const { after } = changed(families(), to('HE 140 A', { section: 'HE 100 A' }));
    expect(rowsOf(after, 'Families')[3]?.[3]).toBe('HE 140 A');
    expect(sectionsOf(after)).toEqual(expect.arrayContaining(['B1 AB HE 140 A', 'B2 AB HE 140 A']));
  });

  it('follow the branch that the variant takes', () => {
    const { after } = changed(families(), to('IPE 270', { members: [{ frame: 'B2', member: 'BC' }] }));
    expect(rowsOf(after, 'Variants')[4]?.[9]).toBe('IPE 270');
    expect(refused(families(), to('IPE 270', { members: [{ frame: 'B1', member: 'BC' }] }))).toMatch(/written in the expression/);
  });

  it('change in the template where all of them do, and by a row for the frame where only one does', () => {
    const all = changed(families(), to('HE 140 A', { section: 'HE 120 A' }));
    expect(rowsOf(all.after, 'Members')).toHaveLength(4);
    expect(rowsOf(all.after, 'Members')[3]?.[4]).toBe('HE 140 A');
    const one = changed(families(), to('HE 140 A', { members: [{ frame: 'B2', member: 'CD' }] }));
    expect(rowsOf(one.after, 'Members').at(-1)).toEqual(['B2', 'CD', 'C', 'D', 'HE 140 A', 'column']);
    expect(sectionsOf(one.after)).toEqual(expect.arrayContaining(['B1 CD HE 120 A', 'B2 CD HE 140 A']));
    expect(one.preview.touched).toEqual([{ number: 4, frame: 'B2' }]);
  });

  it('are refused where one cell gives a member that was not asked for its section', () => {
    expect(refused(families(), to('IPE 360', { members: [{ frame: 'P1', member: 'BC' }] }))).toMatch(
      /BC of P1 takes its section from Variants H2 \(rafter\), as CD of P1 does/,
    );
    expect(refused(families(), to('HE 140 A', { members: [{ frame: 'B1', member: 'AB' }] }))).toMatch(/as AB of B2 does/);
  });
});

describe('a change of section is refused with the reason', () => {
  it.each<[string, SectionChange, RegExp]>([
    ['a section there is none of', to('IPE 310', { role: 'beam' }), /no section “IPE 310”.*IPE 300/],
    ['what stands so already', to('IPE 300', { role: 'beam' }), /already/],
    ['a member there is none of', to('IPE 330', { members: [{ frame: 'F9', member: 'AB' }] }), /AB of F9 is no member/],
    ['members of a role there are none of', to('IPE 330', { role: 'brace' }), /No member/],
  ])('%s', (_, change, words) => {
    expect(refused(sound(), change)).toMatch(words);
  });

  it('a member that would silently take another material', () => {
    const sheets = { ...sound(), Sections: [['section', 'designation', 'material'], ['G1', 'IPE 300', 'S355']] };
    sheets.Members[1]![4] = 'G1';
    expect(refused(sheets, to('IPE 330', { frame: 'F1' }))).toMatch(/takes its material S355 from the Sections sheet, and would become S275/);
  }); // prettier-ignore

  it('and is a caller’s mistake where it was not looked at before', () => {
    const change: Change = to('IPE 310', { role: 'beam' });
    expect(() => applyChanges(readSheets(sound()), [change], 'Ana Lyst')).toThrow(RangeError);
  });
});

it('brought in anew as a workbook, a change gives the very same frames, families staying families', async () => {
  for (const change of [to('IPE 360', { role: 'rafter' }), to('HE 140 A', { members: [{ frame: 'B2', member: 'CD' }] })]) {
    const { after, input } = changed(families(), change);
    const file: InputFile = inputWorkbook(input, 'again B');
    const again = await readIntake([file]);
    expect(again.frames).toEqual(after.frames);
    expect(rowsOf(again, 'Variants')).toHaveLength(5);
  }
});
