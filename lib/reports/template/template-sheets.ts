import type { SheetName } from '@/lib/intake/sheet-definitions';
import type { Quantity, System } from '@/lib/units/quantity';

export type Value = string | number | null;

export interface TemplateColumn {
  readonly heading: string;
  /** Its unit is written into the heading. */
  readonly quantity?: Quantity;
  readonly note: string;
  /** Offered as a drop-down. `only` false: other entries (numbers) are allowed too. */
  readonly choices?: { readonly words: readonly string[]; readonly only: boolean };
}

export interface TemplateSheet {
  readonly name: SheetName;
  /** What the sheet is for: the title row above its headings. */
  readonly purpose: string;
  readonly required: readonly string[];
  readonly columns: readonly TemplateColumn[];
  /** Example rows; one that begins with `#` is a comment. */
  readonly rows: readonly (readonly Value[])[];
}

const one = (...words: string[]): TemplateColumn['choices'] => ({ words, only: true });
const orNumber = (...words: string[]): TemplateColumn['choices'] => ({ words, only: false });
const c = (heading: string, note: string, more: Partial<TemplateColumn> = {}): TemplateColumn => ({ heading, note, ...more });
const frame = c('frame', 'Name of the frame; * means every frame of the batch that has what the row names.');
const loadCase = c('case', 'A load case of sheet Load cases.');
const yesNo = one('yes', 'no');

/** Every sheet of the contract with example rows that read without errors: one frame F1 and one portal P1 (sheets §3). */
export function templateSheets(system: System): readonly TemplateSheet[] {
  const us = system === 'us';
  const pick = <T>(metric: T, other: T): T => (us ? other : metric);
  const [minor, ltb] = ['length minor', 'length LTB'];
  return [
    {
      name: 'Setup',
      purpose:
        'How the whole batch is analysed and checked. A setting that is left out takes its default, which is shown with the results.',
      required: ['setting', 'value'],
      columns: [c('setting', 'Name of the setting.'), c('value', 'Its value.')],
      rows: [
        ['title', 'Example: a bent and a portal'],
        ['units', system],
        ['analysis', 'first order'],
        ['material', pick('S355', 'A992')],
        ['strength check', 'elastic stress'],
        ['stress factor', 0.6],
        ['near limit', 0.9],
        ['deflection ratio', 200],
        ['sway ratio', 150],
        ['stability', 'screened'],
        ['combination set', 'as listed'],
        ['imperfections', 'none'],
        ['stiffness reduction', 'none'],
        ['shear deformation', 'no'],
        ...(system === 'metric' ? [['gamma M0', 1], ['gamma M1', 1], ['national annex', null], ['interaction', 'Annex B']] : []), // prettier-ignore
        ['load height', 'shear centre'],
      ],
    },
    {
      name: 'Frames',
      purpose: 'Optional. Titles, number off, spacing and whether a frame is run.',
      required: ['frame'],
      columns: [
        frame,
        c('title', 'What it is, for the result sheets.'),
        c('group', 'A word to filter by.'),
        c('count', 'Number off, for mass totals.'),
        c('spacing', 'Width that area loads act on where a row gives none.', { quantity: 'length' }),
        c('run', 'no = left out.', { choices: yesNo }),
        c('note', 'Anything.'),
      ],
      rows: [
        ['F1', 'Bent at grid 1', 'bents', 2, pick(5, 16), 'yes', null],
        ['P1', 'Portal shed', 'sheds', 4, pick(6, 20), 'yes', null],
      ],
    },
    {
      name: 'Nodes',
      purpose: 'Points of each frame: X to the right, Y up.',
      required: ['frame', 'node', 'x', 'y'],
      columns: [
        frame,
        c('node', 'Name of the node, within its frame.'),
        c('x', 'To the right.', { quantity: 'length' }),
        c('y', 'Upwards.', { quantity: 'length' }),
        c('place', 'A name that Limits can use across frames: base, eaves, apex, tip …'),
      ],
      rows: [
        ['F1', 'A', 0, 0, 'base'],
        ['F1', 'B', 0, pick(4, 13), 'eaves'],
        ['F1', 'C', pick(6, 20), pick(4, 13), 'eaves'],
        ['F1', 'D', pick(6, 20), 0, 'base'],
      ],
    },
    {
      name: 'Members',
      purpose: 'Bars between nodes. Local x runs from start to end, local y stands 90° anticlockwise from it.',
      required: ['frame', 'member', 'start', 'end', 'section'],
      columns: [
        frame,
        c('member', 'Name of the member, within its frame.'),
        c('start', 'Node it begins at.'),
        c('end', 'Node it ends at.'),
        c('section', 'A section of sheet Sections, or a designation of a standard range.'),
        c('material', 'Blank: that of the section, else of Setup.'),
        c('role', 'Limits can name it.', {
          choices: one('beam', 'column', 'rafter', 'arm', 'cantilever', 'strut', 'tie', 'brace', 'other'),
        }),
        c('start joint', 'rigid, pin, or a rotational stiffness.', {
          quantity: 'springRotation',
          choices: orNumber('rigid', 'pin'),
        }),
        c('end joint', 'rigid, pin, or a rotational stiffness.', {
          quantity: 'springRotation',
          choices: orNumber('rigid', 'pin'),
        }),
        c('axial only', 'yes = pinned at both ends.', { choices: yesNo }),
        c(
          'tension only',
          'yes = pinned at both ends, and slack where it would be pressed. Load cases alone then have no results.',
          {
            choices: yesNo,
          },
        ),
        c('turned', 'yes = section turned 90°: bending is about its minor axis.', { choices: yesNo }),
        c('span', 'Members with the same word form one physical member.'),
        c('length major', 'Buckling length about the major axis. Blank: length of the span.', { quantity: 'length' }),
        c(minor, 'Buckling length about the minor axis. Blank: length of the span.', { quantity: 'length' }),
        c(
          ltb,
          'Between restraints of the face in compression, counted from the start of the span; what is left over is at its end. Blank: length of the span.',
          { quantity: 'length' },
        ),
        c('group', 'A word to filter by and to set limits by.'),
      ],
      rows: [
        [
          'F1',
          'AB',
          'A',
          'B',
          'post',
          null,
          'column',
          'rigid',
          'rigid',
          'no',
          'no',
          'no',
          null,
          null,
          pick(2, 6.5),
          pick(2, 6.5),
          null,
        ],
        [
          'F1',
          'BC',
          'B',
          'C',
          'beam',
          null,
          'beam',
          'rigid',
          'rigid',
          'no',
          'no',
          'no',
          null,
          null,
          pick(1.5, 5),
          pick(1.5, 5),
          null,
        ],
        [
          'F1',
          'CD',
          'C',
          'D',
          'post',
          null,
          'column',
          'rigid',
          'rigid',
          'no',
          'no',
          'no',
          null,
          null,
          pick(2, 6.5),
          pick(2, 6.5),
          null,
        ],
      ],
    },
    {
      name: 'Sections',
      purpose: 'A designation of a standard range, or a shape with its dimensions, or properties.',
      required: ['section'],
      columns: [
        c('section', 'Name that Members use.'),
        c('designation', 'As the standard writes it.'),
        c('shape', 'With dimensions, where it is in no range.', { choices: one('I', 'channel', 'rhs', 'chs', 'bar') }),
        ...['h', 'b', 'tw', 'tf', 'r', 't', 'd'].map((each) => c(each, 'Dimension of the shape.', { quantity: 'dimension' })),
        c('material', 'Blank: that of the member, else of Setup.'),
      ],
      rows: [
        ['post', pick('HE 200 B', 'W10X33'), ...Array<null>(9).fill(null)],
        ['beam', pick('IPE 300', 'W12X26'), ...Array<null>(9).fill(null)],
        pick(
          ['tube', null, 'rhs', 200, 100, null, null, null, 8, null, null],
          ['tube', null, 'rhs', 8, 4, null, null, null, 0.25, null, null],
        ),
      ],
    },
    {
      name: 'Materials',
      purpose: 'A grade of a standard, or your own figures; figures override those of the grade one by one.',
      required: ['material', 'grade or E'],
      columns: [
        c('material', 'Name that Members, Sections and Setup use.'),
        c('grade', 'S235, S275, S355, A36, A992 …'),
        c('E', 'Elastic modulus.', { quantity: 'stress' }),
        c('fy', 'Yield strength.', { quantity: 'stress' }),
        c('density', 'For self-weight.', { quantity: 'density' }),
        c('expansion', 'For temperature.', { quantity: 'expansion' }),
      ],
      rows: [[pick('S355', 'A992'), pick('S355', 'A992'), null, null, null, null]],
    },
    {
      name: 'Supports',
      purpose: 'What holds each frame: fixed, free, or a number = spring stiffness.',
      required: ['frame', 'node'],
      columns: [
        frame,
        c('node', 'The node that is held.'),
        c('ux', 'fixed, free or a stiffness; blank = free.', {
          quantity: 'springTranslation',
          choices: orNumber('fixed', 'free'),
        }),
        c('uy', 'fixed, free or a stiffness; blank = free.', {
          quantity: 'springTranslation',
          choices: orNumber('fixed', 'free'),
        }),
        c('rz', 'fixed, free or a stiffness; blank = free.', { quantity: 'springRotation', choices: orNumber('fixed', 'free') }),
        c('angle', 'Turns the support anticlockwise.', { quantity: 'angle' }),
      ],
      rows: [
        ['F1', 'A', 'fixed', 'fixed', 'fixed', null],
        ['F1', 'D', 'fixed', 'fixed', 'free', null],
      ],
    },
    {
      name: 'Load cases',
      purpose: 'Unfactored cases. Factors stand in Combinations.',
      required: ['case'],
      columns: [
        c('case', 'Name of the case.'),
        c('kind', 'What acts.', {
          choices: one('dead', 'live', 'roof live', 'snow', 'wind', 'seismic', 'crane', 'temperature', 'other'),
        }),
        c('self weight', 'Factor on the steel’s own weight; 1 in one case of a combination.'),
        c('alternative', 'Cases with the same word never act together in generated combinations.'),
        c('reversible', 'yes = acts either way.', { choices: yesNo }),
        c('note', 'Anything.'),
        c('frame', 'Blank: every frame.'),
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
        c('node', 'Where it acts.'),
        c('Fx', 'To the right.', { quantity: 'force' }),
        c('Fy', 'Upwards.', { quantity: 'force' }),
        c('Mz', 'Anticlockwise.', { quantity: 'moment' }),
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
        c('member', 'Which member.'),
        c('load', 'What acts.', { choices: one('distributed', 'point', 'moment', 'temperature') }),
        c('axes', 'Blank: global.', { choices: one('global', 'local', 'projected') }),
        c('direction', 'Blank: y.', { choices: one('x', 'y') }),
        c('value', 'Line load, force or moment; downwards is negative. With a width: an area load.', { quantity: 'lineLoad' }),
        c('end value', 'At the end, where it differs.', { quantity: 'lineLoad' }),
        c('from', 'Blank: the start.', { quantity: 'length' }),
        c('to', 'Blank: the end.', { quantity: 'length' }),
        c('dT', 'Temperature change.', { quantity: 'temperature' }),
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
        c('node', 'A node of Supports.'),
        c('dx', 'To the right.', { quantity: 'displacement' }),
        c('dy', 'Upwards; down is negative.', { quantity: 'displacement' }),
        c('rz', 'Anticlockwise.', { quantity: 'rotation' }),
      ],
      rows: [['F1', 'settlement', 'D', null, pick(-3, -0.125), null]],
    },
    {
      name: 'Combinations',
      purpose: 'One row a term, or a column for each case. ±1 makes two combinations.',
      required: ['combination', 'purpose'],
      columns: [
        c('combination', 'Name of the combination.'),
        c('purpose', 'strength for the strength checks, service for movements.', { choices: one('strength', 'service') }),
        c('case', 'A load case.'),
        c('factor', 'What it is multiplied by.'),
      ],
      rows: [
        ['C1', 'strength', 'dead', 1],
        ['C1', 'strength', 'snow', 1],
        ['C2', 'strength', 'dead', 1],
        ['C2', 'strength', 'wind', '±1'],
        ['S1', 'service', 'dead', 1],
        ['S1', 'service', 'snow', 1],
        ['S2', 'service', 'dead', 1],
        ['S2', 'service', 'wind', '±1'],
      ],
    },
    {
      name: 'Limits',
      purpose: 'Limits on movement. Those named here go before the ratios of Setup.',
      required: ['applies to', 'measure'],
      columns: [
        c('applies to', 'A role, group, member, span, node, place, or * for all.'),
        c('measure', 'What is limited.', { choices: one('deflection', 'sway', 'displacement', 'spread') }),
        c('direction', 'For displacement.', { choices: one('x', 'y', 'resultant') }),
        c('to node', 'The other node of a spread.'),
        c('ratio', 'n of L/n.'),
        c('absolute', 'The movement itself.', { quantity: 'displacement' }),
        c('combination', 'Blank: every service combination.'),
        c('frame', 'Blank: every frame.'),
      ],
      rows: [
        ['beam', 'deflection', null, null, 250, null, null, null],
        ['eaves', 'displacement', 'x', null, null, pick(30, 1.25), null, null],
      ],
    },
    {
      name: 'Families',
      purpose:
        'Your own families of frames: parameters here, the frame itself once in Nodes, Members … with {expressions} in its cells.',
      required: ['family', 'parameter', 'quantity'],
      columns: [
        c('family', 'Name of the family; write it in the frame column of the other sheets.'),
        c('parameter', 'Name of a parameter, used in expressions like {span/2}.'),
        c('quantity', 'What it is.', {
          choices: one(
            'length',
            'angle',
            'force',
            'moment',
            'line load',
            'area load',
            'translation stiffness',
            'rotation stiffness',
            'temperature',
            'number',
            'section',
            'material',
            'choice',
          ),
        }),
        c('unit', 'Blank: the batch’s.'),
        c('default', 'Where a variant is silent.'),
        c('min', 'Least value.'),
        c('max', 'Greatest value.'),
        c('choices', 'Of a choice, parted by commas.'),
        c('note', 'Anything.'),
      ],
      rows: [
        [
          '# canopy',
          'reach',
          'length',
          pick('m', 'ft'),
          pick(2, 6),
          pick(0.5, 2),
          pick(5, 16),
          null,
          'A row that begins with # is not read.',
        ],
      ],
    },
    {
      name: 'Variants',
      purpose: 'One row a frame of a family, a column a parameter. The families portal and bracket are built in.',
      required: ['frame', 'family'],
      columns: [
        c('frame', 'Name of the frame that this row makes.'),
        c('family', 'portal, bracket, or one of sheet Families.', { choices: orNumber('portal', 'bracket') }),
        c('span', 'Of the portal.', { quantity: 'length' }),
        c('eaves', 'Height of the eaves.', { quantity: 'length' }),
        c('rise', 'Apex above the eaves.', { quantity: 'length' }),
        c('spacing', 'Width that area loads act on.', { quantity: 'length' }),
        c('column', 'Section.'),
        c('rafter', 'Section.'),
        c('base', 'fixed or pinned.', { choices: one('fixed', 'pinned') }),
        c('dead', 'On the slope.', { quantity: 'areaLoad' }),
        c('snow', 'On plan.', { quantity: 'areaLoad' }),
        c('wind left wall', 'Pressing from outside.', { quantity: 'areaLoad' }),
        c('wind right wall', 'Pressing from outside.', { quantity: 'areaLoad' }),
        c('column restraint', 'Spacing of restraints.', { quantity: 'length' }),
        c('rafter restraint top', 'Spacing of restraints of the outer face.', { quantity: 'length' }),
        c('rafter restraint bottom', 'Spacing of restraints of the inner face.', { quantity: 'length' }),
      ],
      rows: [
        pick(
          ['P1', 'portal', 18, 5, 2, 6, 'HE 300 B', 'IPE 400', 'pinned', 0.3, 0.6, 0.5, -0.3, 1.5, 1.5, 3],
          ['P1', 'portal', 60, 16, 6, 20, 'W12X58', 'W16X40', 'pinned', 6, 20, 12, -8, 5, 5, 10],
        ),
      ],
    },
  ];
}
