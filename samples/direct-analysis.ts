/** Moment frames in US customary units by the direct analysis method: notional loads, reduced stiffness, second order. */
import type { SampleCell, SampleSheet } from './write';

export function directAnalysis(): SampleSheet[] {
  const nodes: SampleCell[][] = [['Frame', 'Node', 'X (ft)', 'Y (ft)', 'Place']];
  const members: SampleCell[][] = [['Frame', 'Member', 'Start', 'End', 'Section', 'Role', 'Start joint', 'End joint', 'Length minor (ft)', 'Length LTB (ft)']]; // prettier-ignore
  const supports: SampleCell[][] = [['Frame', 'Node', 'Ux', 'Uy', 'Rz']];
  const memberLoads: SampleCell[][] = [['Frame', 'Case', 'Member', 'Load', 'Axes', 'Direction', 'Value (kip/ft)']];
  const nodeLoads: SampleCell[][] = [['Frame', 'Case', 'Node', 'Fx (kip)', 'Fy (kip)']];
  for (let index = 0; index < 9; index += 1) {
    const frame = `D-${String(index + 1).padStart(2, '0')}`;
    const height = 12 + (index % 3);
    const bay = 22 + Math.floor(index / 3) * 2;
    // B and C carry the frame; E leans on it
    nodes.push([frame, 'A', 0, 0, 'base'], [frame, 'B', 0, height, 'roof'], [frame, 'C', bay, height, 'roof'], [frame, 'D', bay, 0, 'base'], [frame, 'E', 2 * bay, height, 'roof'], [frame, 'F', 2 * bay, 0, 'base']); // prettier-ignore
    members.push(
      [frame, 'AB', 'A', 'B', 'W8X31', 'column', null, null, 3, 3],
      [frame, 'BC', 'B', 'C', index < 6 ? 'W12X45' : 'W14X53', 'beam', null, null, 2, 2],
      [frame, 'CD', 'C', 'D', 'W8X31', 'column', null, null, 3, 3],
      [frame, 'CE', 'C', 'E', index < 6 ? 'W12X45' : 'W14X53', 'beam', 'pin', 'pin', 2, 2],
      [frame, 'EF', 'E', 'F', 'W8X24', 'column', 'pin', 'pin', 3, 3],
    );
    for (const base of ['A', 'D', 'F']) supports.push([frame, base, 'fixed', 'fixed', 'free']);
    for (const beam of ['BC', 'CE']) {
      memberLoads.push([frame, 'dead', beam, 'distributed', 'global', 'y', -0.5]);
      memberLoads.push([frame, 'roof live', beam, 'distributed', 'global', 'y', -0.6]);
    }
    nodeLoads.push([frame, 'wind', 'B', 2.5 + (index % 2), null]);
  }
  const setup: SampleCell[][] = [
    ['Setting', 'Value'],
    ['Title', 'Fennmoor halls, frames with leaning columns'],
    ['Units', 'us'],
    ['Material', 'A992'],
    ['Analysis', 'second order'],
    ['Imperfections', 'AISC 360'],
    ['Stiffness reduction', 'AISC 360'],
    ['Deflection ratio', 240],
    ['Sway ratio', 200],
  ];
  return [
    { name: 'Setup', rows: setup },
    { name: 'Nodes', rows: nodes },
    { name: 'Members', rows: members },
    { name: 'Supports', rows: supports },
    {
      name: 'Load cases',
      rows: [
        ['Case', 'Kind', 'Self weight'],
        ['dead', 'dead', 1],
        ['roof live', 'roof live', null],
        ['wind', 'wind', null],
      ],
    },
    { name: 'Node loads', rows: nodeLoads },
    { name: 'Member loads', rows: memberLoads },
    {
      name: 'Combinations',
      rows: [
        ['Combination', 'Purpose', 'dead', 'roof live', 'wind'],
        ['D+L', 'strength', 1, 1, null],
        ['D+W', 'strength', 1, null, '±0.6'],
        ['D+L+W', 'strength', 1, 0.75, '±0.45'],
        ['service D+L', 'service', 1, 1, null],
        ['service D+W', 'service', 1, null, 0.5],
      ],
    },
  ];
}
