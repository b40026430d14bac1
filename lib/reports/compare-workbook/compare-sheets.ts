/** Two revisions compared, as a workbook: the figures, inputs that differ, frames, members and reactions that moved, steel. */
import {
  cellOf,
  quantityColumn,
  ratioColumn,
  type ReportCell,
  type ReportRow,
  type ReportSheet,
  text,
  verdictColumn,
} from '@/lib/reports/workbook/report-sheet';
import { cautions } from '@/lib/reports/cautions';
import { hasMoved, massChange, massOf, type FramePair, type MemberPair, type Movement, type Standing } from '@/lib/results/compare'; // prettier-ignore
import { type Causes, hasCause, settingsCause } from '@/lib/results/compare-causes';
import type { InputDifference, SettingDifference } from '@/lib/results/compare-inputs';
import { reactionMoved, type ReactionPair } from '@/lib/results/compare-reactions';
import { comparedVerdicts, type ComparedTotals } from '@/lib/results/compare-totals';
import { unitLabel } from '@/lib/units/batch-unit';
import type { System } from '@/lib/units/quantity';

/** A change chosen on screen that lies between the two revisions. */
export interface RecordedChange {
  /** The revision that it made. */
  readonly letter: string;
  readonly what: string;
  readonly from: string;
  readonly to: string;
  readonly reason: string;
  readonly person: string;
  readonly at: string;
}

export interface CompareSource {
  readonly batch: string;
  readonly before: { readonly letter: string; readonly input: string; readonly state: string };
  readonly after: { readonly letter: string; readonly input: string; readonly state: string };
  readonly units: System;
  /** Of the later revision. */
  readonly nearLimit: number;
  /** What was asked for as a movement. */
  readonly by: number;
  readonly settings: readonly SettingDifference[];
  readonly recorded: readonly RecordedChange[];
  readonly totals: ComparedTotals;
  readonly inputs: readonly InputDifference[];
  /** Which change of the inputs touches a frame or a member. */
  readonly causes: Causes;
  readonly frames: readonly FramePair[];
  readonly members: readonly MemberPair[];
  readonly reactions: readonly ReactionPair[];
}

export function compareSheets(source: CompareSource): ReportSheet[] {
  return [
    figuresSheet(source),
    settingsSheet(source),
    inputsSheet(source),
    framesSheet(source),
    membersSheet(source),
    reactionsSheet(source),
    steelSheet(source),
  ];
}

/** "became over", "moved", "only in A", "the same". */
function movedWords(pair: FramePair | MemberPair, by: number, letters: { before: string; after: string }): string {
  if (pair.before === null) return `only in ${letters.after}`;
  if (pair.after === null) return `only in ${letters.before}`;
  if (pair.became !== null) return `became ${pair.became}`;
  return hasMoved(pair, by) ? 'ratio moved' : pair.before.verdict === 'not checked' ? 'not checked in both' : 'as it was';
}

const lettersOf = ({ before, after }: CompareSource) => ({ before: before.letter, after: after.letter });

function figuresSheet(source: CompareSource): ReportSheet {
  const { before, after, totals, units, by } = source;
  const { frames, became, mass, critical } = totals;
  const kg = (value: number): string => `${(cellOf(value, 'mass', units) ?? 0).toFixed(1)} ${unitLabel('mass', units)}`;
  const lowest = (one: typeof critical.before): string => (one === null ? 'none' : `${one.value.toFixed(2)} (${one.frame})`);
  const unknown = (n: number): string => (n === 0 ? '' : `, without ${n} frames whose mass is not known`);
  return {
    name: 'Comparison',
    columns: [],
    boldFirst: true,
    *rows(): Iterable<ReportRow> {
      yield ['Batch', source.batch];
      yield ['From', `revision ${before.letter}, ${before.state}`, before.input];
      yield ['To', `revision ${after.letter}, ${after.state}`, after.input];
      yield [];
      yield [`Frames in ${before.letter}`, frames.before];
      yield [`Frames in ${after.letter}`, frames.after];
      yield ['Carried over', frames.carried, 'the same content and results in both'];
      yield [`Only in ${before.letter}`, frames.onlyBefore];
      yield [`Only in ${after.letter}`, frames.onlyAfter];
      for (const verdict of comparedVerdicts) yield [`Became ${verdict}`, became[verdict]];
      yield ['No longer over', totals.noLongerOver];
      yield ['Ratios that moved', totals.moved, `by more than ${by}`];
      yield [`Steel in ${before.letter}`, kg(mass.before) + unknown(mass.unknownBefore)];
      yield [`Steel in ${after.letter}`, kg(mass.after) + unknown(mass.unknownAfter)];
      yield ['Steel added', kg(mass.after - mass.before)];
      yield [`Lowest α_cr in ${before.letter}`, lowest(critical.before)];
      yield [`Lowest α_cr in ${after.letter}`, lowest(critical.after)];
      yield [];
      yield [`${before.letter} down, ${after.letter} across`, ...comparedVerdicts];
      for (const [i, verdict] of comparedVerdicts.entries()) yield [verdict, ...(totals.verdicts[i] ?? [])];
      yield [];
      for (const line of cautions) yield ['Caution', line];
    },
  };
}

function settingsSheet({ settings, recorded, ...source }: CompareSource): ReportSheet {
  const { before, after } = source;
  return {
    name: 'Settings and changes',
    columns: [text('what', 24), text('of revision'), text(`from (${before.letter})`, 28), text(`to (${after.letter})`, 28), text('why', 40), text('who', 20), text('when', 22)], // prettier-ignore
    *rows(): Iterable<ReportRow> {
      for (const { setting, before: was, after: is } of settings) yield [`setting: ${setting}`, null, was, is, null, null, null];
      for (const one of recorded) {
        yield [`recorded change: ${one.what}`, one.letter, one.from, one.to, one.reason, one.person, one.at];
      }
    },
  };
}

function inputsSheet({ before, after, inputs }: CompareSource): ReportSheet {
  const number = (heading: string) => ({ heading, format: '0', width: 9 });
  return {
    name: 'Inputs that differ',
    columns: [text('sheet', 16), text('where', 24), text('heading', 16), text(before.letter, 30), text(after.letter, 30), number(`row in ${before.letter}`), number(`row in ${after.letter}`)], // prettier-ignore
    *rows(): Iterable<ReportRow> {
      for (const one of inputs) {
        yield [one.sheet, one.where, one.what ?? 'whole row', one.before, one.after, one.rowBefore, one.rowAfter];
      }
    },
  };
}

const standing = (one: Standing | null): [ReportCell, ReportCell] => [one?.verdict ?? null, one && finite(one.ratio)];
const finite = (value: number | null): number | null => (value !== null && Number.isFinite(value) ? value : null);
const change = ({ change: by }: Movement): ReportCell => finite(by);

function standingColumns(source: CompareSource) {
  const { before, after, nearLimit } = source;
  return [
    verdictColumn(`verdict ${before.letter}`),
    ratioColumn(nearLimit, `ratio ${before.letter}`),
    verdictColumn(`verdict ${after.letter}`),
    ratioColumn(nearLimit, `ratio ${after.letter}`),
    { heading: 'change', format: '+0.000;-0.000;0.000', width: 9 },
    text('what moved', 20),
  ];
}

function framesSheet(source: CompareSource): ReportSheet {
  const { before, after, by } = source;
  const otherCause = settingsCause(source.settings);
  const sided = (heading: string, width = 14) => [
    text(`${heading} ${before.letter}`, width),
    text(`${heading} ${after.letter}`, width),
  ];
  const factor = (letter: string) => ({ heading: `α_cr ${letter}`, format: '0.00', width: 9 });
  return {
    name: 'Frames',
    columns: [text('frame', 14), ...standingColumns(source), ...sided('governing check', 20), ...sided('section'), factor(before.letter), factor(after.letter), text('cause', 40)], // prettier-ignore
    *rows(): Iterable<ReportRow> {
      for (const pair of source.frames) {
        const [was, is] = [pair.before, pair.after];
        yield [
          pair.id, ...standing(was), ...standing(is), change(pair), pair.carried ? 'carried over' : movedWords(pair, by, lettersOf(source)),
          was?.check ?? null, is?.check ?? null, was?.section ?? null, is?.section ?? null,
          was?.criticalLoadFactor ?? null, is?.criticalLoadFactor ?? null,
          hasCause(pair) ? (source.causes.ofFrame(pair.id) ?? otherCause) : null,
        ]; // prettier-ignore
      }
    },
  };
}

function membersSheet(source: CompareSource): ReportSheet {
  const { before, after, by } = source;
  const otherCause = settingsCause(source.settings);
  return {
    name: 'Members that moved',
    columns: [text('frame', 14), text('member'), text('role'), text(`section ${before.letter}`, 14), text(`section ${after.letter}`, 14), ...standingColumns(source), text(`governing check ${before.letter}`, 20), text(`governing check ${after.letter}`, 20), text('cause', 40)], // prettier-ignore
    *rows(): Iterable<ReportRow> {
      for (const pair of source.members) {
        const [was, is] = [pair.before, pair.after];
        if (!hasMoved(pair, by) && was?.section === is?.section) continue;
        yield [
          pair.frame, pair.id, (is ?? was)?.role ?? null, was?.section ?? null, is?.section ?? null,
          ...standing(was), ...standing(is), change(pair), movedWords(pair, by, lettersOf(source)), was?.check ?? null, is?.check ?? null,
          source.causes.ofMember(pair.frame, pair.id) ?? otherCause,
        ]; // prettier-ignore
      }
    },
  };
}

function reactionsSheet({ before, after, reactions, units, by }: CompareSource): ReportSheet {
  const unit = (direction: ReactionPair['direction']) => (direction === 'Mz' ? 'moment' : 'force');
  const number = (heading: string) => ({ heading, format: '0.00', width: 13 });
  return {
    name: 'Reactions that moved',
    columns: [
      text('frame', 14), text('node'), text('direction'), text('unit'), number(`smallest ${before.letter}`), number(`largest ${before.letter}`),
      number(`smallest ${after.letter}`), number(`largest ${after.letter}`), number('change'),
      { heading: 'share of the frame’s largest', format: '0.0%', width: 14 },
    ], // prettier-ignore
    *rows(): Iterable<ReportRow> {
      for (const one of reactions) {
        if (!reactionMoved(one, by)) continue;
        const quantity = unit(one.direction);
        const cell = (value: number | undefined | null) => cellOf(value, quantity, units);
        yield [
          one.frame, one.node, one.direction, unitLabel(quantity, units), cell(one.before?.min), cell(one.before?.max),
          cell(one.after?.min), cell(one.after?.max), cell(one.change), one.share,
        ]; // prettier-ignore
      }
    },
  };
}

function steelSheet({ before, after, frames, units }: CompareSource): ReportSheet {
  return {
    name: 'Steel',
    columns: [
      text('frame', 14), { heading: `number off ${before.letter}`, format: '0', width: 12 }, { heading: `number off ${after.letter}`, format: '0', width: 12 },
      quantityColumn(`one ${before.letter}`, 'mass', units), quantityColumn(`one ${after.letter}`, 'mass', units),
      quantityColumn(`all ${before.letter}`, 'mass', units), quantityColumn(`all ${after.letter}`, 'mass', units), quantityColumn('added', 'mass', units),
    ], // prettier-ignore
    *rows(): Iterable<ReportRow> {
      for (const pair of frames) {
        const [was, is] = [pair.before, pair.after];
        const kg = (value: number | null | undefined) => cellOf(value, 'mass', units);
        const known = massOf(was) !== null && massOf(is) !== null;
        yield [
          pair.id, was?.count ?? null, is?.count ?? null, kg(was?.mass), kg(is?.mass),
          was && kg(massOf(was)), is && kg(massOf(is)), known ? kg(massChange(pair)) : null,
        ]; // prettier-ignore
      }
    },
  };
}
