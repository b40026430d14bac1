import { execFile } from 'node:child_process';
import { mkdtempSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { fileURLToPath } from 'node:url';
import { promisify } from 'node:util';
import { build } from 'esbuild';
import { zipSync } from 'fflate';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { craftedParts, craftedWorkbook } from '@/lib/intake/files/crafted-workbook';
import { readFiles } from '@/lib/intake/files/read-files';
import type { InputFile } from '@/lib/intake/intake';

const mebibyte = 1024 * 1024;
const text = (s: string): Uint8Array => new TextEncoder().encode(s);
const refusalOf = async (file: InputFile): Promise<{ code: string; message: string }> => {
  const { sheets, problems } = await readFiles([file]);
  expect(sheets).toEqual([]);
  expect(problems).toHaveLength(1);
  expect(problems[0]).toMatchObject({ severity: 'error', file: file.name, stopsAll: true });
  return { code: problems[0]?.code ?? '', message: problems[0]?.message ?? '' };
};
const sheet = (data: string): InputFile => craftedWorkbook({ sheets: { Nodes: data } });

describe('a file that is not what it is named', () => {
  it.each<[string, Uint8Array, RegExp]>([
    ['empty.xlsx', new Uint8Array(0), /empty/],
    ['picture.xlsx', new Uint8Array([0x89, 0x50, 0x4e, 0x47, 13, 10, 26, 10]), /a picture/],
    ['photo.csv', new Uint8Array([0xff, 0xd8, 0xff, 0xe0, 0, 16]), /a picture/],
    ['report.xlsx', text('%PDF-1.7 …'), /a PDF/],
    ['old.xlsx', Buffer.concat([Buffer.from('d0cf11e0a1b11ae1', 'hex'), Buffer.alloc(600), Buffer.from('Workbook', 'utf16le')]), /\.xls/],
    ['locked.xlsx', Buffer.concat([Buffer.from('d0cf11e0a1b11ae1', 'hex'), Buffer.alloc(600), Buffer.from('EncryptedPackage', 'utf16le')]), /password/],
    ['page.xls', text('<html><table><tr><td>1</td></tr></table></html>'), /web page/],
    ['binary.csv', new Uint8Array([65, 44, 0, 0, 7, 10]), /not text/],
    ['frames.docx', zipSync({ '[Content_Types].xml': text('<Types/>'), 'word/document.xml': text('<w/>') }), /a document/],
    ['frames.ods', zipSync({ mimetype: text('x'), 'content.xml': text('<o/>') }), /OpenDocument/],
    ['frames.xlsb', zipSync({ '[Content_Types].xml': text('<Types/>'), 'xl/workbook.bin': text('x') }), /\.xlsb/],
    ['empty.zip', zipSync({}), /holds no/],
    ['zip in zip.zip', zipSync({ 'a.xlsx': zipSync({ 'Nodes.csv': text('a,b') }) }), /zip in a zip/],
  ])('%s is told by its content', async (name, bytes, message) => {
    const { problems, sheets } = await readFiles([{ name, bytes }]);
    expect(sheets).toEqual([]);
    expect(problems[0]).toMatchObject({ code: 'unreadable', severity: 'error', stopsAll: true });
    expect(problems[0]?.message).toMatch(message);
  }); // prettier-ignore

  it('says so of macros, damage and parts that are missing', async () => {
    const plain = { sheets: { Nodes: '<sheetData/>' } };
    expect((await refusalOf(craftedWorkbook({ ...plain, parts: { 'xl/vbaProject.bin': 'x' } }))).message).toMatch(/macros/);
    const whole = craftedWorkbook(plain);
    for (const share of [0.2, 0.5, 0.9, 0.99]) {
      const cut = whole.bytes.slice(0, Math.floor(whole.bytes.byteLength * share));
      expect((await refusalOf({ name: 'cut.xlsx', bytes: cut })).message).toMatch(/damaged/);
    }
    expect((await refusalOf(craftedWorkbook({ ...plain, parts: { 'xl/worksheets/sheet1.xml': null } }))).message).toMatch(
      /Nodes/,
    );
    expect((await refusalOf(craftedWorkbook({ ...plain, parts: { 'xl/workbook.xml': null } }))).message).toMatch(/no workbook/);
    expect((await refusalOf(sheet('<sheetData><row><c></row>'))).code).toBe('unreadable');
    expect((await refusalOf(sheet('<sheetData><row><c t="s"><v>7</v></c></row></sheetData>'))).code).toBe('unreadable');
  });

  it('is refused or read unchanged where one byte of it is flipped', async () => {
    const file = craftedWorkbook({
      sheets: { Nodes: '<sheetData><row r="1"><c r="A1"><v>1</v></c><c r="B1" t="s"><v>0</v></c></row></sheetData>' },
      sharedStrings: '<si><t>x</t></si>',
    });
    const undisturbed = await readFiles([file]);
    let seed = 12345;
    for (let i = 0; i < 300; i += 1) {
      const bytes = Uint8Array.from(file.bytes);
      seed = (seed * 1103515245 + 12345) % 2147483648;
      const at = seed % bytes.length;
      bytes[at] = (bytes[at] ?? 0) ^ (1 + (seed % 255));
      const { sheets, problems } = await readFiles([{ name: file.name, bytes }]);
      for (const problem of problems) expect(['unreadable', 'too-large'], `byte ${at}`).toContain(problem.code);
      if (problems.length === 0) expect(sheets, `byte ${at}`).toEqual(undisturbed.sheets);
    }
  });
});

describe('a file beyond the limits', () => {
  it('is refused by its size as sent', async () => {
    const { code, message } = await refusalOf({ name: 'a.csv', bytes: new Uint8Array(26 * mebibyte) });
    expect(code).toBe('too-large');
    expect(message).toMatch(/26 MB were sent; 25 MB/);
  });
  it('is refused by its columns, each only where something stands in it', async () => {
    const row = (column: string): string =>
      `<sheetData><row r="1"><c r="A1"><v>1</v></c><c r="${column}1"><v>1</v></c></row></sheetData>`;
    expect((await readFiles([sheet(row('IV'))])).problems).toEqual([]);
    expect(await refusalOf(sheet(row('IW')))).toMatchObject({
      code: 'too-large',
      message: expect.stringContaining('256 columns') as string,
    });
    expect(
      (await readFiles([sheet('<sheetData><row r="1"><c r="A1"><v>1</v></c><c r="XFD1" s="3"/></row></sheetData>')])).problems,
    ).toEqual([]);
    expect((await refusalOf({ name: 'a.csv', bytes: text(Array(257).fill('x').join(';')) })).message).toContain('256 columns');
  });
  it('is refused by its rows', async () => {
    expect(
      (await readFiles([sheet('<sheetData><row r="1000000"><c><v>1</v></c></row><row r="1048576"/></sheetData>')])).problems,
    ).toEqual([]);
    const { code, message } = await refusalOf(sheet('<sheetData><row r="1000001"><c><v>1</v></c></row></sheetData>'));
    expect(code).toBe('too-large');
    expect(message).toContain('1,000,000 rows');
  });
  it('is given up after the stated time', async () => {
    const file = sheet(`<sheetData>${'<row><c><v>1</v></c></row>'.repeat(100_000)}</sheetData>`);
    let asked = 0;
    const { problems } = await readFiles([file], { shouldStop: () => (asked += 1) > 20, stopsAfter: '60 seconds' });
    expect(problems[0]).toMatchObject({ code: 'too-large', message: expect.stringContaining('60 seconds') as string });
    expect(asked).toBeLessThan(25);
  });
  it('declares no entities', async () => {
    const bomb = `<!DOCTYPE w [<!ENTITY a "aaaaaaaaaa"><!ENTITY b "&a;&a;&a;&a;&a;">]><worksheet>&b;</worksheet>`;
    const file = craftedWorkbook({ sheets: { Nodes: '' }, parts: { 'xl/worksheets/sheet1.xml': bomb } });
    expect((await refusalOf(file)).message).toMatch(/entities/);
  });
});

/** Fills `size` bytes between a start and an end with copies of one piece. */
function filled(start: string, piece: string, end: string, size: number): Uint8Array {
  const bytes = Buffer.alloc(size, piece);
  bytes.write(start, 0, 'latin1');
  bytes.write(piece.repeat(2).slice(0, piece.length * 2), start.length, 'latin1');
  const body = Math.floor((size - start.length - end.length) / piece.length);
  bytes.fill(piece, start.length, start.length + body * piece.length);
  bytes.write(end, start.length + body * piece.length, 'latin1');
  return bytes.subarray(0, start.length + body * piece.length + end.length);
}

describe('memory', () => {
  let folder = '';
  beforeAll(async () => {
    folder = mkdtempSync(join(tmpdir(), 'hostile-'));
    const root = fileURLToPath(new URL('../../../', import.meta.url));
    await build({
      stdin: {
        contents: `
          import { readFileSync } from 'node:fs';
          import { readFiles } from '@/lib/intake/files/read-files';
          const bytes = readFileSync(process.argv[2]);
          const before = process.memoryUsage().rss;
          let peak = before;
          const look = () => { peak = Math.max(peak, process.memoryUsage().rss); return false; };
          const { problems } = await readFiles([{ name: process.argv[2], bytes }], { shouldStop: look });
          look();
          console.log(JSON.stringify({ code: problems[0]?.code ?? null, grownMB: (peak - before) / 1e6 }));`,
        resolveDir: root,
        loader: 'ts',
      },
      outfile: join(folder, 'read.mjs'),
      bundle: true,
      platform: 'node',
      format: 'esm',
      alias: { '@/lib': join(root, 'lib') },
      banner: { js: "import { createRequire } from 'node:module'; const require = createRequire(import.meta.url);" },
      logLevel: 'error',
    });
  });
  afterAll(() => rmSync(folder, { recursive: true, force: true }));

  const grown = async (bytes: Uint8Array): Promise<{ code: string | null; grownMB: number }> => {
    const path = join(folder, 'hostile.bin.xlsx');
    writeFileSync(path, bytes);
    const { stdout } = await promisify(execFile)(process.execPath, [join(folder, 'read.mjs'), path]);
    return JSON.parse(stdout) as { code: string | null; grownMB: number };
  };
  const workbook = (content: Uint8Array, part = 'xl/worksheets/sheet1.xml'): Uint8Array =>
    zipSync({ ...craftedParts({ sheets: { Nodes: '<sheetData/>' }, sharedStrings: '' }), [part]: content }, { level: 1 });
  const distinctCells = (bytes: number): Uint8Array => {
    const rows: string[] = ['<worksheet><sheetData>'];
    for (let i = 0, length = 0; length < bytes; i += 1) {
      const row = `<row>${Array.from({ length: 200 }, (_, k) => `<c><v>${i * 200 + k}</v></c>`).join('')}</row>`;
      rows.push(row);
      length += row.length;
    }
    rows.push('</sheetData></worksheet>');
    return text(rows.join(''));
  };

  it.each<[string, () => Uint8Array, string]>([
    ['a sheet that says it is 300 MB', () => saying(300 * mebibyte, workbook(filled('<worksheet>', '<a/>', '</worksheet>', 60 * mebibyte))), 'too-large'],
    ['a sheet of 60 MB that says it is 1 MB', () => saying(mebibyte, workbook(filled('<worksheet>', '<a/>', '</worksheet>', 60 * mebibyte))), 'unreadable'],
    ['millions of different numbers', () => workbook(distinctCells(60 * mebibyte)), 'too-large'],
    ['millions of empty shared texts', () => workbook(filled('<sst>', '<si/>', '</sst>', 60 * mebibyte), 'xl/sharedStrings.xml'), 'too-large'],
    ['a row of a million columns', () => workbook(filled('<worksheet><sheetData><row>', '<c><v>1</v></c>', '</row></sheetData></worksheet>', 15 * mebibyte)), 'too-large'],
    ['one text of 60 MB', () => workbook(filled('<worksheet><sheetData><row><c t="str"><v>', 'x', '</v></c></row></sheetData></worksheet>', 60 * mebibyte)), 'unreadable'],
    ['tags within tags without end', () => workbook(filled('<worksheet>', '<a>', '', 60 * mebibyte)), 'unreadable'],
    ['a quotation mark left open for 60 MB', () => zipSync({ 'Nodes.csv': filled('"', 'a,b\n', '', 60 * mebibyte) }, { level: 1 }), 'unreadable'],
  ])('grows by less than 512 MB for %s', async (_, make, code) => {
    const result = await grown(make());
    expect(result.code).toBe(code);
    expect(result.grownMB).toBeLessThan(512);
  }, 120_000); // prettier-ignore
});

/** Writes another unpacked size of every large part into the zip's directory. */
function saying(size: number, zip: Uint8Array): Uint8Array {
  const bytes = Buffer.from(zip);
  const entry = Buffer.from([0x50, 0x4b, 1, 2]);
  for (let at = bytes.indexOf(entry); at >= 0; at = bytes.indexOf(entry, at + 4)) {
    if (bytes.readUInt32LE(at + 24) > 10 * mebibyte) bytes.writeUInt32LE(size, at + 24);
  }
  return bytes;
}
