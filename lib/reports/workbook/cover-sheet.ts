/** The first sheet: what was analysed, by what, under which assumptions, and what must not be concluded from it. */
import { settingText } from '@/lib/changes/setting-text';
import { originOfPart } from '@/lib/intake/own/own-thing';
import { settingWords, statedSettings } from '@/lib/model/settings';
import { cautions, checkedWords } from '@/lib/reports/cautions';
import { methodWords } from '@/lib/reports/method-words';
import { issueRows } from '@/lib/reports/workbook/issue-rows';
import type { ReportRow, ReportSheet } from '@/lib/reports/workbook/report-sheet';
import type { ReportSource } from '@/lib/reports/workbook/report-source';
import type { BatchFacts } from '@/lib/reports/workbook/batch-facts';

const sign = [
  'Global X right, Y up, rotations and moments anticlockwise. Local x from start to end; local y is 90° anticlockwise from it:',
  '        y (top)',
  '        ↑',
  '  start ●────────→ x   end ●',
  '        bottom',
  'N: tension positive. M: positive with tension on the bottom (local −y) face. V = dM/dx.',
  'Reactions are what the support does to the frame; the load on the foundation is the reverse.',
];

const originWords = { sheet: 'Setup', office: "the office's own", default: 'default, the sheet is silent' };

/** Of a revision that is not issued: what there is of it so far. */
function* draftRows({ title }: ReportSource): Iterable<ReportRow> {
  yield ['project', title.project ?? ''];
  yield ['batch', title.batch ?? ''];
  yield ['revision', title.revision ?? ''];
  yield ['state', title.state ?? ''];
  yield ['prepared', title.prepared ?? ''];
  yield ['checked', title.checked ?? 'not yet'];
  yield ['issued', title.issued ?? 'not yet'];
}

function* rows(source: ReportSource, facts: BatchFacts): Iterable<ReportRow> {
  const { title, input, settings } = source;
  yield [settings.title ?? title.batch ?? input.name];
  yield [];
  if (source.issue) yield* issueRows(source.issue);
  else yield* draftRows(source);
  for (const [index, line] of (title.madeBy ?? []).entries()) yield [index === 0 ? 'made by a change' : '', line];
  yield ['input', input.name];
  yield ['input SHA-256', input.sha256];
  for (const file of input.files.length > 1 ? input.files : []) yield ['', `${file.name}: ${file.sha256}`];
  yield ['engine', source.engine];
  yield [
    'units',
    settings.units === 'metric' ? 'metric: m, mm, kN, kN·m, MPa, kg' : 'US customary: ft, in, kip, kip·ft, ksi, lb',
  ];
  yield [];
  yield [
    'frames',
    `${facts.frames} in all: ${facts.over} over, ${facts.notChecked} not checked, ${facts.near} near, ${facts.within} within`,
  ];
  if (facts.notSolved > 0)
    yield ['', `${facts.notSolved} of the frames not checked have no solution or were stopped by errors in the sheets`];
  const [analysed = '', ...further] = methodWords(settings);
  yield ['analysed', analysed];
  for (const line of further) yield ['', line];
  if (facts.tied) yield ['', 'tension-only members: which are slack is settled combination by combination (sheet Analysis)'];
  const words = checkedWords(settings);
  yield ['checked', words.checked];
  yield ['not checked', words.notChecked];
  yield [];
  yield ['signs', sign[0] ?? ''];
  for (const line of sign.slice(1)) yield ['', line];
  yield [];
  yield ['settings', '', 'given by'];
  for (const name of statedSettings(settings, source.origins)) {
    const value = settings[name];
    const origin = source.origins[name];
    yield [
      settingWords[name],
      value === null || typeof value === 'boolean' ? (settingText(name, settings) ?? 'none given') : value,
      origin.changedBy ? `changed on screen by ${origin.changedBy}` : (origin.cell ?? originWords[origin.source]),
    ];
  }
  const own = (source.parts ?? []).filter(({ origin }) => origin === 'office');
  for (const [index, part] of own.entries()) {
    if (index === 0) yield [];
    const named = part.own === null || part.own === part.name ? part.name : `${part.name} (${part.own})`;
    const frames = `in ${part.frames} ${part.frames === 1 ? 'frame' : 'frames'}`;
    yield [index === 0 ? 'the office’s own' : '', `${part.kind} ${named}, ${frames}`, originOfPart(part)];
  }
  if (facts.assumptions.length > 0) {
    yield [];
    yield ['assumptions', facts.assumptions[0] ?? ''];
    for (const line of facts.assumptions.slice(1)) yield ['', line];
  }
  yield [];
  yield ['cautions', cautions[0] ?? ''];
  for (const line of cautions.slice(1)) yield ['', line];
}

export function coverSheet(source: ReportSource, facts: BatchFacts): ReportSheet {
  return { name: 'Cover', columns: [], boldFirst: true, rows: () => rows(source, facts) };
}
