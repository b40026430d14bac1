/**
 * Model P of the benchmark: a pitched portal with haunch points, 9 nodes, 8 members, pinned bases (23 unknowns),
 * 5 load cases and 7 combinations, so 12 results a frame. Written out node by node, as sheets.
 */
import { PassThrough } from 'node:stream';
import { buffer } from 'node:stream/consumers';
import ExcelJS from 'exceljs';

const chain = ['A', 'B', 'H', 'M', 'C', 'N', 'K', 'D', 'E'] as const;
const along = [0.12, 0.55];

type Cells = readonly (string | number | null)[];

function* nodeRows(count: number): Iterable<Cells> {
  yield ['frame', 'node', 'x [m]', 'y [m]', 'place'];
  for (let index = 0; index < count; index += 1) {
    const { id, half, eaves, rise } = shape(index);
    const left: [number, number][] = [[0, 0], [0, eaves], ...along.map((t): [number, number] => [t * half, eaves + t * rise])]; // prettier-ignore
    const right = left.map(([x, y]): [number, number] => [2 * half - x, y]).reverse();
    const points = [...left, [half, eaves + rise] as [number, number], ...right];
    for (const [at, [x, y]] of points.entries()) {
      const node = chain[at] ?? '';
      yield [id, node, x, y, { A: 'base', E: 'base', B: 'eaves', D: 'eaves', C: 'apex' }[node as string] ?? null];
    }
  }
}

function shape(index: number): { id: string; half: number; eaves: number; rise: number } {
  return { id: `P${index + 1}`, half: 6 + (index % 50) * 0.1, eaves: 4 + (index % 7) * 0.25, rise: 0.9 + (index % 11) * 0.1 };
}

function* memberRows(count: number): Iterable<Cells> {
  yield ['frame', 'member', 'start', 'end', 'section', 'role', 'span', 'length z [m]', 'length LTB [m]'];
  for (let index = 0; index < count; index += 1) {
    const { id } = shape(index);
    for (let at = 0; at < 8; at += 1) {
      const column = at === 0 || at === 7;
      yield [id, `${chain[at]}${chain[at + 1]}`, chain[at] ?? '', chain[at + 1] ?? '', column ? 'HE 300 A' : 'IPE 400', column ? 'column' : 'rafter', column ? null : at < 4 ? 'left' : 'right', 1.2, 1.2]; // prettier-ignore
    }
  }
}

function* supportRows(count: number): Iterable<Cells> {
  yield ['frame', 'node', 'ux', 'uy', 'rz'];
  for (let index = 0; index < count; index += 1) {
    yield [shape(index).id, 'A', 'fixed', 'fixed', null];
    yield [shape(index).id, 'E', 'fixed', 'fixed', null];
  }
}

function* loadRows(count: number, code: boolean): Iterable<Cells> {
  yield ['frame', 'case', 'member', 'load', 'axes', 'direction', 'value [kN/m]'];
  for (let index = 0; index < count; index += 1) {
    const { id } = shape(index);
    for (let at = 0; at < 8; at += 1) {
      const member = `${chain[at]}${chain[at + 1]}`;
      const column = at === 0 || at === 7;
      if (!column) {
        yield [id, 'dead', member, 'distributed', 'global', 'y', -1.5];
        yield [id, 'snow', member, 'distributed', 'projected', 'y', -3 - (index % 9) * 0.2];
        yield [id, 'live', member, 'distributed', 'projected', 'y', -3.6];
      }
      yield [id, 'wind', member, 'distributed', 'local', 'y', column ? -2.1 : 1.4];
      yield [id, 'wind 2', member, 'distributed', 'local', 'y', at < 4 ? 1 : -1.6];
      if (code)
        for (const [k, wind] of moreWinds.entries())
          yield [id, wind, member, 'distributed', 'local', 'y', column ? 1 - k : k - 0.7];
    }
  }
}

const caseRows: Cells[] = [['case', 'kind', 'self weight', 'alternative'], ['dead', 'dead', 1, null], ['snow', 'snow', null, null], ['live', 'roof live', null, null], ['wind', 'wind', null, 'w'], ['wind 2', 'wind', null, 'w']]; // prettier-ignore
const combinationRows: Cells[] = [
  ['combination', 'purpose', 'dead', 'snow', 'live', 'wind', 'wind 2'],
  ['C1', 'strength', 1, 1, null, null, null],
  ['C2', 'strength', 1, null, 1, null, null],
  ['C3', 'strength', 1, null, null, 1, null],
  ['C4', 'strength', 1, null, null, null, 1],
  ['C5', 'strength', 1, 0.75, null, 0.75, null],
  ['S1', 'service', 1, 1, null, null, null],
  ['S2', 'service', 1, null, null, 1, null],
];
const setupRows: Cells[] = [['setting', 'value'], ['title', 'Model P'], ['material', 'S275'], ['deflection ratio', 200], ['sway ratio', 150]]; // prettier-ignore

/** Members by EN 1993-1-1 under generated combinations: of five alternative winds they are 65 in number. */
const codeSetup: Cells[] = [['strength check', 'EN 1993-1-1'], ['gamma M1', 1.1], ['combination set', 'EN 1990 6.10']]; // prettier-ignore
const moreWinds = ['wind 3', 'wind 4', 'wind 5'];

/**
 * The workbook of `count` portals as bytes, written streaming.
 * @param code members checked by EN 1993-1-1 under generated combinations
 */
export async function portalWorkbook(count: number, code = false): Promise<Uint8Array> {
  const sink = new PassThrough();
  const bytes = buffer(sink);
  const book = new ExcelJS.stream.xlsx.WorkbookWriter({ stream: sink, useStyles: false, useSharedStrings: true });
  const sheets: [string, Iterable<Cells>][] = [
    ['Setup', code ? [...setupRows, ...codeSetup] : setupRows],
    ['Nodes', nodeRows(count)],
    ['Members', memberRows(count)],
    ['Supports', supportRows(count)],
    ['Load cases', code ? [...caseRows, ...moreWinds.map((wind) => [wind, 'wind', null, 'w'])] : caseRows],
    ['Member loads', loadRows(count, code)],
    ...(code ? [] : [['Combinations', combinationRows] as [string, Iterable<Cells>]]),
  ];
  for (const [name, rows] of sheets) {
    const page = book.addWorksheet(name);
    for (const row of rows) page.addRow([...row]).commit();
    page.commit();
  }
  await book.commit();
  return bytes;
}
