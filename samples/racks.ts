/** Pipe-rack bents written out node by node: bays and levels vary, so no two frames need share a topology. */
import type { SampleCell, SampleSheet } from './write';

interface Rack {
  readonly frame: string;
  readonly bays: number;
  readonly levels: number;
  readonly bay: number;
  readonly height: number;
}

export function racks(count: number): SampleSheet[] {
  const list: Rack[] = Array.from({ length: count }, (_, index) => ({
    frame: `R${String(index + 1).padStart(2, '0')}`,
    bays: 1 + (index % 3),
    levels: 1 + (Math.floor(index / 3) % 2),
    bay: 4 + (index % 4) * 0.75,
    height: 3.2 + (index % 5) * 0.2,
  }));
  const frames: SampleCell[][] = [['frame', 'title', 'group', 'count', 'note']];
  const nodes: SampleCell[][] = [['frame', 'node', 'x', 'y', 'place'], ['', '', 'm', 'm', '']]; // prettier-ignore
  const members: SampleCell[][] = [['frame', 'member', 'start', 'end', 'section', 'role', 'length z [m]', 'length LTB [m]']];
  const supports: SampleCell[][] = [['frame', 'node', 'ux', 'uy', 'rz']];
  const nodeLoads: SampleCell[][] = [['frame', 'case', 'node', 'Fx [kN]', 'Fy [kN]']];
  const memberLoads: SampleCell[][] = [['frame', 'case', 'member', 'load', 'axes', 'direction', 'value [kN/m]', 'end value [kN/m]', 'from [m]', 'to [m]']]; // prettier-ignore
  for (const { frame, bays, levels, bay, height } of list) {
    frames.push([frame, `${bays} × ${levels} bent`, `${levels} level`, 4, '']);
    for (let column = 0; column <= bays; column += 1) {
      for (let level = 0; level <= levels; level += 1) {
        const name = `${'ABCDEF'[column] ?? 'Z'}${level}`;
        nodes.push([frame, name, column * bay, level * height, level === 0 ? 'base' : `level ${level}`]);
        if (level === 0) supports.push([frame, name, 'fixed', 'fixed', 'fixed']);
        else {
          members.push([frame, `C${'ABCDEF'[column] ?? 'Z'}${level}`, `${'ABCDEF'[column] ?? 'Z'}${level - 1}`, name, 'HE 200 B', 'column', 1.2, 1.2]); // prettier-ignore
          if (column === 0) nodeLoads.push([frame, 'wind', name, 3.5 + level, 0]);
        }
        if (level > 0 && column < bays) {
          const beam = `B${'ABCDEF'[column] ?? 'Z'}${level}`;
          members.push([frame, beam, name, `${'ABCDEF'[column + 1] ?? 'Z'}${level}`, 'IPE 300', 'beam', 1, 1]);
          memberLoads.push([frame, 'pipes', beam, 'distributed', 'global', 'y', -24, level === 1 ? null : -12, 0.5, bay - 0.5]);
          memberLoads.push([frame, 'test', beam, 'distributed', null, null, -5, null, null, null]);
          if (column === 0) memberLoads.push([frame, 'anchor', beam, 'point', 'global', 'x', 8, null, bay / 3, null]);
        }
      }
    }
  }
  return [
    {
      name: 'Setup',
      rows: [['setting', 'value'], ['title', 'Ostrel works, pipe rack'], ['material', 'S355'], ['deflection ratio', 300], ['sway ratio', 150]], // prettier-ignore
    },
    { name: 'Frames', rows: frames },
    { name: 'Nodes', rows: nodes },
    { name: 'Members', rows: members },
    { name: 'Supports', rows: supports },
    {
      name: 'Load cases',
      rows: [
        ['case', 'kind', 'self weight'],
        ['dead', 'dead', 1],
        ['pipes', 'live', null],
        ['test', 'live', null],
        ['anchor', 'other', null],
        ['wind', 'wind', null],
      ],
    },
    { name: 'Node loads', rows: nodeLoads },
    { name: 'Member loads', rows: memberLoads },
    {
      name: 'Combinations',
      rows: [
        ['combination', 'purpose', 'dead', 'pipes', 'test', 'anchor', 'wind'],
        ['C1', 'strength', 1, 1, null, 1, null],
        ['C2', 'strength', 1, null, 1, null, null],
        ['C3', 'strength', 1, 1, null, null, '±1'],
        ['S1', 'service', 1, 1, null, 1, null],
        ['S2', 'service', 1, 1, null, null, 1],
      ],
    },
  ];
}
