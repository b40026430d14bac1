import type { Frame } from '@/lib/model/frame';
import type { MemberLine, ResultState } from '@/lib/results/result';
import { inPlane } from '@/lib/sections/in-plane';
import { valueAt } from '../polynomial';
import type { CodeMember } from './code-member';
import type { Demand, InPlaneRule, Place, Stretch } from './demand';
import type { InPlaneRules } from './in-plane-rule';
import { placesAlong, type Nothing } from './places-along';
import { wholeLine } from './whole-line';

/** What of a span's loads and section every demand needs; found once a member. */
export interface DemandSource {
  readonly member: CodeMember;
  readonly nothing: Nothing;
  /** Positions of the restraints of both faces, ascending, without the ends. */
  readonly restraints: readonly number[];
  /** Loads across the member: case and where, m from the span's start. */
  readonly across: readonly { readonly case: number; readonly from: number; readonly to: number }[];
}

export function demandSource(frame: Frame, member: CodeMember): DemandSource {
  const { section, material, turned } = member;
  // what rounding leaves of zero: a stress of E/10⁹
  const force = 1e-9 * material.E_Pa * section.properties.A_m2;
  const I = inPlane(section, turned).I_m4 ?? section.properties.I_m4;
  const inner = [...member.restraints.top.slice(1, -1), ...member.restraints.bottom.slice(1, -1)];
  return {
    member,
    nothing: { force, moment: force * Math.sqrt(I / section.properties.A_m2) },
    restraints: inner.sort((a, b) => a - b),
    across: loadsAcross(frame, member),
  };
}

/** Every load of the span that bends it, self-weight too; a load along the member does not. */
function loadsAcross(frame: Frame, { span }: CodeMember): DemandSource['across'] {
  const found: { case: number; from: number; to: number }[] = [];
  for (const piece of span.pieces) {
    const m = frame.members[piece.member]!;
    const [a, b] = [frame.nodes[m.start]!, frame.nodes[m.end]!];
    const [cos, sin] = [(b.x_m - a.x_m) / piece.length_m, (b.y_m - a.y_m) / piece.length_m];
    const place = (from: number, to: number): { from: number; to: number } =>
      piece.reversed
        ? { from: piece.from_m + piece.length_m - to, to: piece.from_m + piece.length_m - from }
        : { from: piece.from_m + from, to: piece.from_m + to };
    frame.cases.forEach((one, c) => {
      if (one.selfWeight !== 0 && Math.abs(cos) > 1e-6) found.push({ case: c, ...place(0, piece.length_m) });
    });
    for (const load of frame.memberLoads) {
      if (load.member !== piece.member) continue;
      if (load.kind === 'temperature') continue;
      if (load.kind === 'moment') found.push({ case: load.case, ...place(load.at_m, load.at_m) });
      else {
        const share = load.axes === 'local' ? (load.direction === 'y' ? 1 : 0) : load.direction === 'y' ? cos : sin;
        if (Math.abs(share) <= 1e-6) continue;
        found.push({ case: load.case, ...(load.kind === 'point' ? place(load.at_m, load.at_m) : place(load.from_m, load.to_m)) });
      }
    }
  }
  return found;
}

/** What a state asks of a member. @param lines of its pieces, in the order of span.pieces */
export function demandOf(source: DemandSource, state: ResultState, lines: readonly MemberLine[], rules: InPlaneRules): Demand {
  return new SpanDemand(source, state, wholeLine(source.member.span, lines), rules);
}

class SpanDemand implements Demand {
  readonly combination: string;
  readonly criticalLoadFactor: number | null;
  readonly order: 1 | 2;
  readonly places: readonly Place[];
  readonly inPlane: InPlaneRule;
  tension = 0;
  tensionAt = 0;
  compression = 0;
  compressionAt = 0;
  shear = 0;
  shearAt = 0;
  moment = 0;
  momentAt = 0;
  sagging = 0;
  saggingAt = 0;
  hogging = 0;
  hoggingAt = 0;
  #top: readonly Stretch[] | null = null;
  #bottom: readonly Stretch[] | null = null;
  #whole: Stretch | null = null;

  constructor(
    private readonly source: DemandSource,
    private readonly state: ResultState,
    readonly line: MemberLine,
    rules: InPlaneRules,
  ) {
    this.combination = state.name;
    this.criticalLoadFactor = state.criticalLoadFactor;
    this.order = state.order;
    this.inPlane = source.member.inPlane.from === 'typed' ? rules.typed : rules.blank;
    const places = placesAlong(line, source.restraints, source.nothing);
    this.places = places;
    const more = 1 + 1e-9;
    for (let i = 0; i < places.length; i++) {
      const { x, N, V, M } = places[i]!;
      if (N > this.tension * more) [this.tension, this.tensionAt] = [N, x];
      if (-N > this.compression * more) [this.compression, this.compressionAt] = [-N, x];
      if (Math.abs(V) > this.shear * more) [this.shear, this.shearAt] = [Math.abs(V), x];
      if (M > this.sagging * more) [this.sagging, this.saggingAt] = [M, x];
      if (-M > this.hogging * more) [this.hogging, this.hoggingAt] = [-M, x];
      if (Math.abs(M) > this.moment * more) [this.moment, this.momentAt] = [Math.abs(M), x];
    }
  }

  stretches(face: 'top' | 'bottom'): readonly Stretch[] {
    if (face === 'top') return (this.#top ??= this.#between('top'));
    return (this.#bottom ??= this.#between('bottom'));
  }

  whole(): Stretch {
    const { length_m } = this.source.member;
    return (this.#whole ??= this.#stretch(0, length_m, length_m, null));
  }

  #between(face: 'top' | 'bottom'): Stretch[] {
    const { member } = this.source;
    const at = member.restraints[face];
    const made: Stretch[] = [];
    for (let i = 1; i < at.length; i++) {
      const [from, to] = [at[i - 1]!, at[i]!];
      // a length longer than the span is an effective one
      const length = at.length === 2 ? Math.max(to - from, member[face].length_m) : to - from;
      made.push(this.#stretch(from, to, length, face));
    }
    return made;
  }

  #stretch(from: number, to: number, length: number, face: Stretch['face']): Stretch {
    const { places } = this;
    const { member, across, nothing } = this.source;
    const slack = 1e-9 * member.length_m;
    let start = 0;
    let end = 0;
    let largest = 0;
    let largestAt = from;
    let compressing = 0;
    let compressingAt = from;
    let compression = 0;
    let jump = false;
    let first = true;
    for (let i = 0; i < places.length; i++) {
      const { x, N, V, M } = places[i]!;
      if (x < from - slack) continue;
      if (x > to + slack) break;
      const following = places[i + 1];
      const jumps = following !== undefined && following.x - x <= slack;
      // at its start the stretch begins after a jump, at its end it stops before one
      if (first && x <= from + slack && jumps) continue;
      if (!first && x >= to - slack && places[i - 1]!.x >= to - slack) break;
      if (first) start = M;
      first = false;
      end = M;
      if (jumps && x < to - slack && Math.abs(following.V - V) > 1e-6 * Math.max(this.shear, nothing.force)) jump = true;
      if (Math.abs(M) > Math.abs(largest) * (1 + 1e-9)) [largest, largestAt] = [M, x];
      const size = face === null ? Math.abs(M) : face === 'top' ? M : -M;
      if (size > compressing * (1 + 1e-9)) [compressing, compressingAt] = [size, x];
      if (-N > compression) compression = -N;
    }
    const span = to - from;
    return {
      from_m: from,
      to_m: to,
      length_m: length,
      face,
      heldAtStart: from > slack || !member.free.start,
      heldAtEnd: to < member.length_m - slack || !member.free.end,
      start,
      quarter: this.#momentAt(from + span / 4),
      middle: this.#momentAt(from + span / 2),
      threeQuarter: this.#momentAt(from + (3 * span) / 4),
      end,
      largest,
      largestAt,
      compressing,
      compressingAt,
      loaded: jump || across.some((l) => this.state.factors[l.case] !== 0 && l.to > from + slack && l.from < to - slack),
      compression,
    };
  }

  #momentAt(x: number): number {
    const { segments } = this.line;
    let i = 0;
    while (i < segments.length - 1 && segments[i]!.to < x) i++;
    const { from, M } = segments[i]!;
    const value = valueAt(M, M.length - 1, x - from);
    return Math.abs(value) <= this.source.nothing.moment ? 0 : value;
  }
}
