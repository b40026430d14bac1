/** Canopy bents in US customary units: feet, kips, psf on plan, W shapes of ASTM A992. */
import type { SampleCell, SampleSheet } from './write';

export function canopiesUs(): SampleSheet[] {
  const nodes: SampleCell[][] = [['Frame', 'Node', 'X (ft)', 'Y (ft)', 'Place']];
  const members: SampleCell[][] = [
    ['Frame', 'Member', 'Start', 'End', 'Section', 'Role', 'Length minor (ft)', 'Length LTB (ft)'],
  ];
  const supports: SampleCell[][] = [['Frame', 'Node', 'Ux', 'Uy', 'Rz']];
  const loads: SampleCell[][] = [['Frame', 'Case', 'Member', 'Load', 'Axes', 'Direction', 'Value (psf)', 'Width (ft)']];
  const pulls: SampleCell[][] = [['Frame', 'Case', 'Node', 'Fx (kip)', 'Fy (kip)']];
  for (let index = 0; index < 36; index += 1) {
    const frame = `K-${String(index + 1).padStart(2, '0')}`;
    const reach = 5 + (index % 12) * 0.5;
    const height = 11 + Math.floor(index / 12);
    const beam = reach < 7 ? 'W8X18' : reach < 9 ? 'W10X26' : 'W12X40';
    nodes.push([frame, 'A', 0, 0, 'base'], [frame, 'B', 0, height, 'root'], [frame, 'C', reach, height + 0.5, 'tip']);
    members.push([frame, 'AB', 'A', 'B', index % 2 === 0 ? 'W10X45' : 'W 10 x 49', 'column', 4, 4]);
    members.push([frame, 'BC', 'B', 'C', beam, 'cantilever', 3, 3]);
    supports.push([frame, 'A', 'fixed', 'fixed', 'fixed']);
    loads.push([frame, 'dead', 'BC', 'distributed', 'global', 'y', -9, 12]);
    loads.push([frame, 'snow', 'BC', 'distributed', 'projected', 'y', -20 - (index % 3) * 5, 12]);
    loads.push([frame, 'wind', 'BC', 'distributed', 'local', 'y', 16, 12]);
    pulls.push([frame, 'wind', 'B', 0.4, 0]);
  }
  return [
    {
      name: 'Setup',
      rows: [['Setting', 'Value'], ['Title', 'Fennmoor halt canopies'], ['Units', 'us'], ['Material', 'A992'], ['Deflection ratio', 120], ['Sway ratio', 100]], // prettier-ignore
    },
    { name: 'Nodes', rows: nodes },
    { name: 'Members', rows: members },
    { name: 'Supports', rows: supports },
    {
      name: 'Load cases',
      rows: [
        ['Case', 'Kind', 'Self weight'],
        ['dead', 'dead', 1],
        ['snow', 'snow', null],
        ['wind', 'wind', null],
      ],
    },
    { name: 'Node loads', rows: pulls },
    { name: 'Member loads', rows: loads },
    {
      name: 'Combinations',
      rows: [
        ['Combination', 'Purpose', 'Case', 'Factor'],
        ['D+S', 'strength', 'dead', 1],
        ['D+S', 'strength', 'snow', 1],
        ['D+W', 'strength', 'dead', 1],
        ['D+W', 'strength', 'wind', '±0.6'],
        ['service D+S', 'service', 'dead', 1],
        ['service D+S', 'service', 'snow', 1],
      ],
    },
  ];
}
