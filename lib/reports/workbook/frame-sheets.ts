/** Frames (one row each) and Flags (what is not plainly within, worst first). */
import { quantityColumn, ratioColumn, text, verdictColumn, type ReportSheet } from '@/lib/reports/workbook/report-sheet';
import type { BatchFacts } from '@/lib/reports/workbook/batch-facts';
import type { Settings } from '@/lib/model/settings';

const power = '0.0E+00';

export function framesSheet(facts: BatchFacts, settings: Settings): ReportSheet {
  const system = settings.units;
  return {
    name: 'Frames',
    columns: [
      { heading: 'number', format: '0', width: 8 },
      text('frame'),
      text('title', 20),
      text('group'),
      { heading: 'number off', format: '0', width: 10 },
      text('status'),
      verdictColumn(),
      ratioColumn(settings.nearLimit),
      text('governs', 20),
      text('where'),
      text('combination'),
      { heading: 'α cr', format: '0.000', width: 8 },
      quantityColumn('mass of one', 'mass', system),
      quantityColumn('mass of all', 'mass', system),
      text('not checked', 50),
      text('note', 20),
      { heading: 'residual', format: power, width: 10 },
      { heading: 'equilibrium', format: power, width: 10 },
      { heading: 'condition', format: power, width: 10 },
      { heading: 'digits', format: '0.0', width: 8 },
      { heading: 'second analysis', format: power, width: 14 },
    ],
    rows: () => facts.frameRows,
  };
}

export function flagsSheet(facts: BatchFacts, settings: Settings, issued: boolean): ReportSheet {
  return {
    name: 'Flags',
    columns: [
      verdictColumn(),
      ratioColumn(settings.nearLimit),
      text('frame'),
      text('where'),
      text('check', 20),
      text('combination'),
      text('why', 60),
      ...(issued ? [text('accepted', 60)] : []),
    ],
    rows: () => facts.flagRows,
  };
}
