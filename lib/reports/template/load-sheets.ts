import { column, frame, loadCase, one, yesNo, type Pick, type TemplateSheet } from '@/lib/reports/template/template-sheet';

/** Load cases, Node loads, Member loads, Settlements: what acts. */
export function loadSheets(pick: Pick): TemplateSheet[] {
  return [
    {
      name: 'Load cases',
      purpose: 'Unfactored cases. Factors stand in Combinations.',
      required: ['case'],
      columns: [
        column('case', 'Name of the case.'),
        column('kind', 'What acts.', {
          choices: one('dead', 'live', 'roof live', 'snow', 'wind', 'seismic', 'crane', 'temperature', 'other'),
        }),
        column('self weight', 'Factor on the steel’s own weight; 1 in one case of a combination.'),
        column('alternative', 'Cases with the same word never act together in generated combinations.'),
        column('reversible', 'yes = acts either way.', { choices: yesNo }),
        column('note', 'Anything.'),
        column('frame', 'Blank: every frame.'),
      ],
      rows: [
        ['dead', 'dead', 1, null, 'no', null, null],
        ['snow', 'snow', null, null, 'no', null, null],
        ['wind', 'wind', null, 'wind', 'no', null, null],
        ['settlement', 'other', null, null, 'no', 'Right-hand base goes down', 'F1'],
      ],
    },
    {
      name: 'Node loads',
      purpose: 'Forces and moments at nodes, along global X and Y; moments anticlockwise.',
      required: ['frame', 'case', 'node'],
      columns: [
        frame,
        loadCase,
        column('node', 'Where it acts.'),
        column('Fx', 'To the right.', { quantity: 'force' }),
        column('Fy', 'Upwards.', { quantity: 'force' }),
        column('Mz', 'Anticlockwise.', { quantity: 'moment' }),
      ],
      rows: [['F1', 'wind', 'B', pick(4, 1), null, null]],
    },
    {
      name: 'Member loads',
      purpose: 'Loads along members; from and to are distances from the member’s start.',
      required: ['frame', 'case', 'member', 'load'],
      columns: [
        frame,
        loadCase,
        column('member', 'Which member.'),
        column('load', 'What acts.', { choices: one('distributed', 'point', 'moment', 'temperature') }),
        column('axes', 'Blank: global.', { choices: one('global', 'local', 'projected') }),
        column('direction', 'Blank: y.', { choices: one('x', 'y') }),
        column('value', 'Line load, force or moment; downwards is negative. With a width: an area load.', {
          quantity: 'lineLoad',
        }),
        column('end value', 'At the end, where it differs.', { quantity: 'lineLoad' }),
        column('from', 'Blank: the start.', { quantity: 'length' }),
        column('to', 'Blank: the end.', { quantity: 'length' }),
        column('dT', 'Temperature change.', { quantity: 'temperature' }),
      ],
      rows: [
        ['F1', 'dead', 'BC', 'distributed', 'global', 'y', pick(-3, -0.2), null, null, null, null],
        ['F1', 'snow', 'BC', 'distributed', 'projected', 'y', pick(-4, -0.3), null, null, null, null],
        ['F1', 'wind', 'AB', 'distributed', 'local', 'y', pick(-2, -0.15), pick(-2.5, -0.17), null, null, null],
        ['F1', 'dead', 'BC', 'point', 'global', 'y', pick(-5, -1), null, pick(3, 10), null, null],
      ],
    },
    {
      name: 'Settlements',
      purpose: 'Movements of fixed supports, along the support’s own axes.',
      required: ['frame', 'case', 'node'],
      columns: [
        frame,
        loadCase,
        column('node', 'A node of Supports.'),
        column('dx', 'To the right.', { quantity: 'displacement' }),
        column('dy', 'Upwards; down is negative.', { quantity: 'displacement' }),
        column('rz', 'Anticlockwise.', { quantity: 'rotation' }),
      ],
      rows: [['F1', 'settlement', 'D', null, pick(-3, -0.125), null]],
    },
  ];
}
