import type { Frame } from '@/lib/model/frame';
import { stretchesOf, type CaseStretches } from '../member-stretches';

/**
 * What acts on one member in one combination: stretches without jumps one after another, `stride` numbers each
 * [length, n₀, n₁, n₂, q₀, q₁, P_y, M]: N = N_start + n₀ + n₁ s + n₂ s² (N_start before a force exactly there),
 * q_y = q₀ + q₁ s, and the force and moment that stand where the stretch begins.
 */
export interface MemberLoading {
  count: number;
  stretches: Float64Array;
  /** What stands exactly at the end, and N there after it less N_start. */
  endPy: number;
  endM: number;
  endN: number;
  /** Whether anything stands exactly at the start and at the end. */
  startJump: boolean;
  endJump: boolean;
  /** Free strain and curvature. */
  strain: number;
  curvature: number;
}

export const stride = 8;

export function emptyLoading(): MemberLoading {
  return {
    count: 0, stretches: new Float64Array(stride), endPy: 0, endM: 0, endN: 0, startJump: false, endJump: false, strain: 0,
    curvature: 0,
  }; // prettier-ignore
}

// sums over the cases, by place of the member
let room = 16;
let sums = new Float64Array(7 * room);
let flags = new Uint8Array(2 * room);

/** Sums the cases of a member: `factors` by case, all × `scale`. Places at which nothing of it changes divide nothing. */
export function combineLoading(frame: Frame, member: number, factors: Float64Array, scale: number, out: MemberLoading): void {
  const { places, cases } = stretchesOf(frame, member);
  const last = places.length - 1;
  if (places.length > room) {
    room = 2 * places.length;
    sums = new Float64Array(7 * room);
    flags = new Uint8Array(2 * room);
  }
  for (let i = 7 * places.length - 1; i >= 0; i--) sums[i] = 0;
  for (let i = 2 * places.length - 1; i >= 0; i--) flags[i] = 0;
  let strain = 0;
  let curvature = 0;
  for (let c = 0; c < cases.length; c++) {
    const k = factors[c]! * scale;
    const acting = k === 0 ? undefined : cases[c];
    if (!acting) continue;
    strain += k * acting.strain;
    curvature += k * acting.curvature;
    add(acting, k, last);
  }
  if (out.stretches.length < stride * last) out.stretches = new Float64Array(stride * 2 * last);
  write(places, last, out);
  out.strain = strain;
  out.curvature = curvature;
}

function add({ lines, divides, jumps, Px, Py, M }: CaseStretches, k: number, last: number): void {
  for (let i = 0, o = 0, s = 0; i < last; i++, o += 4, s += 7) {
    if (divides[i]) flags[2 * i] = 1;
    sums[s] = sums[s]! + k * lines[o]!;
    sums[s + 1] = sums[s + 1]! + k * lines[o + 1]!;
    sums[s + 2] = sums[s + 2]! + k * lines[o + 2]!;
    sums[s + 3] = sums[s + 3]! + k * lines[o + 3]!;
  }
  if (!jumps) return;
  for (let i = 0, s = 0; i <= last; i++, s += 7) {
    if (!jumps[i]) continue;
    flags[2 * i + 1] = 1;
    sums[s + 4] = sums[s + 4]! + k * Px[i]!;
    sums[s + 5] = sums[s + 5]! + k * Py[i]!;
    sums[s + 6] = sums[s + 6]! + k * M[i]!;
  }
}

/** The sums as stretches. */
function write(places: Float64Array, last: number, out: MemberLoading): void {
  const table = out.stretches;
  let count = 0;
  let N = 0;
  for (let i = 0; i < last;) {
    let to = i + 1;
    while (to < last && !flags[2 * to]) to++;
    const l = places[to]! - places[i]!;
    const s = 7 * i;
    const o = stride * count++;
    N -= sums[s + 4]!;
    const n1 = -sums[s]!;
    const n2 = -sums[s + 1]! / 2;
    table[o] = l;
    table[o + 1] = N;
    table[o + 2] = n1;
    table[o + 3] = n2;
    table[o + 4] = sums[s + 2]!;
    table[o + 5] = sums[s + 3]!;
    table[o + 6] = sums[s + 5]!;
    table[o + 7] = sums[s + 6]!;
    N += l * (n1 + l * n2);
    i = to;
  }
  out.count = count;
  out.endPy = sums[7 * last + 5]!;
  out.endM = sums[7 * last + 6]!;
  out.endN = N - sums[7 * last + 4]!;
  out.startJump = flags[1] === 1;
  out.endJump = flags[2 * last + 1] === 1;
}
