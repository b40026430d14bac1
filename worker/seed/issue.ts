/** Issues a checked revision of the invented office; and changes it, so that a second issue takes the place of the first. */
import { changeWords } from '@/lib/changes/change-words';
import { insertAnswer, insertQuestion } from '@/db/queries/issue-acts';
import { listQuestions } from '@/db/queries/issue-questions';
import { findIssue, type IssueRecord } from '@/db/queries/issues';
import { findRevisionById } from '@/db/queries/revisions';
import type { OpenDatabase } from '@/db/open';
import { askForChange } from '@/worker/ask';
import { askForIssue } from '@/worker/ask-issue';
import type { WorkQueue } from '@/worker/queue';
import { checkSeeded } from './check';

interface Named {
  readonly id: number;
  readonly name: string;
}

export interface SeedIssues {
  readonly note: string;
  /** The near limit that the next revision is given, why, and the note of its issue. */
  readonly next: { readonly nearLimit: string; readonly reason: string; readonly note: string };
}

interface Of {
  readonly office: number;
  readonly revision: number;
  readonly lead: Named;
  readonly checker: Named;
  readonly by: Named;
  readonly client: Named;
}

/** @throws {Error} where a step is refused, so that a seed that no longer fits is noticed */
export async function issueSeeded(database: OpenDatabase, queue: WorkQueue, of: Of, { note, next }: SeedIssues): Promise<void> {
  const { db } = database;
  const { office, revision, checker, by, client } = of;
  const first = await issue(database, queue, of, revision, note);
  const text = 'May the rods be spliced at mid length for transport?';
  const asked = await insertQuestion(db, first, { by: client, frame: null, text });
  const [question] = (await listQuestions(db, office, first.id)).filter(({ id }) => id === asked);
  await insertAnswer(db, first, question!, { by, text: 'Yes, by a turnbuckle of the rod’s own resistance.' });

  const settings = (await findRevisionById(db, office, revision))!.settings!;
  const change = { kind: 'setting', setting: 'nearLimit', value: next.nearLimit } as const;
  const made = await askForChange(queue, database, office, {
    from: revision,
    person: by.id,
    changes: [{ change, ...changeWords(change, settings) }],
    reason: next.reason,
    run: true,
  });
  await queue.idle();
  await checkSeeded(db, { office, revision: made!.id, by, checker, how: 'passed' });
  await issue(database, queue, of, made!.id, next.note);
}

async function issue(
  database: OpenDatabase,
  queue: WorkQueue,
  { office, lead, client }: Of,
  revision: number,
  note: string,
): Promise<IssueRecord> {
  const person = { ...lead, role: 'lead' } as const;
  const asked = { note, clients: [client], reportFrames: 'all', person } as const;
  const answer = await askForIssue(queue, database, { office, revision }, asked);
  if ('why' in answer) throw new Error(`The seed could not be issued: ${answer.why.join(' ')}`);
  await queue.idle();
  const made = await findIssue(database.db, office, answer.issue);
  if (made?.state !== 'issued') throw new Error(`The seed could not be issued: ${made?.failure ?? 'no issue'}`);
  return made;
}
