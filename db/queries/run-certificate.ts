import { type Db, driverOf } from '@/db/open';
import { stampOf } from '@/db/queries/lists';
import { remembered } from '@/db/remembered';
import { statement } from '@/db/statements';

/** The worst of every figure by which a revision's solved frames are vouched for; null where no frame has it. */
export interface RunCertificate {
  /** Different frames that are solved. */
  readonly solved: number;
  readonly residual: number | null;
  readonly equilibrium: number | null;
  /** The fewest. */
  readonly digits: number | null;
  /** Different frames analysed a second time, and their largest relative difference. */
  readonly seconds: number;
  readonly second: number | null;
}

/** @returns undefined where the revision is not the office's */
export async function findRunCertificate(db: Db, office: number, revision: number): Promise<RunCertificate | undefined> {
  const raw = driverOf(db);
  const stamp = stampOf(raw, office, revision);
  if (stamp === undefined) return undefined;
  return remembered(raw, 'certificate', `${revision} ${stamp}`, () =>
    statement<RunCertificate>(
      raw,
      `select count(*) as solved, max(residual) as residual, max(equilibrium) as equilibrium, min(digits) as digits,
       count(second) as seconds, max(second) as second from frame_version
       where state = 'solved' and id in (select version from revision_frame where revision = ? and version is not null)`,
    ).get(revision)!,
  );
}

/** Places (from 0) of a revision's frames that have one of the versions: several frames may be the same. */
export async function listPlacesOf(db: Db, office: number, revision: number, versions: readonly number[]): Promise<number[]> {
  const raw = driverOf(db);
  if (versions.length === 0 || stampOf(raw, office, revision) === undefined) return [];
  return statement<{ frame: number }>(
    raw,
    `select frame from revision_frame where version in (select value from json_each(?)) and revision = ? order by frame`,
  )
    .all(JSON.stringify(versions), revision)
    .map((row) => row.frame);
}
