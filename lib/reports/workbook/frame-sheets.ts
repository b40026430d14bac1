/** Frames (one row each) and Flags (what is not plainly within, worst first). */
import { cellOf, quantityColumn, ratioColumn, text, verdictColumn, verdictOrder } from '@/lib/reports/workbook/report-sheet';
import type { ReportRow, ReportSheet } from '@/lib/reports/workbook/report-sheet';
import type { ReportFrame, ReportSource } from '@/lib/reports/workbook/report-source';
import { verdictOf } from '@/lib/reports/workbook/batch-facts';

const whyNot = (each: ReportFrame): string => {
  if (each.frame === null) return 'not analysed: errors in its sheets (see Problems)';
  if (each.evaluation === null) return 'not run';
  const reasons = each.evaluation.failure ? [each.evaluation.failure.message] : each.evaluation.notChecked;
  return reasons.join('; ');
};

/** Smallest α_cr of a frame's strength combinations. */
function smallestCriticalFactor(each: ReportFrame): number | null {
  const check = each.evaluation?.checks.find((row) => row.check === 'critical load factor');
  const value = check?.inputs['alpha_cr'];
  return typeof value === 'number' ? value : null;
}

export function framesSheet(source: ReportSource): ReportSheet {
  const system = source.settings.units;
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
      ratioColumn(),
      text('governs', 20),
      text('where'),
      text('combination'),
      ratioColumn('α cr'),
      quantityColumn('mass of one', 'mass', system),
      quantityColumn('mass of all', 'mass', system),
      text('not checked', 50),
      text('note', 20),
      { heading: 'residual', format: '0.0E+00', width: 10 },
      { heading: 'equilibrium', format: '0.0E+00', width: 10 },
      { heading: 'condition', format: '0.0E+00', width: 10 },
      { heading: 'digits', format: '0.0', width: 8 },
      { heading: 'second analysis', format: '0.0E+00', width: 14 },
    ],
    async *rows(): AsyncIterable<ReportRow> {
      for await (const each of source.frames({ states: false })) {
        const { evaluation } = each;
        const certificate = evaluation?.certificate ?? null;
        const mass = cellOf(evaluation?.mass, 'mass', system);
        yield [
          each.number,
          each.id,
          each.title,
          each.group,
          each.count,
          evaluation?.status ?? 'not solved',
          verdictOf(each),
          evaluation?.governing?.ratio ?? null,
          evaluation?.governing?.check ?? null,
          evaluation?.governing ? (evaluation.governing.subject ?? each.id) : null,
          evaluation?.governing?.combination ?? null,
          smallestCriticalFactor(each),
          mass,
          mass === null ? null : mass * each.count,
          whyNot(each),
          each.note,
          certificate?.residual ?? null,
          certificate?.equilibrium ?? null,
          certificate?.condition ?? null,
          certificate?.digits ?? null,
          certificate?.second ?? null,
        ];
      }
    },
  };
}

export function flagsSheet(source: ReportSource): ReportSheet {
  return {
    name: 'Flags',
    columns: [
      verdictColumn(),
      ratioColumn(),
      text('frame'),
      text('where'),
      text('check', 20),
      text('combination'),
      text('why', 60),
    ],
    async *rows(): AsyncIterable<ReportRow> {
      const flags: { order: number; ratio: number; number: number; row: ReportRow }[] = [];
      for await (const each of source.frames({ states: false })) {
        if (each.evaluation === null || each.evaluation.checks.length === 0) {
          if (verdictOf(each) !== 'within') flags.push({ order: verdictOrder[verdictOf(each)], ratio: 0, number: each.number, row: [verdictOf(each), null, each.id, each.id, '', '', whyNot(each)] }); // prettier-ignore
          continue;
        }
        for (const check of each.evaluation.checks) {
          if (check.verdict === 'within') continue;
          flags.push({
            order: verdictOrder[check.verdict],
            ratio: check.ratio ?? 0,
            number: each.number,
            row: [check.verdict, check.ratio, each.id, check.subject ?? each.id, check.check, check.combination, check.reason],
          });
        }
        for (const reason of each.frame?.notChecked ?? []) {
          flags.push({ order: verdictOrder['not checked'], ratio: 0, number: each.number, row: ['not checked', null, each.id, each.id, '', '', reason] }); // prettier-ignore
        }
      }
      flags.sort((a, b) => a.order - b.order || b.ratio - a.ratio || a.number - b.number);
      for (const flag of flags) yield flag.row;
    },
  };
}
