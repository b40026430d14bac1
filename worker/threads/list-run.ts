/** In a thread: what a run has to do. Of 20,000 frames that takes longer than a page may wait. */
import { listVersions } from '@/db/queries/waiting';
import { secondSample } from '@/lib/results/second-sample';
import { openOnce } from './open-once';

export interface ListRunTask {
  /** The database's file. */
  readonly file: string;
  readonly revision: number;
}

export interface RunListed {
  /** Different frame versions of the revision. */
  readonly total: number;
  /** Those not solved yet, in the order of its frames. */
  readonly waiting: readonly number[];
  /** Versions that get the second, independent analysis. */
  readonly second: ReadonlySet<number>;
}

export function listRun({ file, revision }: ListRunTask): RunListed {
  const versions = listVersions(openOnce(file).raw, revision);
  const chosen = secondSample(versions.map((each) => each.hash));
  return {
    total: versions.length,
    waiting: versions.filter((each) => each.waiting).map((each) => each.version),
    second: new Set(versions.filter((each) => chosen.has(each.hash)).map((each) => each.version)),
  };
}
