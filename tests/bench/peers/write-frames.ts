import { writeFileSync } from 'node:fs';
import { memberData } from '@/lib/analysis/member-data';
import { memberLoads } from '@/lib/analysis/member-loads';
import { unknowns } from '@/lib/analysis/topology';
import type { Frame } from '@/lib/model/frame';

/**
 * Writes frames of one shape for eigen-peer.cpp: what the engine's own solving begins with, members' lengths, directions and
 * stiffnesses and their loads along local axes. Rigid joints, plain supports, loads along lines and on nodes only.
 */
export function writeFrames(file: string, frames: readonly Frame[]): void {
  const [first] = frames;
  if (!first) throw new Error('Expected a frame');
  const ints = (...numbers: number[]): Uint8Array => new Uint8Array(Int32Array.from(numbers).buffer);
  const doubles = (numbers: readonly number[]): Uint8Array => new Uint8Array(Float64Array.from(numbers).buffer);
  const parts: Uint8Array[] = [
    ints(first.nodes.length, first.members.length, first.cases.length, frames.length),
    ints(...unknowns(first).free),
    ints(...first.members.map(({ start }) => start)),
    ints(...first.members.map(({ end }) => end)),
  ];
  for (const frame of frames) {
    const on: number[] = [];
    const lines: number[] = [];
    memberLoads(frame).forEach((acting, index) => {
      const loadCase = index % frame.cases.length;
      if (acting && acting.places.length > 0) throw new Error('Expected loads along lines only');
      for (const { a, b, qx1, qx2, qy1, qy2 } of acting?.lines ?? []) {
        on.push((index - loadCase) / frame.cases.length, loadCase);
        lines.push(a, b, qx1, qx2, qy1, qy2);
      }
    });
    const { nodeLoads } = frame;
    parts.push(
      ints(on.length / 2, nodeLoads.length),
      doubles(memberData(frame).flatMap((m) => [m.length, m.cos, m.sin, m.EA, m.EI])),
      ints(...on),
      doubles(lines),
      ints(...nodeLoads.flatMap((load) => [load.node, load.case])),
      doubles(nodeLoads.flatMap((load) => [load.Fx_N, load.Fy_N, load.Mz_Nm])),
    );
  }
  writeFileSync(file, Buffer.concat(parts));
}
