/** Queries of a checker: threads on a frame, member or check, closed by who raised them. */
import { instant } from '@/db/clock';
import type { Db } from '@/db/open';
import { insertCheckingActivity } from '@/db/queries/checking-activity';
import { markable, type MarkedFrame } from '@/db/queries/checking-marks';
import type { RevisionRecord } from '@/db/queries/revisions';
import { canBeAnswered } from '@/lib/checking/checking-states';

export interface QueryMessage {
  readonly by: string;
  readonly at: string;
  readonly text: string;
}

export interface QueryRecord {
  readonly id: number;
  /** Letter of the revision it was raised on. */
  readonly revision: string;
  /** Place of its frame in sheet order, from 0, and the frame's name. */
  readonly frame: number;
  readonly frameId: string;
  readonly subject: string | null;
  readonly check: string | null;
  readonly raisedBy: { readonly id: number; readonly name: string };
  readonly raisedAt: string;
  readonly inputHash: string;
  readonly engine: string;
  readonly closed: { readonly name: string; readonly at: string } | null;
  readonly messages: readonly QueryMessage[];
}

/** Queries of a revision, or of one frame of it, the first raised first. */
export async function listQueries(db: Db, office: number, revision: number, frame?: number): Promise<QueryRecord[]> {
  let query = queries(db, office).where('checking_query.revision', '=', revision);
  if (frame !== undefined) query = query.where('checking_query.frame', '=', frame);
  return withMessages(db, await query.execute());
}

/** Queries raised on earlier revisions of a revision's batch, on the frame of this name or on all. */
export async function listEarlierQueries(
  db: Db,
  { office, batch, id }: Pick<RevisionRecord, 'office' | 'batch' | 'id'>,
  frameId?: string,
): Promise<QueryRecord[]> {
  let query = queries(db, office)
    .where('revision.batch', '=', batch)
    .where('revision.ordinal', '<', (eb) => eb.selectFrom('revision as own').select('own.ordinal').where('own.id', '=', id));
  if (frameId !== undefined) query = query.where('revision_frame.frame_id', '=', frameId);
  return withMessages(db, await query.execute());
}

/** Raises a query on a frame, one of its members or nodes, or one of its checks. @returns its id, or why not */
export async function insertQuery(
  db: Db,
  revision: RevisionRecord,
  frame: MarkedFrame,
  by: { readonly id: number },
  asked: { readonly subject: string | null; readonly check: string | null; readonly text: string },
): Promise<number | string> {
  return db.transaction().execute(async (within) => {
    const against = await markable(within, revision);
    if (against !== null) return against;
    const at = instant();
    const { id } = await within
      .insertInto('checking_query')
      .values({
        office: revision.office,
        revision: revision.id,
        frame: frame.index,
        subject: asked.subject,
        check_name: asked.check,
        raised_by: by.id,
        raised_at: at,
        input_sha256: revision.input?.sha256 ?? '',
        engine: frame.engine,
        closed_by: null,
        closed_at: null,
      })
      .returning('id')
      .executeTakeFirstOrThrow();
    await within.insertInto('checking_message').values({ query: id, person: by.id, at, text: asked.text }).execute();
    await insertCheckingActivity(within, revision, by, 'raised a query', { query: id, frame: frame.id, text: asked.text });
    return id;
  });
}

/**
 * Adds to a query, closes it, or both. Only who raised it closes it, or, where they have left the office, another who may check.
 *
 * @param mayClose the person may check the revision
 * @returns why not, in a sentence; null = done; undefined where the revision has no such query
 */
export async function answerQuery(
  db: Db,
  revision: RevisionRecord,
  query: number,
  by: { readonly id: number },
  { text, close, mayClose }: { readonly text: string | null; readonly close: boolean; readonly mayClose: boolean },
): Promise<string | null | undefined> {
  return db.transaction().execute(async (within) => {
    const row = await within
      .selectFrom('checking_query')
      .innerJoin('revision', 'revision.id', 'checking_query.revision')
      .innerJoin('person', 'person.id', 'checking_query.raised_by')
      .leftJoin('membership', (join) =>
        join
          .onRef('membership.person', '=', 'checking_query.raised_by')
          .onRef('membership.office', '=', 'checking_query.office')
          .on('membership.ended_at', 'is', null),
      )
      .select([
        'checking_query.raised_by',
        'checking_query.closed_at',
        'revision.state',
        'person.name',
        'membership.person as there',
      ])
      .where('checking_query.id', '=', query)
      .where('checking_query.revision', '=', revision.id)
      .where('checking_query.office', '=', revision.office)
      .executeTakeFirst();
    if (!row) return undefined;
    if (!canBeAnswered(row.state)) return `A revision that is ${row.state} is frozen with its queries.`;
    if (row.closed_at !== null) return 'This query is closed. Raise another.';
    if (close && row.raised_by !== by.id && (row.there !== null || !mayClose))
      return `Only ${row.name}, who raised it, closes this query.`;
    const at = instant();
    if (text !== null) await within.insertInto('checking_message').values({ query, person: by.id, at, text }).execute();
    if (text !== null) await insertCheckingActivity(within, revision, by, 'answered a query', { query, text });
    if (close) {
      await within.updateTable('checking_query').set({ closed_by: by.id, closed_at: at }).where('id', '=', query).execute();
      await insertCheckingActivity(within, revision, by, 'closed a query', { query });
    }
    return null;
  });
}

function queries(db: Db, office: number) {
  return db
    .selectFrom('checking_query')
    .innerJoin('revision', 'revision.id', 'checking_query.revision')
    .innerJoin('revision_frame', (join) =>
      join
        .onRef('revision_frame.revision', '=', 'checking_query.revision')
        .onRef('revision_frame.frame', '=', 'checking_query.frame'),
    )
    .innerJoin('person as raiser', 'raiser.id', 'checking_query.raised_by')
    .leftJoin('person as closer', 'closer.id', 'checking_query.closed_by')
    .selectAll('checking_query')
    .select(['revision.letter', 'revision_frame.frame_id', 'raiser.name as raiser_name', 'closer.name as closer_name'])
    .where('checking_query.office', '=', office)
    .where('revision.office', '=', office)
    .orderBy('checking_query.id');
}

type Read = Awaited<ReturnType<ReturnType<typeof queries>['execute']>>[number];

async function withMessages(db: Db, rows: readonly Read[]): Promise<QueryRecord[]> {
  if (rows.length === 0) return [];
  const messages = await db
    .selectFrom('checking_message')
    .innerJoin('person', 'person.id', 'checking_message.person')
    .select(['checking_message.query', 'person.name', 'checking_message.at', 'checking_message.text'])
    .where(
      'checking_message.query',
      'in',
      rows.map(({ id }) => id),
    ) // prettier-ignore
    .orderBy('checking_message.id')
    .execute();
  return rows.map((row) => ({
    id: row.id,
    revision: row.letter,
    frame: row.frame,
    frameId: row.frame_id,
    subject: row.subject,
    check: row.check_name,
    raisedBy: { id: row.raised_by, name: row.raiser_name },
    raisedAt: row.raised_at,
    inputHash: row.input_sha256,
    engine: row.engine,
    closed: row.closed_at === null ? null : { name: row.closer_name ?? '', at: row.closed_at },
    messages: messages.filter(({ query }) => query === row.id).map(({ name, at, text }) => ({ by: name, at, text })),
  }));
}
