import { certificateLines } from '@/lib/analysis/certificate-lines';
import type { ReportSource } from '@/lib/reports/workbook/report-source';
import type { Certificate } from '@/lib/results/result';
import { powerText } from '@/lib/units/power-text';
import type { Flow } from './flow';
import { table } from './table';

/** What vouches for a frame's numbers, in words with figures. */
export function certificatePart(flow: Flow, certificate: Certificate | null, { engine }: ReportSource): void {
  if (certificate === null) return;
  flow.heading('Certificate', `how well the numbers hold; ${engine}`);
  table(
    flow,
    [
      { head: '' },
      { head: 'What it says', soft: true },
      { head: 'Figure', align: 'right' },
      { head: 'Bound' },
      { head: 'Outcome' },
    ],
    certificateLines(certificate).map(({ name, meaning, figure, bound, tolerance, outcome, reason }) => ({
      cells: [
        { text: name, face: 'condensedMedium' },
        reason === null ? meaning : `${meaning} Not made: ${reason}.`,
        figure === null ? '–' : bound === 'at least' ? figure.toFixed(1) : powerText(figure),
        `${bound} ${bound === 'at least' ? tolerance : powerText(tolerance)}`,
        { text: outcome, colour: outcome === 'outside' ? 'red' : 'ink' },
      ],
    })),
  );
}
