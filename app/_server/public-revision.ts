import 'server-only';
import type { RevisionRecord } from '@/db/queries/revisions';

/** A revision as the API gives it: without the database's own numbers. */
export function publicRevision(revision: RevisionRecord) {
  const { letter, state, reason, title, units, settings, origins, input, engine } = revision;
  const { frames, framesStopped, errors, warnings, notes, createdAt, changedAt, runStartedAt, runFinishedAt } = revision;
  return {
    project: { id: revision.project, name: revision.projectName, number: revision.projectNumber },
    batch: { id: revision.batch, name: revision.batchName },
    letter,
    state,
    reason,
    title,
    units,
    settings,
    origins,
    input,
    engine,
    frames,
    framesStopped,
    problems: { errors, warnings, notes },
    createdBy: revision.createdBy.name,
    createdAt,
    changedAt,
    runBy: revision.runBy?.name ?? null,
    runStartedAt,
    runFinishedAt,
    madeFrom: revision.madeFrom,
    issued: revision.issued && { number: revision.issued.number, by: revision.issued.name, at: revision.issued.at },
    sentToCheck: revision.sent && { by: revision.sent.name, at: revision.sent.at },
    checked: revision.checked && { by: revision.checked.name, at: revision.checked.at },
  };
}
export type PublicRevision = ReturnType<typeof publicRevision>;
