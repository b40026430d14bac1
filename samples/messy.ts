/**
 * A set of small bents as it really arrives: every slip that one readable workbook can hold, each in a frame of its
 * own where it touches only one, and the same set mended. What needs a file of its own stands in problems/.
 */
import type { SampleCell, SampleSheet } from './write';

type Rows = SampleCell[][];
const frameName = (index: number): string => `Q${String(index).padStart(2, '0')}`;
const frameCount = 36;

interface Bents {
  frames: Rows;
  nodes: Rows;
  members: Rows;
  supports: Rows;
  nodeLoads: Rows;
  memberLoads: Rows;
}

function bents(): Bents {
  const sheets: Bents = {
    frames: [['frame', 'title', 'group']],
    nodes: [['frame', 'node', 'x [m]', 'y [m]', 'place']],
    members: [['frame', 'member', 'start', 'end', 'section', 'role', 'length z [m]', 'length LTB [m]', 'offset', 'end joint']],
    supports: [['frame', 'node', 'ux', 'uy', 'rz']],
    nodeLoads: [['frame', 'case', 'node', 'Fx [kN]', 'Fy [kN]']],
    memberLoads: [['frame', 'case', 'member', 'load', 'axes', 'direction', 'value [kN/m]', 'from [m]', 'to [m]']],
  };
  for (let index = 1; index <= frameCount; index += 1) {
    const frame = frameName(index);
    const span = 5 + (index % 6) * 0.5;
    sheets.frames.push([frame, `bent ${index}`, index % 2 === 0 ? 'north' : 'south']);
    sheets.nodes.push([frame, 'A', 0, 0, 'base'], [frame, 'B', 0, 3.6, 'eaves'], [frame, 'C', span, 3.6, 'eaves'], [frame, 'D', span, 0, 'base']); // prettier-ignore
    sheets.members.push(
      [frame, 'AB', 'A', 'B', 'HE 160 A', 'column', 0.9, 0.9, '', 'rigid'],
      [frame, 'BC', 'B', 'C', 'IPE 240', 'beam', 0.8, 0.8, '', 'rigid'],
      [frame, 'CD', 'C', 'D', 'HE 160 A', 'column', 0.9, 0.9, '', 'rigid'],
    );
    sheets.supports.push([frame, 'A', 'fixed', 'fixed', 'fixed'], [frame, 'D', 'fixed', 'fixed', 'fixed']);
    sheets.nodeLoads.push([frame, 'wind', 'B', 4 + (index % 3), 0]);
    sheets.memberLoads.push([frame, 'dead', 'BC', 'distributed', 'global', 'y', -4, null, null]);
    sheets.memberLoads.push([frame, 'snow', 'BC', 'distributed', 'projected', 'y', -6 - (index % 4), null, null]);
  }
  return sheets;
}

/** The row of a frame whose second cell is `key`. */
function row(rows: Rows, frame: string, key: string): SampleCell[] {
  const found = rows.find((each) => each[0] === frame && each.includes(key));
  if (!found) throw new RangeError(`no row ${key} of ${frame}`);
  return found;
}

function setupRows(stressFactor: number): Rows {
  return [
    ['setting', 'value'],
    ['title', 'Cutter Row bents'],
    ['material', 'S275'],
    ['stress factor', stressFactor],
    ['deflection ratio', 250],
    ['sway ratio', 150],
  ];
}

const cases: Rows = [
  ['case', 'kind', 'self weight'],
  ['dead', 'dead', 1],
  ['snow', 'snow', null],
  ['wind', 'wind', null],
];

const combinations: Rows = [
  ['combination', 'purpose', 'case', 'factor'],
  ['C1', 'strength', 'dead', 1],
  ['C1', 'strength', 'snow', 1],
  ['C2', 'strength', 'dead', 1],
  ['C2', 'strength', 'wind', '±1'],
  ['S1', 'service', 'dead', 1],
  ['S1', 'service', 'snow', 1],
];

function book(setup: Rows, b: Bents, caseRows: Rows, combinationRows: Rows, more: SampleSheet[] = []): SampleSheet[] {
  return [
    { name: 'Setup', rows: setup },
    { name: 'Frames', rows: b.frames },
    { name: 'Nodes', rows: b.nodes },
    { name: 'Members', rows: b.members },
    { name: 'Supports', rows: b.supports },
    { name: 'Load cases', rows: caseRows },
    { name: 'Node loads', rows: b.nodeLoads },
    { name: 'Member loads', rows: b.memberLoads },
    { name: 'Combinations', rows: combinationRows },
    ...more,
  ];
}

/** The set without slips: every frame runs. */
export function mended(): SampleSheet[] {
  return book(setupRows(0.6), bents(), cases, combinations);
}

/** The set as it arrived. */
export function messy(): SampleSheet[] {
  const b = bents();
  const slip = (rows: Rows, index: number, key: string, column: number, value: SampleCell): void => {
    row(rows, frameName(index), key)[column] = value;
  };
  slip(b.members, 1, 'BC', 4, 'IPE 24O'); // unknown-section: a letter O
  slip(b.members, 2, 'BC', 3, 'E'); // unknown-node
  slip(b.members, 3, 'BC', 1, ''); // missing-id
  b.nodes.push([frameName(4), 'B', 0.2, 3.6, 'eaves']); // duplicate-id
  b.supports.push([frameName(5), 'A', 'fixed', 'fixed', 'free']); // conflicting-row
  slip(b.memberLoads, 6, 'snow', 2, 'BD'); // unknown-member
  slip(b.memberLoads, 7, 'snow', 1, 'sonw'); // unknown-case
  slip(b.members, 8, 'AB', 5, 'colmn'); // unknown-word
  slip(b.nodes, 9, 'B', 3, 'three'); // not-a-number
  slip(b.nodeLoads, 10, 'B', 3, new Date(Date.UTC(2026, 0, 2))); // date-for-number
  slip(b.nodeLoads, 11, 'B', 3, { error: '#REF!' }); // error-value
  slip(b.nodeLoads, 12, 'B', 3, { formula: 'Fx_of(12)' } as SampleCell); // no-stored-value
  slip(b.nodes, 13, 'B', 3, 0.0004); // zero-length, coincident-nodes
  slip(b.memberLoads, 14, 'dead', 8, 25); // load-beyond-end
  slip(b.memberLoads, 15, 'dead', 7, 3); // out-of-range: from after to
  slip(b.memberLoads, 15, 'dead', 8, 2);
  b.supports = b.supports.filter((each) => each[0] !== frameName(16)); // no-supports
  slip(b.supports, 17, 'A', 2, 'free'); // mechanism: nothing holds it in x
  slip(b.supports, 17, 'D', 2, 'free');
  b.nodes.push([frameName(18), 'E', 20, 0, ''], [frameName(18), 'F', 22, 0, '']); // not-connected
  b.members.push([frameName(18), 'EF', 'E', 'F', 'IPE 200', 'beam', 1, 1, '', 'rigid']);
  slip(b.members, 19, 'CD', 8, 0.1); // not-supported until offsets are computed
  slip(b.members, 20, 'BC', 4, 'TUBE'); // not-positive in Sections
  slip(b.members, 21, 'BC', 4, 'PLATE'); // unknown-material from Sections
  slip(b.members, 22, 'BC', 4, 'GIRDER'); // unknown-grade from Materials
  b.members.push([frameName(23), 'BC2', 'B', 'C', 'IPE 240', 'beam', 0.8, 0.8, '', 'rigid']); // same-ends
  b.nodes.push([frameName(24), 'B2', 0.0005, 3.6, '']); // coincident-nodes, joined by a stub so that it is connected
  b.members.push([frameName(24), 'B2C', 'B2', 'C', 'IPE 240', 'beam', 0.8, 0.8, '', 'rigid']);
  b.members.push([frameName(24), 'AB2', 'A', 'B2', 'HE 160 A', 'column', 0.9, 0.9, '', 'rigid']);
  b.members.push([frameName(25), 'AC', 'A', 'C', 'HE 100 A', 'brace', 1, 1, '', 'pin']); // crossing
  b.members.push([frameName(25), 'BD', 'B', 'D', 'HE 100 A', 'brace', 1, 1, '', 'pin']);
  slip(b.nodes, 26, 'C', 2, 6500); // suspect-unit: millimetres under a heading in metres
  slip(b.nodes, 26, 'D', 2, 6500);
  b.supports.push([frameName(27), 'A', 'fixed', 'fixed', 'fixed']); // repeated-row
  slip(b.nodes, 28, 'C', 3, '3.6'); // text-number
  slip(b.memberLoads, 29, 'dead', 8, 7.503); // clipped: 3 mm past a 7.5 m beam
  slip(b.nodeLoads, 30, 'B', 2, 'Z'); // unknown-node in a load
  b.members[0] = [...(b.members[0] ?? []), 'colour', 'lenght y']; // column-ignored, near-miss-column
  for (const each of b.members.slice(1)) each.push('grey', null);
  const sections: SampleSheet = {
    name: 'Sections',
    rows: [
      ['section', 'A [cm2]', 'I [cm4]', 'depth [mm]', 'material'],
      ['TUBE', -28.5, 3892, 240, null],
      ['PLATE', 39.1, 3892, 240, 'S27S'],
      ['GIRDER', 39.1, 3892, 240, 'HOUSE'],
      ['BOX', 39.1, 3892, 240, null],
    ],
  };
  slip(b.members, 31, 'BC', 4, 'BOX'); // derived: W from I and depth
  const materials: SampleSheet = { name: 'Materials', rows: [['material', 'grade'], ['HOUSE', 'S999']] }; // prettier-ignore
  const settlements: SampleSheet = {
    name: 'Settlements',
    rows: [
      ['frame', 'case', 'node', 'dx [furlong]', 'dy [kN]'],
      [frameName(32), 'dead', 'A', 1, null],
      [frameName(33), 'dead', 'A', null, 2],
    ],
  };
  const limits: SampleSheet = { name: 'Limits', rows: [['frame', 'applies to', 'ratio'], [frameName(34), 'beam', 300]] }; // prettier-ignore
  const families: SampleSheet = {
    name: 'Families',
    rows: [
      ['family', 'parameter', 'quantity', 'default'],
      ['post', 'tall', 'length', 3],
    ],
  };
  const variants: SampleSheet = { name: 'Variants', rows: [['frame', 'family', 'tall [m]'], ['V1', 'post', 3]] }; // prettier-ignore
  b.nodes.push(['post', 'A', 0, 0, 'base'], ['post', 'B', 0, '{tall * }', 'tip']); // bad-expression
  b.members.push(['post', 'AB', 'A', 'B', 'HE 160 A', 'column', null, null, '', 'rigid', 'grey', null]);
  b.supports.push(['post', 'A', 'fixed', 'fixed', 'fixed']);
  b.memberLoads.push(['', '', 'total', null, null, null, 0, null, null]);
  b.frames.push(['total', 36, null]); // a totals row under the list
  const messyCases = [...cases, ['plant', 'dead', 1]];
  const messyCombinations: Rows = [
    ...combinations,
    ['C3', 'strength', 'dead', 1],
    ['C3', 'strength', 'plant', 1], // no-self-weight: two cases carry it
    ['C4', 'strength', 'dead', 1.35], // stress-factor 0.6 with factored loads
    ['C4', 'strength', 'snow', 1.5],
    ['C5', 'strength', 'dead', 1],
    ['C5', 'strength', 'frost', 1], // combination-without-case
  ];
  return book(setupRows(0.6), b, messyCases, messyCombinations, [sections, materials, settlements, limits, families, variants]);
}

/** Slips that take a workbook of their own, by file name. */
export function messyOnes(): [string, SampleSheet[]][] {
  const b = bents();
  const good = book(setupRows(0.6), b, cases, combinations);
  const without = (name: string): SampleSheet[] => good.filter((each) => each.name !== name);
  const noCoordinate = good.map((sheet) =>
    sheet.name === 'Nodes' ? { ...sheet, rows: sheet.rows.map((cells) => cells.filter((_, index) => index !== 3)) } : sheet,
  );
  const wide = good.map((sheet) =>
    sheet.name === 'Frames'
      ? {
          ...sheet,
          rows: sheet.rows.map((cells, index) => [
            ...cells,
            ...Array.from({ length: 300 }, (_, n) => (index === 0 ? `remark ${n}` : n)),
          ]),
        }
      : sheet,
  );
  const tapered = good.map((sheet) =>
    sheet.name === 'Members'
      ? {
          ...sheet,
          rows: sheet.rows.map((cells, index) => [...cells, index === 0 ? 'end section' : index === 1 ? 'IPE 200' : null]),
        }
      : sheet,
  );
  return [
    ['missing-sheet', without('Supports')],
    ['missing-column', noCoordinate],
    ['too-large', wide],
    ['not-supported', tapered],
  ];
}
