/** The cover of an issue: its number, who signs it, to whom it goes, what was accepted and what is not issued. */
import type { IssueCover, Signature } from '@/lib/reports/issue-cover';
import type { ReportRow } from '@/lib/reports/workbook/report-sheet';

const signed = (by: Signature | null): string => (by ? `${by.name}, ${by.at.slice(0, 10)}` : 'not yet');

/** Rows of label and text; what was accepted stands with its reason. */
export function* issueRows(cover: IssueCover): Iterable<ReportRow> {
  yield ['issue', cover.number ?? 'draft, not issued'];
  if (cover.supersedes !== null) yield ['takes the place of', cover.supersedes];
  yield ['issued by', cover.office];
  yield ['project', cover.projectNumber ? `${cover.projectNumber} ${cover.project}` : cover.project];
  yield ['batch', cover.batch];
  yield ['revision', cover.revision];
  yield ['prepared', signed(cover.prepared)];
  yield ['checked', signed(cover.checked)];
  yield ['approved', signed(cover.approved)];
  yield ['issued', cover.issued ? cover.issued.at.slice(0, 10) : 'not yet'];
  yield* listed('issued to', cover.issued?.to ?? []);
  if (cover.note) yield ['note', cover.note];
  yield ['seal', 'room for a seal and a signature, where the law asks for them:'];
  for (let line = 0; line < 4; line++) yield [];
  yield* listed(
    'accepted',
    cover.acceptances.map(
      ({ frame, subject, check, verdict, reason, by }) =>
        `${[frame, subject === frame ? null : subject, check].filter(Boolean).join(', ')}: ${verdict}, accepted by ${by.name}, ${by.at.slice(0, 10)}: ${reason}`,
    ),
  );
  yield* listed(
    'not issued',
    cover.notIssued.map(({ frame, reason }) => `${frame}: ${reason}`),
  );
}

function* listed(label: string, lines: readonly string[]): Iterable<ReportRow> {
  for (const [index, line] of lines.entries()) yield [index === 0 ? label : '', line];
}
