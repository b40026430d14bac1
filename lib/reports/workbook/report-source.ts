/** What a result workbook is made from: stored numbers, never recomputed ones. */
import type { InputIdentity, InputRow } from '@/lib/intake/intake';
import type { PartOrigin } from '@/lib/intake/own/own-thing';
import type { Frame } from '@/lib/model/frame';
import type { SettingOrigins, Settings } from '@/lib/model/settings';
import type { Problem } from '@/lib/problems/problem';
import type { IssueCover } from '@/lib/reports/issue-cover';
import type { FrameEvaluation } from '@/lib/results/result';

/** Who and what the cover names; null = not yet, or unknown to the command line. */
export interface ReportTitle {
  readonly project: string | null;
  readonly batch: string | null;
  readonly revision: string | null;
  readonly state: string | null;
  readonly prepared: string | null;
  readonly checked: string | null;
  readonly issued: string | null;
  /** Of a revision made on screen: from which, by whom, what and why, a line each. */
  readonly madeBy?: readonly string[];
}

export interface ReportFrame {
  /** 1-based place in sheet order. */
  readonly number: number;
  readonly id: string;
  readonly title: string | null;
  readonly group: string | null;
  readonly count: number;
  readonly note: string | null;
  /** Null where errors in the sheets stopped it. */
  readonly frame: Frame | null;
  /** Null where it was never run. `states` may be empty where they were not asked for. */
  readonly evaluation: FrameEvaluation | null;
}

/** What of an evaluation is looked at; the rest may be left empty, since fetching it costs. */
export interface FrameNeed {
  /** Displacements, reactions, end forces. */
  readonly states: boolean;
  /** Checks, verdict, certificate, mass and all else but the states. Default true. */
  readonly checks?: boolean;
}

export interface ReportSource {
  readonly title: ReportTitle;
  /** Of an issue's workbook: who signs what; absent in a draft. */
  readonly issue?: IssueCover;
  readonly engine: string;
  readonly input: InputIdentity;
  readonly settings: Settings;
  readonly origins: SettingOrigins;
  readonly problems: readonly Problem[];
  /** Where sections and materials come from; missing of what an earlier version read. */
  readonly parts?: readonly PartOrigin[];
  readonly inputRows: () => Iterable<InputRow>;
  /** Cells of the widest of them, where that is known without going through them. */
  readonly inputWidth?: () => number;
  /** Frames in sheet order; called once for each sheet that needs them, with what that sheet looks at. */
  readonly frames: (need: FrameNeed) => Iterable<ReportFrame> | AsyncIterable<ReportFrame>;
}
