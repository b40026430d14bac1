/** Equipment brackets as variants of the built-in bracket family: reach, strut and load differ from bay to bay. */
import type { SampleCell, SampleSheet } from './write';

export function brackets(): SampleSheet[] {
  const arms = ['IPE 120', 'IPE 140', 'IPE 160', 'IPE 180', 'IPE 200', 'IPE 220'];
  const struts = ['HE 100 A', 'HE 140 A', 'HE 180 A'];
  const rows: SampleCell[][] = [
    ['frame', 'family', 'reach [m]', 'rise [m]', 'drop [m]', 'strut at', 'arm restraint [m]', 'arm', 'strut', 'material', 'root', 'tip Fx [kN]', 'tip Fy [kN]', 'line load [kN/m]'], // prettier-ignore
  ];
  for (let index = 0; index < 150; index += 1) {
    const reach = 1 + (index % 15) * 0.125;
    const strutted = Math.floor(index / 50);
    const load = 4 + ((index * 7) % 11);
    const demand = (reach * load) / (strutted === 0 ? 1 : 3);
    const arm = arms[Math.min(arms.length - 1, [3.6, 6.4, 10, 15, 21].filter((each) => demand > each).length)] ?? 'IPE 220';
    rows.push([
      `B${String(index + 1).padStart(3, '0')}`, 'bracket', reach, strutted === 2 ? 0.2 : 0, strutted === 0 ? 0 : Number((reach * 0.8).toFixed(3)),
      [0, 0.6, 1][strutted] ?? 0, 0.5, arm, struts[strutted] ?? 'HE 100 A', 'S355', 'fixed', index % 3 === 0 ? 1.2 : 0, -load, 0.6 + (index % 4) * 0.2,
    ]); // prettier-ignore
  }
  return [
    {
      name: 'Setup',
      rows: [
        ['setting', 'value'],
        ['title', 'Ostrel works, equipment brackets'],
        ['units', 'metric'],
        ['deflection ratio', 180],
        ['sway ratio', 'none'],
      ],
    },
    { name: 'Variants', rows },
    {
      name: 'Combinations',
      rows: [
        ['combination', 'purpose', 'case', 'factor'],
        ['C1', 'strength', 'dead', 1],
        ['C1', 'strength', 'tip', 1],
        ['C2', 'strength', 'dead', 1],
        ['C2', 'strength', 'tip', '±0.75'],
        ['S1', 'service', 'dead', 1],
        ['S1', 'service', 'tip', 1],
      ],
    },
  ];
}
