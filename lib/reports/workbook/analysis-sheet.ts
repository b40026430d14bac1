/** How each state that is not of plain first order was found: direction, passes, slack members, imperfection forces. */
import { cellOf, text } from '@/lib/reports/workbook/report-sheet';
import type { ReportRow, ReportSheet } from '@/lib/reports/workbook/report-sheet';
import type { ReportSource } from '@/lib/reports/workbook/report-source';
import type { Frame } from '@/lib/model/frame';
import type { Settings } from '@/lib/model/settings';
import type { ResultState, StateMethod } from '@/lib/results/result';
import { initialSwayOf } from '@/lib/results/method-assumptions';
import { imperfectionForces, noCasesAlone, slackMembers } from '@/lib/results/state-facts';
import { unitLabel } from '@/lib/units/batch-unit';
import type { System } from '@/lib/units/quantity';

/** Whether states of these settings may be of anything but plain first order, tension-only members apart. */
export const beyondPlain = (settings: Settings): boolean =>
  settings.analysis === 'second order' ||
  settings.imperfections !== 'none' ||
  settings.stiffnessReduction !== 'none' ||
  settings.shearDeformation;

export function analysisSheet(source: ReportSource): ReportSheet {
  const system = source.settings.units;
  return {
    name: 'Analysis',
    columns: [
      text('frame'),
      text('case or combination', 18),
      text('purpose'),
      { heading: 'order', format: '0', width: 7 },
      text('imperfections lean', 12),
      { heading: 'initial sway φ', format: '0.00000', width: 10 },
      { heading: 'analysed under × loads', format: '0.0', width: 10 },
      { heading: 'passes', format: '0', width: 8 },
      { heading: 'change of the last pass', format: '0.0E+00', width: 12 },
      { heading: 'α cr', format: '0.000', width: 8 },
      text('slack members', 18),
      text(`imperfection forces [${unitLabel('force', system)}]`, 40),
      { heading: 'smallest factor on EI', format: '0.000', width: 10 },
      text('note', 50),
    ],
    async *rows(): AsyncIterable<ReportRow> {
      for await (const { id, frame, evaluation } of source.frames({ states: true, checks: false })) {
        if (frame === null || evaluation === null) continue;
        const none = noCasesAlone(frame);
        if (none !== null && evaluation.status === 'solved') {
          const [what = '', ...why] = none.split(': ');
          yield [id, what, ...Array<null>(11).fill(null), why.join(': ')];
        }
        for (const state of evaluation.states)
          if (state.method !== null)
            yield stateRow(
              id,
              frame,
              state,
              state.method,
              initialSwayOf(frame, source.settings, evaluation.states, state),
              system,
            );
      }
    },
  };
}

function stateRow(
  id: string,
  frame: Frame,
  state: ResultState,
  method: StateMethod,
  sway: number | null,
  system: System,
): ReportRow {
  const leans = { right: 'right →', left: 'left ←' } as const;
  const smallest = method.stiffness?.reduce((least, factor, i) => (i % 2 === 1 ? Math.min(least, factor) : least), 1) ?? null;
  return [
    id,
    state.name,
    state.purpose,
    state.order,
    method.imperfection && leans[method.imperfection],
    sway,
    method.loadScale === 1 ? null : method.loadScale,
    method.iterations,
    method.change,
    state.criticalLoadFactor,
    slackMembers(frame, state).join(', ') || null,
    forcesText(frame, state, system),
    smallest,
    null,
  ];
}

/** "Fx B 1.234, C 1.234, A −1.234; Fy …": forces at nodes that stand for imperfections. */
function forcesText(frame: Frame, state: ResultState, system: System): string | null {
  const forces = imperfectionForces(frame, state);
  const along = (direction: 'Fx' | 'Fy'): string[] => {
    const parts = forces.flatMap((force) => {
      const value = direction === 'Fx' ? force.Fx_N : force.Fy_N;
      const shown = Number((cellOf(value, 'force', system) ?? 0).toPrecision(4));
      return value === 0 ? [] : [`${force.node} ${String(shown).replace('-', '−')}`];
    });
    return parts.length > 0 ? [`${direction} ${parts.join(', ')}`] : [];
  };
  return [...along('Fx'), ...along('Fy')].join('; ') || null;
}
