import { column, one, orNumber, type Pick, type TemplateSheet } from '@/lib/reports/template/template-sheet';

/** Families, Variants: frames made from parameters. */
export function familySheets(pick: Pick): TemplateSheet[] {
  return [
    {
      name: 'Families',
      purpose:
        'Your own families of frames: parameters here, the frame itself once in Nodes, Members … with {expressions} in its cells.',
      required: ['family', 'parameter', 'quantity'],
      columns: [
        column('family', 'Name of the family; write it in the frame column of the other sheets.'),
        column('parameter', 'Name of a parameter, used in expressions like {span/2}.'),
        column('quantity', 'What it is.', {
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
        column('unit', 'Blank: the batch’s.'),
        column('default', 'Where a variant is silent.'),
        column('min', 'Least value.'),
        column('max', 'Greatest value.'),
        column('choices', 'Of a choice, parted by commas.'),
        column('note', 'Anything.'),
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
        column('frame', 'Name of the frame that this row makes.'),
        column('family', 'portal, bracket, or one of sheet Families.', { choices: orNumber('portal', 'bracket') }),
        column('span', 'Of the portal.', { quantity: 'length' }),
        column('eaves', 'Height of the eaves.', { quantity: 'length' }),
        column('rise', 'Apex above the eaves.', { quantity: 'length' }),
        column('spacing', 'Width that area loads act on.', { quantity: 'length' }),
        column('column', 'Section.'),
        column('rafter', 'Section.'),
        column('base', 'fixed or pinned.', { choices: one('fixed', 'pinned') }),
        column('dead', 'On the slope.', { quantity: 'areaLoad' }),
        column('snow', 'On plan.', { quantity: 'areaLoad' }),
        column('wind left wall', 'Pressing from outside.', { quantity: 'areaLoad' }),
        column('wind right wall', 'Pressing from outside.', { quantity: 'areaLoad' }),
        column('column restraint', 'Spacing of restraints.', { quantity: 'length' }),
        column('rafter restraint top', 'Spacing of restraints of the outer face.', { quantity: 'length' }),
        column('rafter restraint bottom', 'Spacing of restraints of the inner face.', { quantity: 'length' }),
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
