/** Walkway brackets kept as CSV by an office that writes decimal commas: explicit frames, own sections. */
import type { SampleCell, SampleSheet } from './write';

export function walkways(): SampleSheet[] {
  const nodes: SampleCell[][] = [['frame', 'node', 'x [mm]', 'y [mm]', 'place']];
  const members: SampleCell[][] = [
    ['frame', 'member', 'start', 'end', 'section', 'role', 'axial only', 'length z [m]', 'length LTB [m]'],
  ];
  const supports: SampleCell[][] = [['frame', 'node', 'ux', 'uy', 'rz', 'angle']];
  const loads: SampleCell[][] = [['frame', 'case', 'member', 'load', 'value', 'end value']];
  for (let index = 0; index < 18; index += 1) {
    const frame = `W${index + 1}`;
    const reach = 1200 + 62.5 * index;
    nodes.push([frame, 'A', 0, 0, 'root'], [frame, 'B', reach * 0.75, 0, ''], [frame, 'C', reach, 0, 'tip'], [frame, 'D', 0, -reach * 0.6, 'foot']); // prettier-ignore
    members.push([frame, 'AB', 'A', 'B', 'ARM', 'arm', '', 0.4, 0.4], [frame, 'BC', 'B', 'C', 'ARM', 'cantilever', '', 0.4, 0.4]);
    members.push([frame, 'DB', 'D', 'B', 'STRUT', 'strut', 'x', '', '']);
    supports.push([frame, 'A', 'fixed', 'fixed', 'free', 0], [frame, 'D', 'fixed', 'fixed', '', 0]);
    loads.push([frame, 'deck', 'AB', 'distributed', -1.25, ''], [frame, 'deck', 'BC', 'distributed', -1.25, -0.75]);
    loads.push([frame, 'crowd', 'AB', 'distributed', -4.5, ''], [frame, 'crowd', 'BC', 'distributed', -4.5, '']);
  }
  return [
    { name: 'Setup', rows: [['setting', 'value'], ['title', 'Fennmoor walkway brackets'], ['material', 'S235'], ['stress factor', 0.6], ['deflection ratio', 200], ['sway ratio', 'none']] }, // prettier-ignore
    { name: 'Nodes', rows: nodes },
    { name: 'Members', rows: members },
    { name: 'Sections', rows: [['section', 'shape', 'h [mm]', 'b [mm]', 't [mm]', 'd [mm]'], ['ARM', 'rhs', 120, 80, 6.3, ''], ['STRUT', 'chs', '', '', 5, 101.6]] }, // prettier-ignore
    { name: 'Supports', rows: supports },
    {
      name: 'Load cases',
      rows: [
        ['case', 'kind', 'self weight'],
        ['deck', 'dead', 1],
        ['crowd', 'live', ''],
      ],
    },
    { name: 'Member loads', rows: loads },
    {
      name: 'Combinations',
      rows: [
        ['combination', 'purpose', 'deck', 'crowd'],
        ['C1', 'strength', 1, 1],
        ['S1', 'service', 1, 1],
      ],
    },
  ];
}
