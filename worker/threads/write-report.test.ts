import { PassThrough, Writable } from 'node:stream';
import { buffer } from 'node:stream/consumers';
import { setTimeout as later } from 'node:timers/promises';
import { describe, expect, it } from 'vitest';
import { createAnalyser } from '@/lib/analysis/analyser';
import { engineVersion } from '@/lib/analysis/engine-version';
import type { PartOrigin } from '@/lib/intake/own/own-thing';
import type { Frame } from '@/lib/model/frame';
import { defaultSettings, type SettingOrigins, type Settings } from '@/lib/model/settings';
import { cautions } from '@/lib/reports/cautions';
import type { Problem } from '@/lib/problems/problem';
import type { IssueCover } from '@/lib/reports/issue-cover';
import { writeReport, type ReportAsked } from '@/lib/reports/pdf/write-report';
import type { ReportFrame, ReportSource } from '@/lib/reports/workbook/report-source';
import { cantileverFrame } from '@/lib/results/cantilever-frame';
import { evaluateFrame } from '@/lib/results/evaluate';
import { frameResultJson } from '@/lib/results/json';
import { formatRatio } from '@/lib/units/format';
import { reportFonts } from './report-fonts';
import { contentsPlaces, readPdf } from './read-pdf';

const settings: Settings = { ...defaultSettings, deflectionRatio: 200, stability: 'by others' };
const origins = Object.fromEntries(Object.keys(settings).map((name) => [name, { source: 'default', cell: null }])) as unknown as SettingOrigins; // prettier-ignore

const by = (name: string, at: string) => ({ name, at });
const cover: IssueCover = {
  number: 'P-2614-03',
  office: 'Alder & Rowe',
  project: 'Saltmere depots',
  projectNumber: '2614',
  batch: 'Sign arms',
  revision: 'C',
  prepared: by('Maren Ostrane', '2026-11-28T10:00:00Z'),
  checked: by('Tobias Quill', '2026-11-29T10:00:00Z'),
  approved: by('Ines Varga', '2026-11-30T10:00:00Z'),
  issued: { at: '2026-12-01T09:00:00Z', to: ['Harrow Fabrication'] },
  supersedes: 'P-2614-02',
  note: 'For fabrication of the arms only.',
  acceptances: [],
  notIssued: [],
};
const draft: IssueCover = { ...cover, number: null, checked: null, approved: null, issued: null, supersedes: null, note: null };

const analyser = createAnalyser();
/** The cantilever with a load at its tip, kN. */
const arm = (id: string, load: number, change: Partial<Frame> = {}): Frame =>
  cantileverFrame(id, { nodeLoads: [{ case: 1, node: 1, Fx_N: 0, Fy_N: -load * 1000, Mz_Nm: 0 }], ...change });

function reported(frame: Frame, number: number, of: Settings): ReportFrame {
  const { id, title, group, count, note } = frame;
  return {
    number,
    id,
    title,
    group,
    count,
    note,
    frame,
    evaluation: evaluateFrame(analyser, frame, of, { second: false, all: false }),
  };
}

function sourceOf(frames: readonly Frame[], more: Partial<Settings> = {}, extra: readonly ReportFrame[] = []): ReportSource {
  const all = { ...settings, ...more };
  const list = [...frames.map((frame, i) => reported(frame, i + 1, all)), ...extra];
  return {
    title: { project: null, batch: null, revision: null, state: null, prepared: null, checked: null, issued: null },
    engine: engineVersion,
    input: { name: 'arms.xlsx', sha256: 'ab12'.repeat(16), files: [{ name: 'arms.xlsx', sha256: 'ab12'.repeat(16), size: 9 }] },
    settings: all,
    origins,
    problems: [],
    inputRows: () => [],
    frames: () => list,
  };
}

async function made(asked: Partial<ReportAsked> & Pick<ReportAsked, 'source'>) {
  const sink = new PassThrough();
  const [bytes, told] = await Promise.all([
    buffer(sink),
    writeReport({ cover, frames: 'all', fonts: reportFonts(), ...asked }, sink),
  ]);
  return { bytes, told, ...(await readPdf(bytes)) };
}
const flat = (text: string) => text.replace(/\s+/g, ' ');

const three = [arm('F1', 1), arm('F2', 12), arm('F3', 300, { title: 'the heavy one' })];
const evaluations = sourceOf(three).frames({ states: true }) as readonly ReportFrame[];

describe('a calculation report', () => {
  it('names on its cover the issue, who answers for it and when, to whom it went, and what it takes the place of', async () => {
    const { pages, info } = await made({ source: sourceOf(three) });
    const first = flat(pages[0]!);
    for (const said of [
      'P-2614-03',
      'Alder & Rowe',
      '2614',
      'Saltmere depots',
      'Maren Ostrane',
      '28 November 2026',
      'Tobias Quill',
      'Ines Varga',
      '30 November 2026',
      '1 December 2026 to Harrow Fabrication',
      'issue P-2614-02',
      'For fabrication of the arms only.',
      'ab12'.repeat(16),
      'seal',
      'signature',
    ])
      // prettier-ignore
      expect(first).toContain(said);
    expect(info).toMatchObject({ Title: 'P-2614-03: Sign arms, calculation report', Author: 'Alder & Rowe', Language: 'en-GB' });
  });

  it('gives the cautions in full, and where each setting comes from', async () => {
    const text = flat((await made({ source: sourceOf(three) })).pages.join(' '));
    for (const caution of cautions) expect(text).toContain(caution);
    expect(text).toMatch(/deflection ratio L\/200 default, Setup is silent/);
  });

  it('says where sections and materials come from, and leaves it out of what an earlier version read', async () => {
    const part = { kind: 'section', origin: 'library', version: null, note: null, own: null, frames: 3 } as const;
    const parts: PartOrigin[] = [
      { ...part, name: 'IPE 300' },
      { ...part, name: 'PG 600', origin: 'office', version: 3, note: 'mill sheet 12', own: 'PG 600' },
      { ...part, kind: 'material', name: 'S355 plate', origin: 'sheet', note: 'Materials row 4' },
    ];
    const text = async (source: ReportSource) => flat((await made({ source })).pages.join(' '));
    const told = await text({ ...sourceOf(three), parts });
    expect(told).toMatch(
      /section IPE 300 standard 3 section PG 600 office v3 \(mill sheet 12\) 3 material S355 plate sheet \(Materials row 4\) 3/,
    );
    expect(await text(sourceOf(three))).not.toContain('Where sections and materials come from');
  });

  it('has for each frame its id with the governing ratio of the published results', async () => {
    const { pages, outline } = await made({ source: sourceOf(three) });
    for (const each of evaluations) {
      const ratio = formatRatio(frameResultJson(each.frame!, each.evaluation!).governing!.ratio, settings.nearLimit);
      const place = outline.at(-1)!.items.find(({ title }) => title === each.id)!.page;
      expect(flat(pages[place - 1]!)).toMatch(new RegExp(`^${each.id}.* ${each.evaluation!.verdict} ${ratio}`));
    }
  });

  it('numbers its pages, says on each how many there are, and has its contents lead where its bookmarks do', async () => {
    const { pages, outline, told, links } = await made({ source: sourceOf(three) });
    expect(told).toEqual({ pages: pages.length, frames: 3 });
    pages.forEach((text, i) => expect(flat(text)).toMatch(new RegExp(`Page ${i + 1} of ${pages.length} `)));
    expect(outline.map(({ title }) => title)).toEqual(['Cover', 'Contents', 'Cautions and basis', 'Summary', 'Flags', 'Frames of the batch', 'Criteria and parts', 'Calculations by frame']); // prettier-ignore
    const frames = outline.at(-1)!.items;
    expect(frames.map(({ title }) => title)).toEqual(['F1', 'F2', 'F3']);
    const listed = contentsPlaces(pages[1]!);
    expect(frames.map(({ page }) => page)).toEqual(['F1', 'F2', 'F3'].map((id) => listed.get(id)));
    expect(outline[1]!.page).toBe(2);
    expect(links).toEqual(expect.arrayContaining(frames.map(({ page }) => page)));
  });

  it('embeds every font that it uses', async () => {
    const text = (await made({ source: sourceOf(three) })).bytes.toString('latin1');
    const fonts = [...text.matchAll(/\/BaseFont \/(\S+)/g)].map(([, name]) => name);
    expect(fonts.length).toBeGreaterThan(4);
    expect(fonts.filter((name) => !/^[A-Z]{6}\+Fira/.test(name ?? ''))).toEqual([]);
    expect(text.match(/\/FontFile2 /g)!.length).toBe(new Set(fonts).size);
  });

  it('is the same bytes for the same input, with no date but those of its cover', async () => {
    const [first, again] = [await made({ source: sourceOf(three) }), await made({ source: sourceOf(three) })];
    expect(first.bytes.equals(again.bytes)).toBe(true);
    expect(first.info).toMatchObject({ CreationDate: 'D:20261201090000Z' });
    const nobody = await made({ source: sourceOf(three), cover: { ...draft, prepared: null } });
    expect(nobody.info).not.toHaveProperty('CreationDate');
  });

  it('says on each page of a draft that it is one, and on none of an issue', async () => {
    const pages = (await made({ source: sourceOf(three), cover: draft })).pages;
    for (const text of pages) expect(text).toContain('draft, not issued');
    expect(pages[0]).toContain('Draft, not issued');
    for (const text of (await made({ source: sourceOf(three) })).pages) {
      expect(text).not.toMatch(/draft/i);
      expect(text).toContain('P-2614-03');
    }
  });

  it('shows every check that is over, and beside it the reason with which it was accepted', async () => {
    const checks = evaluations[2]!.evaluation!.checks.filter(({ verdict }) => verdict === 'over');
    expect(checks.length).toBeGreaterThan(1);
    const [{ check, subject }] = checks as [(typeof checks)[number]];
    const reason = 'Tested at full size; report 41 is on file.';
    const acceptances = [
      { frame: 'F3', subject, check, verdict: 'over' as const, reason, by: by('Tobias Quill', '2026-11-29T10:00:00Z') },
    ];
    const { pages, outline } = await made({ source: sourceOf(three), cover: { ...cover, acceptances } });
    const flags = flat(pages[outline.find(({ title }) => title === 'Flags')!.page - 1]!);
    for (const each of checks) expect(flags).toContain(each.check);
    const words = `Accepted by Tobias Quill, 29 Nov 2026 for AB: ${reason}`;
    expect(flags).toContain(words);
    const own = flat(pages.slice(outline.at(-1)!.items[2]!.page - 1).join(' '));
    expect(own).toContain(words);
    expect(own).toContain('Over: not to be built from');
  });

  it('shows what is not checked with its reason, and never as a pass', async () => {
    const why = 'bolts are not in the sheets';
    const { pages, outline } = await made({ source: sourceOf([arm('F1', 1, { notChecked: [why] })]) });
    const at = (title: string) => flat(pages[outline.find((one) => one.title === title)!.page - 1]!);
    expect(at('Flags')).toContain(why);
    expect(at('Summary')).toContain('1 not checked.');
    expect(flat(pages[outline.at(-1)!.items[0]!.page - 1]!)).toMatch(new RegExp(`^F1 not checked .*Not checked: ${why}`));
  });

  it('draws loads, reactions and working in figures: a reaction is the load, a moment the load times the arm', async () => {
    // 12 kN at 3 m: M = 36 kN·m at the root (statics); self-weight is in C1 only
    const text = flat((await made({ source: sourceOf([arm('F2', 12)]) })).pages.join(' '));
    expect(text).toMatch(/S1 service 0 12\.0 36\.0/);
    expect(text).toContain('node B at a node Fy −12.0 kN');
    expect(text).toMatch(/AB, normal stress/);
    expect(text).toContain('The equations are met');
  });

  it('is on A4 for metric sheets and on Letter for US ones, unless told otherwise', async () => {
    expect((await made({ source: sourceOf([arm('F1', 1)]) })).sizes[0]).toEqual([595, 842]);
    expect((await made({ source: sourceOf([arm('F1', 1)], { units: 'us' }) })).sizes[0]).toEqual([612, 792]);
    expect((await made({ source: sourceOf([arm('F1', 1)]), paper: 'Letter' })).sizes[0]).toEqual([612, 792]);
  });
});

describe('a report of some frames', () => {
  it('calculates those over or not checked, and still sums up all', async () => {
    const { outline, told, pages } = await made({ source: sourceOf(three), frames: 'flagged' });
    expect(told.frames).toBe(1);
    expect(outline.at(-1)!.items.map(({ title }) => title)).toEqual(['F3']);
    expect(flat(pages[outline.find(({ title }) => title === 'Frames of the batch')!.page - 1]!)).toMatch(/F1.*F2.*F3/);
  });

  it('says so where none is flagged', async () => {
    const { told, pages, outline } = await made({ source: sourceOf([arm('F1', 1)]), frames: 'flagged' });
    expect(told.frames).toBe(0);
    expect(pages[0]).toContain('none is');
    expect(outline.some(({ title }) => title === 'Calculations by frame')).toBe(false);
  });

  it('is refused for an empty list, and for a frame that is not there', async () => {
    const asked = { source: sourceOf(three), cover, fonts: reportFonts() };
    await expect(writeReport({ ...asked, frames: [] }, new PassThrough())).rejects.toThrow('Expected at least one frame');
    await expect(writeReport({ ...asked, frames: [4] }, new PassThrough())).rejects.toThrow(
      'Expected a frame from 1 to 3, got 4',
    );
  });
});

describe('a report of what went wrong', () => {
  const free = arm('LOOSE', 1, { supports: [{ node: 0, ux: 'fixed', uy: 'fixed', rz: 'free', angle_rad: 0 }] });
  const stopped: ReportFrame = {
    number: 2,
    id: 'BAD',
    title: null,
    group: null,
    count: 1,
    note: null,
    frame: null,
    evaluation: null,
  };

  it('gives a frame without a solution its page with the reason, and names it as not issued', async () => {
    const message = 'Nodes, C4: y must be a number in m; found "4,O". Mend it there.';
    const slip: Problem = { severity: 'error', code: 'not-a-number', sheet: 'Nodes', file: null, row: 4, column: 'y', cell: 'C4', frames: ['BAD'], found: '4,O', message, stopsAll: false }; // prettier-ignore
    const source = { ...sourceOf([free], {}, [stopped]), problems: [slip] };
    const { pages, outline } = await made({ source, cover: draft });
    const [loose, bad] = outline.at(-1)!.items.map(({ page }) => flat(pages[page - 1]!));
    expect(loose).toMatch(/^LOOSE not checked .*Not solved: .*it is not issued/);
    expect(bad).toMatch(/^BAD not checked .*errors in its sheets stop it/);
    expect(bad).toContain(message);
    expect(loose).not.toContain(message);
    const flags = flat(pages[outline.find(({ title }) => title === 'Flags')!.page - 1]!);
    expect(flags).toMatch(/Frames not issued .*LOOSE .*BAD errors in its sheets stop it/);
  });

  it('sets hostile names without losing or crashing on any: very long ones, other scripts, faces, brackets', async () => {
    const long = `F-${'very-long-'.repeat(40)}end`;
    const odd = ['\u202eevil', 'إطار', '框架', '🏗️🔥', '(a)\\<b> %', '\u0000\ud800', 'e\u0301'.repeat(9)];
    const frames = [long, ...odd].map((id) => arm(id, 1, { title: `${id} titled`, note: 'x'.repeat(900) }));
    const { pages, outline } = await made({ source: sourceOf(frames), cover: { ...draft, project: 'P'.repeat(400), batch: 'wide '.repeat(90), note: '🏗️' } }); // prettier-ignore
    expect(outline.at(-1)!.items).toHaveLength(frames.length);
    expect(pages.join('').replace(/\s/g, '')).toContain(long);
    expect(pages.join('')).toContain('(a)\\<b> %');
  });

  it('goes on no faster than it is read: of a stopped reader’s batch only the frames at hand are fetched', async () => {
    const frames = Array.from({ length: 30 }, (_, i) => arm(`F${i}`, 1));
    const source = sourceOf(frames);
    let fetched = 0;
    const counting: ReportSource = {
      ...source,
      *frames(need) {
        for (const frame of source.frames(need) as readonly ReportFrame[]) {
          if (need.states) fetched++;
          yield frame;
        }
      },
    };
    const sink = new Writable({ highWaterMark: 1024, write: () => undefined });
    const writing = writeReport({ source: counting, cover, frames: 'all', fonts: reportFonts() }, sink).catch(
      (error: unknown) => error,
    );
    await later(1500);
    expect(fetched).toBeLessThan(5);
    sink.destroy();
    expect(await writing).toBeInstanceOf(Error);
  });
});
