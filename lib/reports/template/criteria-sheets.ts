import { column, one, type Pick, type TemplateSheet } from '@/lib/reports/template/template-sheet';

/** Combinations, Limits: what is added up, and against what movements are held. */
export function criteriaSheets(pick: Pick): TemplateSheet[] {
  return [
    {
      name: 'Combinations',
      purpose: 'One row a term, or a column for each case. ±1 makes two combinations.',
      required: ['combination', 'purpose'],
      columns: [
        column('combination', 'Name of the combination.'),
        column('purpose', 'strength for the strength checks, service for movements.', { choices: one('strength', 'service') }),
        column('case', 'A load case.'),
        column('factor', 'What it is multiplied by.'),
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
        column('applies to', 'A role, group, member, span, node, place, or * for all.'),
        column('measure', 'What is limited.', { choices: one('deflection', 'sway', 'displacement', 'spread') }),
        column('direction', 'For displacement.', { choices: one('x', 'y', 'resultant') }),
        column('to node', 'The other node of a spread.'),
        column('ratio', 'n of L/n.'),
        column('absolute', 'The movement itself.', { quantity: 'displacement' }),
        column('combination', 'Blank: every service combination.'),
        column('frame', 'Blank: every frame.'),
      ],
      rows: [
        ['beam', 'deflection', null, null, 250, null, null, null],
        ['eaves', 'displacement', 'x', null, null, pick(30, 1.25), null, null],
      ],
    },
  ];
}
