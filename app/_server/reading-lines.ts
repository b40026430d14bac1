import 'server-only';
import type { DefaultLine, ProblemLine, SheetLine } from '@/components/intake/intake-data';
import { settingText } from '@/lib/changes/setting-text';
import type { SheetRead } from '@/lib/intake/intake';
import { settingWords, statedSettings, type SettingOrigins, type Settings } from '@/lib/model/settings';
import type { Problem, Severity } from '@/lib/problems/problem';

/** Frames named at one problem; the rest are counted. */
const mostFrames = 20;
const rank: Readonly<Record<Severity, number>> = { error: 0, warning: 1, note: 2 };

/** Problems as the page lists them: errors first, then in the order of the sheets; at most `most`. */
export function problemLines(problems: readonly Problem[], most: number): ProblemLine[] {
  return problems
    .map((problem, index) => ({ problem, index }))
    .sort((a, b) => rank[a.problem.severity] - rank[b.problem.severity] || a.index - b.index)
    .slice(0, most)
    .map(({ problem, index }) => ({
      id: String(index),
      severity: problem.severity,
      code: problem.code,
      sheet: problem.sheet,
      file: problem.file,
      cell: problem.cell ?? (problem.row === null ? null : `row ${problem.row}`),
      found: problem.found,
      message: problem.message,
      frames: problem.frames.slice(0, mostFrames),
      frameCount: problem.frames.length,
      stopsAll: problem.stopsAll,
    }));
}

/** Each sheet as it was read, with the problems at its cells. */
export function sheetLines(sheets: readonly SheetRead[], problems: readonly Problem[]): SheetLine[] {
  const several = new Set(sheets.map((sheet) => sheet.file)).size > 1;
  return sheets.map(({ name, file, known, rows, headings }) => {
    const own = problems.filter(
      (problem) => problem.sheet === name && (!several || problem.file === null || problem.file === file),
    );
    // Parameters of a family and load cases head columns of their own.
    const ownNames = known !== null && /^(variants|combinations)$/i.test(known);
    const count = (severity: Severity) => own.filter((problem) => problem.severity === severity).length;
    return {
      name,
      file,
      known,
      rows,
      headings: headings.length,
      headingsKnown: headings.filter(({ known: as, cell }) => as !== null || (ownNames && !own.some((one) => one.cell === cell)))
        .length,
      errors: count('error'),
      warnings: count('warning'),
      notes: count('note'),
    };
  });
}

/** What the Setup sheet is silent about, and what was taken. */
export function defaultLines(settings: Settings, origins: SettingOrigins): DefaultLine[] {
  return statedSettings(settings, origins).flatMap((name) => {
    const { source } = origins[name];
    const value = settingText(name, settings);
    return source === 'sheet' || value === null ? [] : [{ setting: settingWords[name], value, source }];
  });
}

/** "saltmere_frames.xlsx, 1.9 MB, 10 sheets" */
export function readSummary(files: readonly { readonly name: string; readonly size: number }[], sheets: number): string {
  const size = files.reduce((sum, file) => sum + file.size, 0);
  const name = files.length === 1 ? (files[0]?.name ?? '') : `${files.length} files`;
  const weight = size >= 1e6 ? `${(size / 1e6).toFixed(1)} MB` : `${Math.max(1, Math.round(size / 1e3))} kB`;
  return sheets === 0 ? `${name}, ${weight}` : `${name}, ${weight}, ${sheets} ${sheets === 1 ? 'sheet' : 'sheets'}`;
}
