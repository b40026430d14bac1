import ExcelJS from 'exceljs';
import { ruleSetNames } from '@/lib/combinations/read-rule-set';
import type { TemplateColumn, TemplateSheet } from '@/lib/reports/template/template-sheet';
import { templateSheets } from '@/lib/reports/template/template-sheets';
import { unitLabel } from '@/lib/units/batch-unit';
import type { System } from '@/lib/units/quantity';

/** Rows that get drop-downs: as many as people fill by hand; pasted rows need none. */
const choiceRows = 300;
const headingFill: ExcelJS.Fill = { type: 'pattern', pattern: 'solid', fgColor: { argb: 'FFE9EFEC' } };

/** Words of the settings, offered where the setting's name stands beside. */
const settingChoices: Readonly<Record<string, readonly string[]>> = {
  units: ['metric', 'us'],
  analysis: ['first order', 'second order'],
  'strength check': ['elastic stress', 'AISC 360-22 LRFD', 'AISC 360-22 ASD', 'EN 1993-1-1'],
  stability: ['screened', 'by others'],
  'combination set': ['as listed', ...ruleSetNames],
  imperfections: ['none', 'EN 1993-1-1', 'AISC 360'],
  'stiffness reduction': ['none', 'AISC 360'],
  'shear deformation': ['no', 'yes'],
  interaction: ['Annex B', 'Annex A'],
  'load height': ['shear centre', 'top flange', 'bottom flange'],
};

/** What a setting does, as a note on its name. */
const settingNotes: Readonly<Record<string, string>> = {
  analysis:
    'second order: every combination in equilibrium on its deformed shape, P-Δ and P-δ. Load cases alone stay first order.',
  imperfections: 'Strength combinations are analysed leaning right and left, as two results: C1 → and C1 ←.',
  'stiffness reduction': 'Of strength combinations: 0.8 on EA and EI, τb on EI where it applies (direct analysis).',
  'combination set':
    'as listed: those of Combinations only. A set makes combinations from the kinds of the load cases, beside the listed ones.',
  'shear deformation': 'yes: members shear as well as bend. Sections given by their properties then need Av.',
  stability: 'by others: member and frame stability is not screened, and every result says so.',
  'strength check':
    'elastic stress, or a design code’s clauses for every member. The codes want factored loads (ASD: unfactored ones).',
  'gamma M0': 'EN 1993-1-1: partial factor for the resistance of cross-sections; the national annex gives it.',
  'gamma M1': 'EN 1993-1-1: partial factor for members against buckling; the national annex gives it.',
  'national annex': 'Its name, for the reader of the results; it changes nothing by itself.',
  interaction: 'EN 1993-1-1: the annex that gives the interaction factors of 6.3.3.',
  'load height': 'Where loads across a member act, for lateral-torsional buckling under a design code.',
  'stress factor': 'Allowable stress divided by yield: about 0.6 with unfactored loads, 0.9 to 1 with factored ones.',
};

/**
 * A workbook to begin with: every sheet of the contract, its headings with their units and a note on each, example rows that
 * read without errors, drop-downs for words.
 * @returns XLSX bytes
 */
export async function writeTemplate(units: System): Promise<Uint8Array> {
  const workbook = new ExcelJS.Workbook();
  workbook.creator = 'Tallyframe';
  workbook.created = new Date(0);
  workbook.modified = new Date(0);
  for (const sheet of templateSheets(units)) writeSheet(workbook, sheet, units);
  return new Uint8Array(await workbook.xlsx.writeBuffer());
}

function writeSheet(workbook: ExcelJS.Workbook, sheet: TemplateSheet, units: System): void {
  const page = workbook.addWorksheet(sheet.name, { views: [{ state: 'frozen', ySplit: 2 }] });
  page.getCell(1, 1).value = sheet.purpose;
  page.getCell(1, 1).font = { italic: true, color: { argb: 'FF3F515A' } };
  sheet.columns.forEach((column, i) => {
    const cell = page.getCell(2, i + 1);
    cell.value = headingOf(column, units);
    cell.font = { bold: true };
    cell.fill = headingFill;
    cell.border = { bottom: { style: 'thin' } };
    const needed = sheet.required.some((each) => each.split(' or ').includes(column.heading));
    cell.note = `${needed ? 'Needed. ' : ''}${column.note}`;
    page.getColumn(i + 1).width = Math.max(9, headingOf(column, units).length + 2);
    if (column.choices) offer(page, i + 1, column.choices.words, column.choices.only);
  });
  sheet.rows.forEach((row, r) =>
    row.forEach((value, i) => {
      if (value !== null) page.getCell(r + 3, i + 1).value = value;
      const choices = sheet.name === 'Setup' && i === 1 ? settingChoices[String(row[0])] : undefined;
      if (choices) page.getCell(r + 3, 2).dataValidation = validation(choices, true);
      const note = sheet.name === 'Setup' && i === 0 ? settingNotes[String(value)] : undefined;
      if (note) page.getCell(r + 3, 1).note = note;
    }),
  );
  if (sheet.name === 'Setup') {
    page.getColumn(1).width = 22;
    page.getColumn(2).width = 30;
  }
}

const headingOf = (column: TemplateColumn, units: System): string =>
  column.quantity === undefined ? column.heading : `${column.heading} [${unitLabel(column.quantity, units)}]`;

function offer(page: ExcelJS.Worksheet, column: number, words: readonly string[], only: boolean): void {
  for (let row = 3; row < 3 + choiceRows; row += 1) page.getCell(row, column).dataValidation = validation(words, only);
}

function validation(words: readonly string[], only: boolean): ExcelJS.DataValidation {
  return {
    type: 'list',
    allowBlank: true,
    formulae: [`"${words.join(',')}"`],
    showErrorMessage: only,
    errorTitle: 'Not one of the words',
    error: `Choose one of: ${words.join(', ')}.`,
  };
}
