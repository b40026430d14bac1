/** Writes the rows of a solved frame into the lists of a revision that are filtered and sorted (README, "Lists"). */
import { orNone, orNoneHigh } from '@/db/absent';
import type { RawDatabase } from '@/db/open';
import { TallyWriter } from '@/db/lists/tally';
import { rankOf } from '@/db/verdict-rank';
import type { Frame } from '@/lib/model/frame';
import type { MemberGoverning } from '@/lib/results/member-results';
import type { Check, FrameEvaluation } from '@/lib/results/result';
import { governingIndex } from '@/lib/results/verdict';

/** What a frame's rows are made from: its model and what is stored of its version. */
export interface Solved {
  readonly frame: Frame;
  readonly evaluation: FrameEvaluation;
  readonly members: readonly MemberGoverning[];
}

/** Summary of a frame as the frames table and its version show it. */
export function summaryOf({ frame, evaluation }: Omit<Solved, 'members'>) {
  const { governing } = evaluation;
  const check = governing ? evaluation.checks[governingIndex(evaluation.checks)] : undefined;
  const factors = evaluation.states.flatMap((state) => state.criticalLoadFactor ?? []);
  return {
    status: evaluation.status,
    verdict: rankOf(evaluation.verdict),
    ratio: governing?.ratio ?? null,
    check: governing?.check ?? null,
    subject: governing?.subject ?? null,
    combination: governing?.combination ?? null,
    section: sectionOf(frame, check),
    criticalLoadFactor: factors.length > 0 ? Math.min(...factors) : null,
    mass: evaluation.mass,
    reason: evaluation.failure?.message ?? (evaluation.notChecked.length > 0 ? evaluation.notChecked.join('; ') : null),
  };
}

function sectionOf(frame: Frame, check: Check | undefined): string | null {
  const member = check?.member === null || check?.member === undefined ? undefined : frame.members[check.member];
  return member ? (frame.sections[member.section]?.name ?? null) : null;
}

/** Prepared once for many frames; call inside a transaction. */
export class ListWriter {
  private readonly tally: TallyWriter;
  private readonly touched = new Set<number>();
  private readonly stamp;
  private readonly frame;
  private readonly member;
  private readonly check;
  private readonly reaction;
  private readonly movement;
  private readonly result;
  private readonly peak;

  constructor(raw: RawDatabase) {
    this.tally = new TallyWriter(raw);
    this.stamp = raw.prepare('update revision set stamp = stamp + 1 where id = ?');
    this.frame = raw.prepare(
      `update revision_frame set status = ?, verdict = ?, ratio = ?, check_name = ?, subject = ?, section = ?, combination = ?,
       critical_load_factor = ?, mass = ?, reason = ?, run_by = ? where revision = ? and frame = ?`,
    );
    const insert = (table: string, columns: number) =>
      raw.prepare(`insert into ${table} values (${Array(columns).fill('?').join(',')})`);
    this.member = insert('member_row', 17);
    this.check = insert('check_row', 17);
    this.reaction = insert('reaction_row', 10);
    this.movement = insert('movement_row', 11);
    this.result = insert('frame_result', 4);
    this.peak = insert('frame_peak', 14);
  }

  /** Adds a solved (or not solvable) frame's rows to a revision, where it has none yet. */
  write(revision: number, index: number, solved: Solved, runBy: number | null): void {
    const s = summaryOf(solved);
    this.touched.add(revision);
    this.frame.run(
      s.status, s.verdict, orNone(s.ratio), s.check ?? '', s.subject, s.section ?? '', s.combination ?? '',
      orNoneHigh(s.criticalLoadFactor), orNone(s.mass), s.reason, runBy, revision, index,
    ); // prettier-ignore
    if (solved.evaluation.status !== 'solved') return;
    this.writeMembers(revision, index, solved);
    this.writeChecks(revision, index, solved);
    this.writeStates(revision, index, solved);
  }

  /** Counts what was written, and puts a new stamp on the revisions it was written to: in the same transaction, as its last. */
  flush(): void {
    this.tally.flush();
    for (const revision of this.touched) this.stamp.run(revision);
    this.touched.clear();
  }

  private writeMembers(revision: number, index: number, { frame, members }: Solved): void {
    frame.members.forEach((member, i) => {
      const found = members[i];
      if (!found) return;
      const start = frame.nodes[member.start]!;
      const end = frame.nodes[member.end]!;
      const role = member.role ?? '';
      const section = frame.sections[member.section]?.name ?? '';
      const group = member.group ?? '';
      const check = found.check ?? '';
      const verdict = rankOf(found.verdict);
      this.member.run(
        revision, index, i, member.id, role, section, group, Math.hypot(end.x_m - start.x_m, end.y_m - start.y_m),
        found.combination, found.N, found.V, found.M, found.at, found.deflection, check, orNone(found.ratio), verdict,
      ); // prettier-ignore
      this.tally.add(revision, 'members', role, section, group, check, String(verdict));
    });
  }

  private writeChecks(revision: number, index: number, { frame, evaluation }: Solved): void {
    evaluation.checks.forEach((check, i) => {
      const member = check.member === null ? undefined : frame.members[check.member];
      const role = member?.role ?? '';
      const section = (member && frame.sections[member.section]?.name) ?? '';
      const combination = check.combination ?? '';
      const verdict = rankOf(check.verdict);
      this.check.run(
        revision, index, i, check.subject, role, section, check.check, combination, check.at, check.face,
        check.value, check.limit, check.quantity, orNone(check.ratio), verdict, check.reason, check.reference,
      ); // prettier-ignore
      this.tally.add(revision, 'checks', role, section, check.check, combination, String(verdict));
    });
  }

  private writeStates(revision: number, index: number, { frame, evaluation }: Solved): void {
    // fx, fy, mz, ux, uy, rz: the largest and the smallest of each
    const peaks = [0, 1, 2, 3, 4, 5].flatMap(() => [-Infinity, Infinity]);
    const met = (which: number, value: number): number => {
      const stored = orNone(value);
      if (stored > peaks[2 * which]!) peaks[2 * which] = stored;
      if (stored < peaks[2 * which + 1]!) peaks[2 * which + 1] = stored;
      return stored;
    };
    evaluation.states.forEach((state, result) => {
      const kind = state.kind === 'case' ? 0 : 1;
      const { reactions: R, displacements: d } = state;
      this.result.run(revision, state.name, index, result);
      frame.supports.forEach((support, i) => {
        const node = frame.nodes[support.node]!.id;
        const [fx, fy, mz] = [met(0, R[3 * i]!), met(1, R[3 * i + 1]!), met(2, R[3 * i + 2]!)];
        this.reaction.run(revision, index, result, i, node, state.name, kind, fx, fy, mz);
        this.tally.add(revision, 'reactions', node, state.name, String(kind), '', '');
      });
      frame.nodes.forEach((node, i) => {
        const [ux, uy, rz] = [met(3, d[3 * i]!), met(4, d[3 * i + 1]!), met(5, d[3 * i + 2]!)];
        const place = node.place ?? '';
        this.movement.run(revision, index, result, i, node.id, place, state.name, kind, ux, uy, rz);
        this.tally.add(revision, 'movements', node.id, place, state.name, String(kind), '');
      });
    });
    if (evaluation.states.length > 0) this.peak.run(revision, index, ...peaks.map((one) => orNone(one)));
  }
}
