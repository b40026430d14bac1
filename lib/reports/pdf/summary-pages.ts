/** The batch at a glance: strip, spread, what governs; then every flag with its reason, and every frame's line. */
import { wholeFrameCheck } from '@/lib/reports/accepted-words';
import type { Acceptance, IssueCover } from '@/lib/reports/issue-cover';
import type { ReportSource } from '@/lib/reports/workbook/report-source';
import { unitLabel } from '@/lib/units/batch-unit';
import { formatNumber, formatQuantity, formatRatio } from '@/lib/units/format';
import { shortDate } from './dates';
import type { Flow } from './flow';
import { verdictInk } from './ink';
import type { Flag, ReportFacts } from './report-facts';
import { spreadChart } from './spread-drawing';
import { strip } from './strip-drawing';
import { table, type Column, type Row } from './table';

const verdicts = ['over', 'near', 'within', 'not checked'] as const;

export function summaryPages(flow: Flow, source: ReportSource, facts: ReportFacts): void {
  const { frames, counts } = facts;
  const { nearLimit } = source.settings;
  flow.part({ title: 'Summary', note: `${frames.length} ${frames.length === 1 ? 'frame' : 'frames'} in sheet order` });
  flow.bookmark('Summary');
  flow.paragraph(tallyWords(counts), { face: 'sansBold', size: 10 });
  flow.space(4);
  strip(flow, frames);
  const spread = frames.flatMap(({ ratio, verdict }) => (ratio === null || !Number.isFinite(ratio) ? [] : [{ ratio, verdict }]));
  if (spread.length > 0) {
    flow.heading('Spread of governing ratios', 'frames in steps of 0.025');
    spreadChart(flow, spread, nearLimit, 130);
  }
  const governs = [...facts.governs].map(([check, of]) => ({
    check,
    of,
    all: verdicts.reduce((sum, verdict) => sum + of[verdict], 0),
  }));
  if (governs.length > 0) {
    flow.heading('What governs', 'frames by the check that is nearest its limit');
    table(
      flow,
      [
        { head: 'Check', soft: true },
        { head: 'Frames', align: 'right' },
        ...verdicts.map((head): Column => ({ head, align: 'right' })),
      ],
      governs
        .sort((a, b) => b.all - a.all)
        .map(({ check, of, all }) => ({
          cells: [check, String(all), ...verdicts.map((verdict) => ({ text: String(of[verdict]), colour: verdict === 'over' && of.over > 0 ? ('red' as const) : of[verdict] === 0 ? ('ink3' as const) : ('ink' as const) }))],
        })), // prettier-ignore
    );
  }
}

/** "3 over, 4 near …": all that aren't none. */
function tallyWords(counts: ReportFacts['counts']): string {
  const told = verdicts.flatMap((verdict) => (counts[verdict] === 0 ? [] : [`${counts[verdict]} ${verdict}`]));
  return told.length === 0 ? 'No frame' : `${told.join(', ')}.`;
}

export function flagPages(flow: Flow, source: ReportSource, facts: ReportFacts, cover: IssueCover): void {
  const { nearLimit, units } = source.settings;
  const over = facts.flags.filter((flag) => flag.verdict === 'over');
  const unchecked = facts.flags.filter((flag) => flag.verdict === 'not checked');
  flow.part({ title: 'Flags', note: 'every check that is over or not checked' });
  flow.bookmark('Flags');
  flow.heading('Over', over.length === 0 ? 'none' : `${over.length}, highest first; not to be built from unless accepted`);
  table(
    flow,
    [
      { head: 'Frame', face: 'condensedMedium' },
      { head: 'Where' },
      { head: 'Check', soft: true },
      { head: 'Combination' },
      { head: 'Ratio', align: 'right' },
    ],
    over.map((flag) => ({
      cells: [flag.frame, flag.places.join(', '), flag.check, flag.combination, { text: formatRatio(flag.ratio, nearLimit), face: 'condensedBold', colour: 'red', mark: 'over' }],
      ...noteOf(flag, cover.acceptances),
    })), // prettier-ignore
  );
  flow.heading('Not checked', unchecked.length === 0 ? 'nothing' : `${unchecked.length}; not a pass`);
  table(
    flow,
    [{ head: 'Frame', face: 'condensedMedium' }, { head: 'Where', soft: true }, { head: 'Check' }, { head: 'Why', soft: true }],
    unchecked.map((flag) => ({
      cells: [{ text: flag.frame, mark: 'not checked' }, few(flag.places), flag.check ?? '–', flag.reason],
      ...noteOf(flag, cover.acceptances),
    })),
  );
  const unmatched = cover.acceptances.filter((one) => !facts.flags.some((flag) => isOf(one, flag)));
  if (unmatched.length > 0) {
    flow.heading('Accepted besides', 'of checks that are not in the lists above');
    table(
      flow,
      [{ head: 'Frame' }, { head: 'Where' }, { head: 'Check' }, { head: 'Reason', soft: true }, { head: 'By', soft: true }],
      unmatched.map((one) => ({ cells: [one.frame, one.subject ?? 'frame', one.check, one.reason, signed(one)] })),
    );
  }
  const notIssued = cover.notIssued;
  flow.heading('Frames not issued', notIssued.length === 0 ? 'none' : 'they have no solution; nothing of them is handed over'); // prettier-ignore
  table(
    flow,
    [
      { head: 'Frame', face: 'condensedMedium' },
      { head: 'Why', soft: true },
    ],
    notIssued.map(({ frame, reason }) => ({ cells: [frame, reason] })),
  );
  framesTable(flow, facts, nearLimit, units);
}

function framesTable(flow: Flow, { frames }: ReportFacts, nearLimit: number, units: 'metric' | 'us'): void {
  flow.part({ title: 'Frames', note: 'every frame of the batch with the check that governs it' });
  flow.bookmark('Frames of the batch');
  const total = frames.reduce<number | null>(
    (sum, { mass, count }) => (sum === null || mass === null ? null : sum + mass * count),
    0,
  );
  table(
    flow,
    [
      { head: '', align: 'right' },
      { head: 'Frame', face: 'condensedMedium' },
      { head: 'Title', soft: true, ifAny: true },
      { head: 'Off', align: 'right' },
      { head: 'Mass', unit: unitLabel('mass', units), align: 'right' },
      { head: 'Governing check' },
      { head: 'Where' },
      { head: 'Combination' },
      { head: 'Ratio', align: 'right' },
      { head: 'Verdict' },
    ],
    frames.map((frame) => ({
      cells: [
        { text: String(frame.number), colour: 'ink3' },
        frame.id,
        frame.title,
        String(frame.count),
        formatQuantity(frame.mass, 'mass', units),
        frame.check ?? '–',
        frame.place ?? '–',
        frame.combination ?? '–',
        { text: formatRatio(frame.ratio, nearLimit), face: 'condensedBold', colour: verdictInk[frame.verdict] },
        { text: frame.verdict, mark: frame.verdict, colour: verdictInk[frame.verdict] },
      ],
    })),
  );
  if (total !== null && frames.length > 0) flow.paragraph(`Steel of all frames, times how many of each: ${formatNumber(Number(formatQuantity(total, 'mass', units, { decimals: 0 })), { decimals: 0 })} ${unitLabel('mass', units)}.`, { colour: 'ink2' }); // prettier-ignore
}

const few = (places: readonly string[]): string =>
  places.length <= 8 ? places.join(', ') : `${places.slice(0, 7).join(', ')} and ${places.length - 7} more`;

const isOf = (one: Acceptance, flag: Flag): boolean =>
  one.frame === flag.frame &&
  one.verdict === flag.verdict &&
  ((one.subject === null && flag.subjects.includes(null)) || flag.subjects.includes(one.subject)) &&
  one.check === (flag.check ?? wholeFrameCheck);

const signed = ({ by }: Acceptance): string => `${by.name}, ${shortDate(by.at)}`;

/** What stands beside a flag that was accepted: the reason, and whose it is. */
export function acceptedWords(one: Acceptance): string {
  return `Accepted by ${signed(one)}${one.subject === null ? '' : ` for ${one.subject}`}: ${one.reason}`;
}

function noteOf(flag: Flag, acceptances: readonly Acceptance[]): Pick<Row, 'note'> {
  const found = acceptances.filter((one) => isOf(one, flag)).map(acceptedWords);
  const own = flag.verdict === 'over' && flag.reason !== null ? [flag.reason] : [];
  if (found.length === 0 && own.length === 0) return {};
  return { note: { text: [...own, ...found].join(' '), ...(found.length > 0 ? { colour: 'green' as const } : {}) } };
}
