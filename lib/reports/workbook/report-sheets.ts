/** The sheets of a result workbook, in their order (sheets §6). The CSV set is made of the same ones. */
import { analysisSheet, beyondPlain } from '@/lib/reports/workbook/analysis-sheet';
import { gatherFacts } from '@/lib/reports/workbook/batch-facts';
import { membersSheet, movementsSheet } from '@/lib/reports/workbook/check-sheets';
import { coverSheet } from '@/lib/reports/workbook/cover-sheet';
import { flagsSheet, framesSheet } from '@/lib/reports/workbook/frame-sheets';
import { inputSheet, problemsSheet } from '@/lib/reports/workbook/input-sheets';
import { combinationsSheet, limitsSheet, loadCasesSheet, loadTotalsSheet, sectionsSheet } from '@/lib/reports/workbook/model-sheets'; // prettier-ignore
import type { ReportSheet } from '@/lib/reports/workbook/report-sheet';
import type { ReportSource } from '@/lib/reports/workbook/report-source';
import { hasWorking, workingSheet } from '@/lib/reports/workbook/working-sheet';
import { displacementsSheet, membersByCombinationSheet, reactionsSheet } from '@/lib/reports/workbook/state-sheets';

export async function reportSheets(source: ReportSource): Promise<ReportSheet[]> {
  const facts = await gatherFacts(source);
  const system = source.settings.units;
  return [
    coverSheet(source, facts),
    framesSheet(facts, source.settings),
    flagsSheet(facts, source.settings, source.issue !== undefined),
    membersSheet(source),
    ...(hasWorking(source.settings) ? [workingSheet(source)] : []),
    membersByCombinationSheet(source),
    reactionsSheet(source),
    displacementsSheet(source),
    movementsSheet(source),
    ...(facts.tied || beyondPlain(source.settings) ? [analysisSheet(source)] : []),
    sectionsSheet(facts, system, source.parts),
    loadCasesSheet(facts),
    combinationsSheet(facts),
    limitsSheet(facts, system),
    loadTotalsSheet(facts, source),
    inputSheet(source),
    problemsSheet(source),
  ];
}
