import ExcelJS from 'exceljs';
import { describe, expect, it } from 'vitest';
import { readIntake } from '@/lib/intake/read-intake';
import { sheetNames } from '@/lib/intake/sheet-definitions';
import { writeTemplate } from '@/lib/reports/template/write-template';

describe.each(['metric', 'us'] as const)('the template in %s units', (units) => {
  it('has every sheet of the contract and reads without an error or a warning', async () => {
    const intake = await readIntake([{ name: 'template.xlsx', bytes: await writeTemplate(units) }]);
    expect(intake.sheets.map((s) => s.known)).toEqual([...sheetNames]);
    expect(
      intake.problems.filter((p) => p.severity !== 'note').map((p) => `${p.sheet} ${p.cell} ${p.code}: ${p.message}`),
    ).toEqual([]);
    expect(intake.problems.filter((p) => p.code === 'column-ignored')).toEqual([]);
    expect(intake.frames.map((f) => [f.id, f.frame !== null])).toEqual([
      ['F1', true],
      ['P1', true],
    ]);
    expect(intake.settings.units).toBe(units);
  });

  it('says under each heading what belongs there, and offers the words', async () => {
    const workbook = new ExcelJS.Workbook();
    await workbook.xlsx.load(Buffer.from(await writeTemplate(units)) as unknown as ArrayBuffer);
    const nodes = workbook.getWorksheet('Nodes');
    expect(nodes?.getCell('C2').value).toBe(units === 'us' ? 'x [ft]' : 'x [m]');
    expect(nodes?.getCell('C2').note).toBe('Needed. To the right.');
    expect(workbook.getWorksheet('Members')?.getCell('G200').dataValidation).toMatchObject({
      type: 'list',
      formulae: [expect.stringContaining('rafter')],
    });
    expect(workbook.getWorksheet('Setup')?.getCell('B4').dataValidation).toMatchObject({ formulae: ['"metric,us"'] });
    const [setup, members] = [workbook.getWorksheet('Setup'), workbook.getWorksheet('Members')];
    expect(setup?.getCell('A5').value).toBe('analysis');
    expect(setup?.getCell('A5').note).toContain('deformed shape');
    expect(setup?.getCell('B5').dataValidation).toMatchObject({ formulae: ['"first order,second order"'] });
    expect(members?.getCell('K2').value).toBe('tension only');
    expect(members?.getCell('K3').dataValidation).toMatchObject({ formulae: ['"yes,no"'] });
    const headings = (name: string) => (workbook.getWorksheet(name)?.getRow(2).values as unknown[]).map(String);
    expect(headings('Sections')).toEqual(expect.arrayContaining(['published', 'source']));
    expect(headings('Materials')).toEqual(expect.arrayContaining(['fy by thickness', 'source']));
    for (const name of sheetNames) {
      workbook
        .getWorksheet(name)
        ?.getRow(2)
        .eachCell((cell) => expect(cell.note, `${name} ${cell.address}`).toBeTruthy());
    }
  });
});
