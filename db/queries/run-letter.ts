import type { Db } from '@/db/open';
import { putInOutbox } from './outbox';
import { findPerson } from './people';
import { findRevisionById } from './revisions';
import type { VerdictCounts } from './verdict-counts';

interface EndedRun {
  readonly revision: number;
  /** Who started it. */
  readonly person: number;
  readonly counts: VerdictCounts;
  /** It stopped before its end, by a fault. */
  readonly stopped: boolean;
}

/** Tells whoever started a run that it has ended. */
export async function putRunFinished(db: Db, office: number, { revision, person, counts, stopped }: EndedRun): Promise<void> {
  const starter = await findPerson(db, office, person);
  const about = await findRevisionById(db, office, revision);
  if (!starter || !about) return;
  const { over, near, within, notChecked } = counts;
  await putInOutbox(db, office, starter.email, {
    kind: 'run finished',
    about: {
      project: [about.projectNumber, about.projectName].filter(Boolean).join(' '),
      batch: about.batch,
      batchName: about.batchName,
      letter: about.letter,
    },
    frames: over + near + within + notChecked,
    over,
    near,
    notChecked,
    stopped,
  });
}
