import { criteriaSheets } from '@/lib/reports/template/criteria-sheets';
import { familySheets } from '@/lib/reports/template/family-sheets';
import { loadSheets } from '@/lib/reports/template/load-sheets';
import { modelSheets } from '@/lib/reports/template/model-sheets';
import { partSheets } from '@/lib/reports/template/part-sheets';
import { column, type Pick, type TemplateSheet } from '@/lib/reports/template/template-sheet';
import type { System } from '@/lib/units/quantity';

/** Every sheet of the contract with example rows that read without errors: one frame F1 and one portal P1 (sheets §3). */
export function templateSheets(system: System): readonly TemplateSheet[] {
  const pick: Pick = (metric, other) => (system === 'us' ? other : metric);
  return [
    setupSheet(system, pick),
    ...modelSheets(pick),
    ...partSheets(pick),
    ...loadSheets(pick),
    ...criteriaSheets(pick),
    ...familySheets(pick),
  ];
}

function setupSheet(system: System, pick: Pick): TemplateSheet {
  return {
    name: 'Setup',
    purpose:
      'How the whole batch is analysed and checked. A setting that is left out takes its default, which is shown with the results.',
    required: ['setting', 'value'],
    columns: [column('setting', 'Name of the setting.'), column('value', 'Its value.')],
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
  };
}
