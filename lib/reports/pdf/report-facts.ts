/** What is gathered of all frames in one pass before the first page: counts, names, flags, parts; of results nothing is kept. */
import type { Combination, Frame } from '@/lib/model/frame';
import { DistinctParts } from '@/lib/reports/workbook/distinct-parts';
import type { ReportFrame, ReportSource } from '@/lib/reports/workbook/report-source';
import { verdictOf } from '@/lib/reports/workbook/verdict-of';
import { checkPlace } from '@/lib/results/check-place';
import type { Verdict } from '@/lib/results/result';

/** A frame's line on the summary. */
export interface FrameLine {
  readonly number: number;
  readonly id: string;
  readonly title: string | null;
  readonly group: string | null;
  readonly verdict: Verdict;
  readonly ratio: number | null;
  readonly check: string | null;
  readonly place: string | null;
  readonly combination: string | null;
  readonly mass: number | null;
  readonly count: number;
  /** Why it has no solution; null where it has one. */
  readonly unsolved: string | null;
}

/** A check that is over or not checked; what isn't checked for one reason is one flag. */
export interface Flag {
  readonly verdict: 'over' | 'not checked';
  readonly ratio: number | null;
  readonly number: number;
  readonly frame: string;
  /** Subjects as checks name them; null = the frame. */
  readonly subjects: readonly (string | null)[];
  readonly places: readonly string[];
  readonly check: string | null;
  readonly combination: string | null;
  readonly reason: string | null;
}

/** A combination with its cases by name. */
export interface NamedCombination {
  readonly name: string;
  readonly purpose: Combination['purpose'];
  readonly terms: string;
}

export interface ReportFacts {
  readonly frames: readonly FrameLine[];
  readonly counts: Readonly<Record<Verdict, number>>;
  /** Worst first. */
  readonly flags: readonly Flag[];
  /** Each once, with how many frames it holds for. */
  readonly assumptions: readonly string[];
  /** Those that hold for every frame. */
  readonly shared: ReadonlySet<string>;
  readonly parts: DistinctParts;
  readonly combinations: readonly NamedCombination[];
  /** Frames by the check that governs them. */
  readonly governs: ReadonlyMap<string, Readonly<Record<Verdict, number>>>;
  readonly tied: boolean;
}

export async function reportFacts(source: ReportSource): Promise<ReportFacts> {
  const frames: FrameLine[] = [];
  const flags: Flag[] = [];
  const counts: Record<Verdict, number> = { over: 0, near: 0, within: 0, 'not checked': 0 };
  const assumed = new Map<string, number>();
  const combinations = new Map<string, NamedCombination>();
  const governs = new Map<string, Record<Verdict, number>>();
  const parts = new DistinctParts();
  let tied = false;
  for await (const each of source.frames({ states: false })) {
    const line = lineOf(each);
    frames.push(line);
    counts[line.verdict] += 1;
    if (line.check !== null) {
      const of = governs.get(line.check) ?? { over: 0, near: 0, within: 0, 'not checked': 0 };
      of[line.verdict] += 1;
      governs.set(line.check, of);
    }
    for (const words of each.evaluation?.assumptions ?? []) assumed.set(words, (assumed.get(words) ?? 0) + 1);
    flags.push(...flagsOf(each, line));
    if (each.frame === null) continue;
    parts.add(each.frame);
    tied ||= each.frame.members.some((member) => member.tensionOnly);
    for (const combination of each.frame.combinations) {
      const named = { name: combination.name, purpose: combination.purpose, terms: termsOf(each.frame, combination) };
      combinations.set(JSON.stringify(named), named);
    }
  }
  const rank = { over: 0, 'not checked': 1 };
  flags.sort((a, b) => rank[a.verdict] - rank[b.verdict] || (b.ratio ?? 0) - (a.ratio ?? 0) || a.number - b.number);
  return {
    frames,
    counts,
    flags,
    shared: new Set([...assumed].flatMap(([words, count]) => (count === frames.length ? [words] : []))),
    assumptions: [...assumed].map(([words, count]) =>
      count === frames.length ? words : `${words} (${count} of ${frames.length} frames)`,
    ),
    parts,
    combinations: [...combinations.values()],
    governs,
    tied,
  };
}

function lineOf(each: ReportFrame): FrameLine {
  const { frame, evaluation } = each;
  const governing = evaluation?.governing ?? null;
  const check = evaluation?.checks.find((one) => one.subject === governing?.subject && one.check === governing.check && one.combination === governing.combination); // prettier-ignore
  return {
    number: each.number,
    id: each.id,
    title: each.title,
    group: each.group,
    verdict: verdictOf(each),
    ratio: governing?.ratio ?? null,
    check: governing?.check ?? null,
    place: governing ? (frame && check ? checkPlace(frame, check) : (governing.subject ?? 'frame')) : null,
    combination: governing?.combination ?? null,
    mass: evaluation?.mass ?? null,
    count: each.count,
    unsolved: whyUnsolved(each),
  };
}

/** Why a frame has no solution; null where it has one. */
function whyUnsolved({ frame, evaluation }: ReportFrame): string | null {
  if (frame === null) return 'errors in its sheets stop it';
  if (evaluation === null) return 'it has not been run';
  return evaluation.status === 'solved'
    ? null
    : (evaluation.failure?.message ?? evaluation.notChecked[0] ?? 'it has no solution');
}

function flagsOf({ frame, evaluation }: ReportFrame, line: FrameLine): Flag[] {
  const of = { number: line.number, frame: line.id } as const;
  const whole = { ...of, subjects: [null], places: ['frame'], check: null, combination: null, ratio: null } as const;
  if (line.unsolved !== null || frame === null || evaluation === null)
    return [{ ...whole, verdict: 'not checked', reason: line.unsolved ?? 'it was not run' }];
  const flags: Flag[] = [];
  const unchecked = new Map<string, { flag: Flag; subjects: (string | null)[]; places: string[] }>();
  for (const check of evaluation.checks) {
    const place = checkPlace(frame, check);
    const { ratio, combination, reason } = check;
    if (check.verdict === 'over')
      flags.push({
        ...of,
        verdict: 'over',
        ratio,
        subjects: [check.subject],
        places: [place],
        check: check.check,
        combination,
        reason,
      });
    if (check.verdict !== 'not checked') continue;
    const key = `${check.check}\n${reason ?? ''}`;
    const known = unchecked.get(key);
    if (known) {
      known.subjects.push(check.subject);
      known.places.push(place);
      continue;
    }
    const [subjects, places] = [[check.subject], [place]];
    const flag: Flag = { ...of, verdict: 'not checked', ratio: null, subjects, places, check: check.check, combination, reason };
    unchecked.set(key, { flag, subjects, places });
  }
  const said = new Set([...unchecked.values()].map(({ flag }) => flag.reason));
  const known = evaluation.notChecked.filter(
    (reason) => ![...said].some((one) => one !== null && (one === reason || reason.includes(one))),
  );
  return [
    ...flags,
    ...[...unchecked.values()].map(({ flag }) => flag),
    ...known.map((reason): Flag => ({ ...whole, verdict: 'not checked', reason })),
  ];
}

function termsOf(frame: Frame, { terms }: Combination): string {
  return terms
    .map(({ case: index, factor }, i) => {
      const figure = Number(Math.abs(factor).toPrecision(6));
      const sign = factor < 0 ? '− ' : i === 0 ? '' : '+ ';
      return `${sign}${figure === 1 ? '' : `${figure} `}${frame.cases[index]?.name ?? ''}`;
    })
    .join(' ');
}
