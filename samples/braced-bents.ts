/**
 * Bents braced by crossed rods that only pull: which of a pair is slack changes with the wind, and under weight alone both
 * may be. Columns stand on fixed bases, so that a bent without its rods is still held.
 */
import type { SampleCell, SampleSheet } from './write';

export function bracedBents(): SampleSheet[] {
  const nodes: SampleCell[][] = [['frame', 'node', 'x [m]', 'y [m]', 'place']];
  const members: SampleCell[][] = [['frame', 'member', 'start', 'end', 'section', 'role', 'start joint', 'end joint', 'tension only', 'length y [m]', 'length z [m]', 'length LTB [m]']]; // prettier-ignore
  const supports: SampleCell[][] = [['frame', 'node', 'ux', 'uy', 'rz']];
  const nodeLoads: SampleCell[][] = [['frame', 'case', 'node', 'Fx [kN]', 'Fy [kN]']];
  const memberLoads: SampleCell[][] = [['frame', 'case', 'member', 'load', 'axes', 'direction', 'value [kN/m]']];
  for (let index = 0; index < 12; index += 1) {
    const frame = `X${String(index + 1).padStart(2, '0')}`;
    const storeys = 1 + (index % 3);
    const bay = 5 + Math.floor(index / 3) * 0.5;
    const height = 3.6;
    const rod = storeys === 3 ? 'rod 30' : 'rod 24';
    for (let level = 0; level <= storeys; level += 1) {
      const place = level === 0 ? 'base' : level === storeys ? 'top' : `level ${level}`;
      nodes.push([frame, `A${level}`, 0, level * height, place], [frame, `B${level}`, bay, level * height, place]);
      if (level === 0) {
        supports.push([frame, 'A0', 'fixed', 'fixed', 'fixed'], [frame, 'B0', 'fixed', 'fixed', 'fixed']);
        continue;
      }
      const below = level - 1;
      for (const side of ['A', 'B'])
        members.push([frame, `C${side}${level}`, `${side}${below}`, `${side}${level}`, 'HE 180 A', 'column', null, null, null, height, 1.2, 1.2]); // prettier-ignore
      members.push([frame, `G${level}`, `A${level}`, `B${level}`, 'IPE 270', 'beam', 'pin', 'pin', null, null, 1, 1]);
      members.push([frame, `R${level}`, `A${below}`, `B${level}`, rod, 'brace', null, null, 'yes', null, null, null]);
      members.push([frame, `L${level}`, `B${below}`, `A${level}`, rod, 'brace', null, null, 'yes', null, null, null]);
      nodeLoads.push([frame, 'wind', `A${level}`, 9 + (index % 4) * 2, null]);
      memberLoads.push([frame, 'dead', `G${level}`, 'distributed', 'global', 'y', -5]);
      memberLoads.push([frame, 'plant', `G${level}`, 'distributed', 'global', 'y', -7]);
    }
  }
  const setup: SampleCell[][] = [
    ['setting', 'value'],
    ['title', 'Ostrel works, bents braced by rods'],
    ['material', 'S355'],
    ['analysis', 'second order'],
    ['imperfections', 'EN 1993-1-1'],
    ['deflection ratio', 250],
    ['sway ratio', 200],
  ];
  return [
    { name: 'Setup', rows: setup },
    { name: 'Nodes', rows: nodes },
    { name: 'Members', rows: members },
    { name: 'Sections', rows: [['section', 'shape', 'd [mm]'], ['rod 24', 'bar', 24], ['rod 30', 'bar', 30]] }, // prettier-ignore
    { name: 'Supports', rows: supports },
    {
      name: 'Load cases',
      rows: [
        ['case', 'kind', 'self weight'],
        ['dead', 'dead', 1],
        ['plant', 'live', null],
        ['wind', 'wind', null],
      ],
    },
    { name: 'Node loads', rows: nodeLoads },
    { name: 'Member loads', rows: memberLoads },
    {
      name: 'Combinations',
      rows: [
        ['combination', 'purpose', 'dead', 'plant', 'wind'],
        ['C1', 'strength', 1, 1, null],
        ['C2', 'strength', 1, 0.75, '±0.75'],
        ['C3', 'strength', 1, null, '±1'],
        ['S1', 'service', 1, 1, null],
        ['S2', 'service', 1, null, '±1'],
      ],
    },
  ];
}
