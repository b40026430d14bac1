/** A sheet to fill in with an office's own sections or grades. */
import type { RawCell, RawPart } from '@/lib/intake/files/raw-sheet';
import { ownDefinition, rowsOf } from '@/lib/intake/own/own-sheets';
import type { OwnKind, OwnRecord } from '@/lib/intake/own/own-thing';
import { rowsOfPart } from '@/lib/intake/rows/input-rows';
import { inputWorkbook } from '@/lib/reports/input-workbook/input-workbook';
import type { System } from '@/lib/units/quantity';

type Example = Omit<OwnRecord, 'units'> & { readonly source: string };

const sections: Readonly<Record<System, readonly Example[]>> = {
  metric: [
    { name: 'PG 600x250', cells: { shape: 'I', h: '600', b: '250', tw: '8', tf: '15' }, source: 'welded; derived from dimensions' },
    { name: 'Box 180', cells: { shape: 'rhs', h: '180', b: '120', t: '6', r: '12' }, source: 'maker’s drawing' },
    {
      name: 'Rolled 240',
      cells: {
        shape: 'I', h: '240', b: '120', tw: '6.2', tf: '9.8', r: '15', A: '39.12', I: '3892', W: '324.3', Av: '19.14', Wpl: '366.6',
        'I minor': '283.6', 'W minor': '47.27', 'Wpl minor': '73.92', It: '12.88', Iw: '37390',
      },
      source: 'published table: its properties are used as given',
    },
    { name: 'Castellated 400', cells: { h: '400', b: '150', A: '55', I: '18500', W: '925' }, source: 'properties only' },
  ],
  us: [
    { name: 'PG 24x10', cells: { shape: 'I', h: '24', b: '10', tw: '0.375', tf: '0.625' }, source: 'welded; derived from dimensions' },
    { name: 'Box 7', cells: { shape: 'rhs', h: '7', b: '5', t: '0.25', r: '0.5' }, source: 'maker’s drawing' },
    { name: 'Castellated 16', cells: { h: '16', b: '6', A: '8.5', I: '445', W: '55.6' }, source: 'properties only' },
  ],
}; // prettier-ignore

const grades: Readonly<Record<System, readonly Example[]>> = {
  metric: [
    {
      name: 'Mill 420',
      cells: { E: '210000', G: '81000', fu: '520', density: '7850', expansion: '0.000012', 'fy by thickness': '420 MPa to 16 mm; 400 MPa to 40 mm' },
      source: 'mill’s certificate',
    },
    { name: 'Old S235', cells: { grade: 'S235', fy: '220' }, source: 'tests of coupons' },
  ],
  us: [
    {
      name: 'Mill 60',
      cells: { E: '29000', G: '11200', fu: '75', density: '490', expansion: '0.0000065', 'fy by thickness': '60 ksi to 1 in; 55 ksi to 2 in' },
      source: 'mill’s certificate',
    },
  ],
}; // prettier-ignore

/** Its examples read without a problem. */
export function ownTemplate(kind: OwnKind, units: System, format: 'xlsx' | 'csv'): Uint8Array {
  const examples = (kind === 'section' ? sections : grades)[units];
  const rows = rowsOf(kind, units, examples.map((example) => ({ ...example, units }))); // prettier-ignore
  const lines = rows.map(({ cells }) => cells.map((one) => one?.text ?? ''));
  return sheetBytes(ownDefinition(kind).name, lines, format);
}

/** A Changes sheet with its headings and comments on how rows are read. */
export function changesTemplate(format: 'xlsx' | 'csv'): Uint8Array {
  const lines = [
    ['frame', 'member', 'role', 'section', 'note'],
    ['# F1', 'BC', '', 'IPE 360', 'one member of one frame'],
    ['# F2', '', 'rafter', 'IPE 360', 'every rafter of one frame'],
    ['# *', '', 'column', 'HE 200 B', 'every column of every frame; a closer row holds'],
  ];
  return sheetBytes('Changes', lines, format);
}

function sheetBytes(name: string, lines: readonly (readonly string[])[], format: 'xlsx' | 'csv'): Uint8Array {
  if (format === 'csv') {
    const cell = (text: string): string => (/[",\n]/.test(text) ? `"${text.replaceAll('"', '""')}"` : text);
    return Buffer.from(`\uFEFF${lines.map((line) => line.map(cell).join(',')).join('\r\n')}\r\n`);
  }
  const rows = lines.map((line, i) => ({
    row: i + 1,
    cells: line.map((text): RawCell | null => {
      if (text === '') return null;
      return isFigure(text) ? { kind: 'number', value: Number(text), text: String(Number(text)) } : { kind: 'text', text };
    }),
  }));
  const part: RawPart = { name, file: 'template.xlsx', order: 0, decimalMark: null, rows };
  return inputWorkbook({ sheets: [part], rows: rowsOfPart(part, 0) }, name).bytes;
}

const isFigure = (text: string): boolean => /^\d+(\.\d+)?$/.test(text);
