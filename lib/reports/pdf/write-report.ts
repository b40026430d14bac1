/** The calculation report of a batch in PDF, written frame by frame into a stream. */
import type { Writable } from 'node:stream';
import type { IssueCover } from '@/lib/reports/issue-cover';
import type { ReportChoice } from '@/lib/reports/report-choice';
import type { ReportSource } from '@/lib/reports/workbook/report-source';
import { basisPages, partsPages } from './basis-pages';
import { drawContents, layOutContents, type Entry, type Place } from './contents-pages';
import { coverPage } from './cover-page';
import { shortDate } from './dates';
import { Flow } from './flow';
import { framePages } from './frame-pages';
import { PdfFile } from './pdf-file';
import { reportFacts, type FrameLine, type ReportFacts } from './report-facts';
import type { ReportFonts } from './report-fonts';
import { papers, type BlockFacts, type Paper } from './sheet';
import { flagPages, summaryPages } from './summary-pages';

export interface ReportAsked {
  readonly source: ReportSource;
  readonly cover: IssueCover;
  readonly frames: ReportChoice;
  readonly fonts: ReportFonts;
  /** Letter for US units, else A4, if not given. */
  readonly paper?: Paper;
}

/**
 * Writes the report at the pace of the stream, which it ends. The same input gives the same bytes: its only dates are the
 * cover's.
 *
 * @returns how many pages it has, and how many frames are calculated in it
 * @throws {RangeError} where a list of frames is empty, or names one that the batch doesn't have
 */
export async function writeReport(
  asked: ReportAsked,
  sink: Writable,
): Promise<{ readonly pages: number; readonly frames: number }> {
  const { source, fonts } = asked;
  const facts = await reportFacts(source);
  const chosen = chosenLines(asked.frames, facts);
  const cover = withNotIssued(asked.cover, facts);
  const paper = asked.paper ?? (source.settings.units === 'us' ? 'Letter' : 'A4');
  const file = new PdfFile(sink, fonts, fileFacts(asked, paper));
  const flow = new Flow(file, paper, blockFacts(source, cover));

  const entries = entriesOf(chosen);
  const layout = layOutContents(file, flow.zones, entries);
  const places = new Map<string, Place>();
  const part = (key: string, draw: () => void): void => {
    const before = file.pages;
    const number = before + 1 + layout.sheets;
    // of a page only where it is, or its content would be kept
    let first: Place['page'] | null = null;
    flow.onSheet = ({ place }) => (first ??= { place });
    draw();
    if (first) places.set(key, { page: first, number });
  };

  coverPage(flow, { source, cover, facts, chosen: chosenWords(asked.frames, chosen, facts) });
  flow.reserve(layout.sheets);
  const contents = flow.bookmark('Contents');
  part('basis', () => basisPages(flow, source, facts));
  part('summary', () => summaryPages(flow, source, facts));
  part('flags', () => flagPages(flow, source, facts, cover));
  part('parts', () => partsPages(flow, source, facts));
  await file.keepPace();
  const wanted = new Map(chosen.map((line) => [line.number, line]));
  if (wanted.size > 0) {
    const under = flow.bookmark('Calculations by frame');
    for await (const each of source.frames({ states: true })) {
      const line = wanted.get(each.number);
      if (!line) continue;
      part(keyOf(line), () => framePages(flow, { source, each, line, of: facts.frames.length, acceptances: cover.acceptances, shared: facts.shared, under })); // prettier-ignore
      if (line === chosen[0]) file.aim(under);
      await file.keepPace();
    }
  }
  flow.onSheet = null;
  drawContents(flow, layout, places, contents);
  await file.end({ face: file.faces.condensedMedium, size: 9 });
  return { pages: file.pages, frames: chosen.length };
}

/** @throws {RangeError} */
function chosenLines(choice: ReportChoice, { frames }: ReportFacts): readonly FrameLine[] {
  if (choice === 'all') return frames;
  if (choice === 'flagged') return frames.filter(({ verdict }) => verdict === 'over' || verdict === 'not checked');
  const wanted = new Set(choice);
  if (wanted.size === 0) throw new RangeError('Expected at least one frame to report on, got an empty list');
  for (const number of wanted)
    if (!frames.some((frame) => frame.number === number))
      throw new RangeError(`Expected a frame from 1 to ${frames.length}, got ${number}`);
  return frames.filter(({ number }) => wanted.has(number));
}

function chosenWords(choice: ReportChoice, chosen: readonly FrameLine[], { frames }: ReportFacts): string {
  const all = `${frames.length} ${frames.length === 1 ? 'frame' : 'frames'}`;
  if (choice === 'all') return `the calculations of all ${all}`;
  const count = chosen.length === 0 ? 'no calculation' : `the calculations of ${chosen.length} of ${all}`;
  if (choice === 'flagged')
    return `${count}: those over or not checked${chosen.length === 0 ? ', and none is' : ''}; the summary is of all`;
  return `${count}, as chosen; the summary is of all`;
}

/** A draft names them too. */
function withNotIssued(cover: IssueCover, { frames }: ReportFacts): IssueCover {
  if (cover.number !== null || cover.notIssued.length > 0) return cover;
  return {
    ...cover,
    notIssued: frames.flatMap(({ id, unsolved }) => (unsolved === null ? [] : [{ frame: id, reason: unsolved }])),
  };
}

const keyOf = ({ number }: FrameLine): string => `frame ${number}`;

function entriesOf(chosen: readonly FrameLine[]): Entry[] {
  const part = (key: string, text: string): Entry => ({ key, text, note: null, verdict: null });
  return [
    part('basis', 'Cautions, basis, settings and assumptions'),
    part('summary', 'Summary: strip, spread, what governs'),
    part('flags', 'Flags: over, not checked, accepted, not issued; every frame'),
    part('parts', 'Criteria and parts: load cases, combinations, limits, sections, materials'),
    ...chosen.map((line): Entry => ({ key: keyOf(line), text: line.id, note: line.title, verdict: line.verdict })),
  ];
}

function fileFacts({ source, cover }: ReportAsked, paper: Paper) {
  const made = cover.issued?.at ?? cover.approved?.at ?? cover.checked?.at ?? cover.prepared?.at ?? null;
  const date = made === null ? null : new Date(made);
  const name = source.settings.title ?? (cover.batch || source.input.name);
  return {
    title: `${cover.number ?? 'Draft'}: ${name}, calculation report`,
    author: cover.office,
    subject: [cover.projectNumber, cover.project, cover.batch, cover.revision && `revision ${cover.revision}`]
      .filter(Boolean)
      .join(', '),
    keywords: `input ${source.input.sha256}; engine ${source.engine}`,
    made: date !== null && Number.isFinite(date.getTime()) ? date : null,
    paper: papers[paper],
  };
}

function blockFacts(source: ReportSource, cover: IssueCover): BlockFacts {
  const signed = (one: { name: string; at: string } | null): string | null => one && `${one.name}, ${shortDate(one.at)}`;
  return {
    project: [cover.projectNumber, cover.project].filter(Boolean).join(' ') || '–',
    batch: cover.batch || source.input.name,
    revision: cover.revision || '–',
    state: source.title.state ?? (cover.number === null ? 'draft' : 'issued'),
    prepared: signed(cover.prepared),
    checked: signed(cover.checked),
    issued: cover.issued ? shortDate(cover.issued.at) : null,
    input: source.input.sha256.slice(0, 8),
    engine: source.engine.replace(/^tallyframe-/, ''),
    standing: cover.number === null ? { text: 'draft, not issued', colour: 'red' } : { text: cover.number, colour: 'ink' },
  };
}
