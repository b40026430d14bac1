import { column, frame, one, orNumber, yesNo, type Pick, type TemplateSheet } from '@/lib/reports/template/template-sheet';

/** Sections, Materials, Supports: what members are made of and what holds them. */
export function partSheets(pick: Pick): TemplateSheet[] {
  return [
    {
      name: 'Sections',
      purpose: 'A designation of a standard range, or a shape with its dimensions, or properties.',
      required: ['section'],
      columns: [
        column('section', 'Name that Members use.'),
        column('designation', 'As the standard writes it.'),
        column('shape', 'With dimensions, where it is in no range.', { choices: one('I', 'channel', 'rhs', 'chs', 'bar') }),
        ...['h', 'b', 'tw', 'tf', 'r', 't', 'd'].map((each) =>
          column(each, 'Dimension of the shape.', { quantity: 'dimension' }),
        ),
        column('A', 'Area, where properties are given.', { quantity: 'area' }),
        column('I', 'Second moment of area of the bending.', { quantity: 'secondMoment' }),
        column('W', 'Section modulus, the same for both faces.', { quantity: 'modulus' }),
        column('material', 'Blank: that of the member, else of Setup.'),
        column(
          'published',
          'yes = properties beside a shape are published ones and used as given; what is not given follows from the dimensions.',
          { choices: yesNo },
        ),
        column('source', 'Where the figures come from, in your words; the results repeat it.'),
      ],
      rows: [
        ['post', pick('HE 200 B', 'W10X33')],
        ['beam', pick('IPE 300', 'W12X26')],
        [
          'tube',
          null,
          'rhs',
          pick(200, 8),
          pick(100, 4),
          null,
          null,
          null,
          pick(8, 0.25),
          ...Array<null>(6).fill(null),
          'maker’s drawing',
        ],
      ],
    },
    {
      name: 'Materials',
      purpose: 'A grade of a standard, or your own figures; figures override those of the grade one by one.',
      required: ['material', 'grade or E'],
      columns: [
        column('material', 'Name that Members, Sections and Setup use.'),
        column('grade', 'S235, S275, S355, A36, A992 …'),
        column('E', 'Elastic modulus.', { quantity: 'stress' }),
        column('fy', 'Yield strength.', { quantity: 'stress' }),
        column('density', 'For self-weight.', { quantity: 'density' }),
        column('expansion', 'For temperature.', { quantity: 'expansion' }),
        column(
          'fy by thickness',
          `In place of fy, thinnest first: ${pick('355 MPa to 16 mm; 345 MPa to 40 mm', '60 ksi to 1 in; 55 ksi to 2 in')}. Above the last no strength is known.`,
        ),
        column('source', 'Where the figures come from, in your words; the results repeat it.'),
      ],
      rows: [[pick('S355', 'A992'), pick('S355', 'A992'), null, null, null, null]],
    },
    {
      name: 'Supports',
      purpose: 'What holds each frame: fixed, free, or a number = spring stiffness.',
      required: ['frame', 'node'],
      columns: [
        frame,
        column('node', 'The node that is held.'),
        column('ux', 'fixed, free or a stiffness; blank = free.', {
          quantity: 'springTranslation',
          choices: orNumber('fixed', 'free'),
        }),
        column('uy', 'fixed, free or a stiffness; blank = free.', {
          quantity: 'springTranslation',
          choices: orNumber('fixed', 'free'),
        }),
        column('rz', 'fixed, free or a stiffness; blank = free.', {
          quantity: 'springRotation',
          choices: orNumber('fixed', 'free'),
        }),
        column('angle', 'Turns the support anticlockwise.', { quantity: 'angle' }),
      ],
      rows: [
        ['F1', 'A', 'fixed', 'fixed', 'fixed', null],
        ['F1', 'D', 'fixed', 'fixed', 'free', null],
      ],
    },
  ];
}
