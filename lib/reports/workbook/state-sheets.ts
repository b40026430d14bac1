/** Members by combination, Reactions and Displacements: the numbers of every case and combination. */
import { extremesOf } from '@/lib/results/extremes-of';
import { noCasesAlone } from '@/lib/results/state-facts';
import { cellOf, quantityColumn, text } from '@/lib/reports/workbook/report-sheet';
import type { ReportRow, ReportSheet } from '@/lib/reports/workbook/report-sheet';
import type { ReportSource } from '@/lib/reports/workbook/report-source';
import { rowsOfFrames } from '@/lib/reports/workbook/rows-of-frames';

export function membersByCombinationSheet(source: ReportSource): ReportSheet {
  const system = source.settings.units;
  const force = (heading: string) => quantityColumn(heading, 'force', system);
  const moment = (heading: string) => quantityColumn(heading, 'moment', system);
  const length = (heading: string) => quantityColumn(heading, 'length', system);
  return {
    name: 'Members by combination',
    columns: [
      text('frame'),
      text('member'),
      text('case or combination', 18),
      text('kind'),
      text('purpose'),
      force('N start'),
      force('V start'),
      moment('M start'),
      force('N end'),
      force('V end'),
      moment('M end'),
      force('N max'),
      length('N max at'),
      force('N min'),
      length('N min at'),
      force('V max'),
      length('V max at'),
      force('V min'),
      length('V min at'),
      moment('M max'),
      length('M max at'),
      moment('M min'),
      length('M min at'),
      quantityColumn('deflection', 'displacement', system),
      length('deflection at'),
    ],
    rows: () =>
      rowsOfFrames(source, { states: true, checks: false }, function* (each): Iterable<ReportRow> {
        const { frame, evaluation } = each;
        if (frame === null || evaluation === null) return;
        for (const state of evaluation.states) {
          for (const [index, member] of frame.members.entries()) {
            const ends = state.endForces;
            const { N, V, M, deflection } = extremesOf(frame, state, index);
            yield [
              each.id,
              member.id,
              state.name,
              state.kind,
              state.purpose,
              cellOf(ends[6 * index], 'force', system),
              cellOf(ends[6 * index + 1], 'force', system),
              cellOf(ends[6 * index + 2], 'moment', system),
              cellOf(ends[6 * index + 3], 'force', system),
              cellOf(ends[6 * index + 4], 'force', system),
              cellOf(ends[6 * index + 5], 'moment', system),
              cellOf(N.max, 'force', system),
              cellOf(N.maxAt, 'length', system),
              cellOf(N.min, 'force', system),
              cellOf(N.minAt, 'length', system),
              cellOf(V.max, 'force', system),
              cellOf(V.maxAt, 'length', system),
              cellOf(V.min, 'force', system),
              cellOf(V.minAt, 'length', system),
              cellOf(M.max, 'moment', system),
              cellOf(M.maxAt, 'length', system),
              cellOf(M.min, 'moment', system),
              cellOf(M.minAt, 'length', system),
              cellOf(deflection.value, 'displacement', system),
              cellOf(deflection.at, 'length', system),
            ];
          }
        }
      }),
  };
}

/** Unfactored cases first, then combinations (the order of a frame's states), with the load on the foundation beside. */
export function reactionsSheet(source: ReportSource): ReportSheet {
  const system = source.settings.units;
  return {
    name: 'Reactions',
    columns: [
      text('frame'),
      text('support'),
      text('case or combination', 18),
      text('kind'),
      quantityColumn('Fx on the frame', 'force', system),
      quantityColumn('Fy on the frame', 'force', system),
      quantityColumn('Mz on the frame', 'moment', system),
      quantityColumn('Fx on the foundation', 'force', system),
      quantityColumn('Fy on the foundation', 'force', system),
      quantityColumn('Mz on the foundation', 'moment', system),
    ],
    rows: () =>
      rowsOfFrames(source, { states: true, checks: false }, function* (each): Iterable<ReportRow> {
        const { frame, evaluation } = each;
        if (frame === null || evaluation === null) return;
        if (evaluation.status === 'solved' && noCasesAlone(frame) !== null)
          yield [
            each.id,
            null,
            'load cases alone',
            'not applicable: members are tension only',
            null,
            null,
            null,
            null,
            null,
            null,
          ];
        for (const state of evaluation.states) {
          for (const [index, support] of frame.supports.entries()) {
            const fx = cellOf(state.reactions[3 * index], 'force', system);
            const fy = cellOf(state.reactions[3 * index + 1], 'force', system);
            const mz = cellOf(state.reactions[3 * index + 2], 'moment', system);
            const reverse = (value: number | null): number | null => (value === null ? null : 0 - value);
            const node = frame.nodes[support.node]?.id ?? null;
            yield [each.id, node, state.name, state.kind === 'case' ? 'unfactored case' : 'combination', fx, fy, mz, reverse(fx), reverse(fy), reverse(mz)]; // prettier-ignore
          }
        }
      }),
  };
}

export function displacementsSheet(source: ReportSource): ReportSheet {
  const system = source.settings.units;
  return {
    name: 'Displacements',
    columns: [
      text('frame'),
      text('node'),
      text('place'),
      text('case or combination', 18),
      text('kind'),
      quantityColumn('ux', 'displacement', system),
      quantityColumn('uy', 'displacement', system),
      quantityColumn('rz', 'rotation', system),
    ],
    rows: () =>
      rowsOfFrames(source, { states: true, checks: false }, function* (each): Iterable<ReportRow> {
        const { frame, evaluation } = each;
        if (frame === null || evaluation === null) return;
        for (const state of evaluation.states) {
          for (const [index, node] of frame.nodes.entries()) {
            const { displacements: d } = state;
            yield [each.id, node.id, node.place, state.name, state.kind, cellOf(d[3 * index], 'displacement', system), cellOf(d[3 * index + 1], 'displacement', system), cellOf(d[3 * index + 2], 'rotation', system)]; // prettier-ignore
          }
        }
      }),
  };
}
