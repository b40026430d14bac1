/** In a thread: the shape in which a frame would buckle, which takes as long as the frame is large. */
import { findFrame } from '@/db/queries/frames';
import { buckledShape, type BuckledShape } from '@/lib/analysis/buckled-shape/buckled-shape';
import { openOnce } from './open-once';

export interface BuckledTask {
  /** The database's file. */
  readonly file: string;
  readonly office: number;
  readonly revision: number;
  /** Place of the frame in sheet order, from 0. */
  readonly index: number;
  /** Name of the combination. */
  readonly result: string;
}

/** The shape as it is drawn: four numbers a point, as `BuckledShape` has them. */
export interface BuckledDrawn extends Pick<BuckledShape, 'factor' | 'kind'> {
  readonly members: readonly (readonly number[])[];
}

/** @returns null where there is no such frame or result, or it has no critical load factor */
export async function drawBuckled({ file, office, revision, index, result }: BuckledTask): Promise<BuckledDrawn | null> {
  const { db } = openOnce(file);
  const stored = await findFrame(db, office, revision, index);
  const state = stored?.evaluation?.states.find(({ name }) => name === result);
  const shape = stored?.frame && state ? buckledShape(stored.frame, state) : null;
  return shape && drawn(shape);
}

/** Of a shape without a size six figures are more than can be drawn. */
function drawn({ factor, kind, members }: BuckledShape): BuckledDrawn {
  return { factor, kind, members: members.map((points) => Array.from(points, (value) => Number(value.toPrecision(6)))) };
}
