import type { Db } from '@/db/open';
import type { ReportFrames } from '@/lib/issuing/issue-file';
import type { IssueState } from '@/lib/issuing/issue-states';
import type { IssueCover } from '@/lib/reports/issue-cover';

interface Named {
  readonly id: number;
  readonly name: string;
}

export interface IssueRecord {
  readonly id: number;
  readonly office: number;
  readonly project: Named & { readonly number: string | null };
  readonly batch: Named;
  readonly revision: { readonly id: number; readonly letter: string };
  /** As printed, `2604-03`. */
  readonly number: string;
  readonly state: IssueState;
  readonly note: string | null;
  readonly cover: IssueCover;
  readonly reportFrames: ReportFrames;
  /** The issue of the batch before it, and the one that took its place. */
  readonly supersedes: { readonly id: number; readonly number: string } | null;
  readonly supersededBy: { readonly id: number; readonly number: string } | null;
  readonly engine: string;
  readonly issuedBy: Named;
  readonly issuedAt: string;
  /** When clients were told; null while its files are made. */
  readonly handedAt: string | null;
  readonly failure: string | null;
  readonly withdrawn: { readonly by: string; readonly at: string; readonly reason: string } | null;
}

/** An issue in a list, with what came of it. */
export interface IssueListed extends IssueRecord {
  readonly clients: number;
  readonly downloads: number;
  readonly receipts: number;
  readonly questions: number;
  /** Questions whose last word is not the office's. */
  readonly open: number;
}

export async function findIssue(db: Db, office: number, issue: number): Promise<IssueRecord | undefined> {
  const row = await issues(db, office).where('issue.id', '=', issue).executeTakeFirst();
  return row && record(row);
}

/** The issue of a revision: the one that clients have or had, else the one being made, else the one that failed. */
export async function findIssueOfRevision(db: Db, office: number, revision: number): Promise<IssueRecord | undefined> {
  const row = await issues(db, office).where('issue.revision', '=', revision).orderBy('issue.id', 'desc').executeTakeFirst();
  return row && record(row);
}

/** Whether files of a revision's issue are being made: it must stay as it was checked until they are. */
export async function issueInMaking(db: Db, office: number, revision: number): Promise<boolean> {
  const row = await db
    .selectFrom('issue')
    .select('id')
    .where('office', '=', office)
    .where('revision', '=', revision)
    .where('state', '=', 'making')
    .executeTakeFirst();
  return row !== undefined;
}

/** Issues of the office or of one of its projects, the newest first. */
export async function listIssues(
  db: Db,
  office: number,
  of: { readonly project?: number; readonly batch?: number } = {},
): Promise<IssueListed[]> {
  let query = listed(issues(db, office));
  if (of.project !== undefined) query = query.where('issue.project', '=', of.project);
  if (of.batch !== undefined) query = query.where('issue.batch', '=', of.batch);
  const rows = await query.orderBy('issue.id', 'desc').execute();
  return rows.map((row) => ({ ...record(row), ...counts(row) }));
}

/** Issues of a person's own projects that were handed to them, the newest first. */
export async function listIssuesFor(db: Db, office: number, person: number): Promise<IssueListed[]> {
  const rows = await listed(issuesFor(db, office, person))
    .orderBy('issue.id', 'desc')
    .execute();
  return rows.map((row) => ({ ...record(row), ...counts(row) }));
}

/** The same one of them; undefined for whatever else there is. */
export async function findIssueFor(db: Db, office: number, person: number, issue: number): Promise<IssueRecord | undefined> {
  const row = await issuesFor(db, office, person).where('issue.id', '=', issue).executeTakeFirst();
  return row && record(row);
}

export interface IssueClient {
  readonly person: number;
  readonly name: string;
  readonly email: string;
  readonly sentAt: string;
  /** Still one of the office's people, and of the project. */
  readonly active: boolean;
  readonly receivedAt: string | null;
}

export async function listIssueClients(db: Db, office: number, issue: number): Promise<IssueClient[]> {
  const rows = await db
    .selectFrom('issue_client')
    .innerJoin('issue', 'issue.id', 'issue_client.issue')
    .innerJoin('person', 'person.id', 'issue_client.person')
    .leftJoin('receipt', (join) =>
      join.onRef('receipt.issue', '=', 'issue_client.issue').onRef('receipt.person', '=', 'issue_client.person'),
    )
    .leftJoin('membership', (join) =>
      join
        .onRef('membership.person', '=', 'issue_client.person')
        .onRef('membership.office', '=', 'issue.office')
        .on('membership.ended_at', 'is', null),
    )
    .leftJoin('project_person', (join) =>
      join.onRef('project_person.person', '=', 'issue_client.person').onRef('project_person.project', '=', 'issue.project'),
    )
    .select([
      'issue_client.person',
      'issue_client.name',
      'person.email',
      'issue_client.sent_at as sentAt',
      'receipt.at as receivedAt',
      'membership.role as role',
      'project_person.created_at as assigned',
    ])
    .where('issue.office', '=', office)
    .where('issue_client.issue', '=', issue)
    .orderBy('issue_client.name')
    .execute();
  return rows.map(({ role, assigned, ...row }) => ({ ...row, active: role !== null && assigned !== null }));
}

function issues(db: Db, office: number) {
  return db
    .selectFrom('issue')
    .innerJoin('project', 'project.id', 'issue.project')
    .innerJoin('batch', 'batch.id', 'issue.batch')
    .innerJoin('revision', 'revision.id', 'issue.revision')
    .innerJoin('person as issuer', 'issuer.id', 'issue.issued_by')
    .leftJoin('issue as earlier', 'earlier.id', 'issue.supersedes')
    .leftJoin('issue as later', (join) =>
      join.onRef('later.supersedes', '=', 'issue.id').on('later.state', 'not in', ['making', 'failed']),
    )
    .leftJoin('person as withdrawer', 'withdrawer.id', 'issue.withdrawn_by')
    .selectAll('issue')
    .select([
      'project.name as project_name',
      'project.number as project_number',
      'batch.name as batch_name',
      'revision.letter',
      'issuer.name as issuer_name',
      'earlier.number as earlier_number',
      'later.id as later_id',
      'later.number as later_number',
      'withdrawer.name as withdrawer_name',
    ])
    .where('issue.office', '=', office);
}

/** What a client may know of: handed over, to them, in a project they are still assigned to. */
function issuesFor(db: Db, office: number, person: number) {
  return issues(db, office)
    .where('issue.state', 'in', ['issued', 'superseded', 'withdrawn'])
    .where('issue.id', 'in', (eb) => eb.selectFrom('issue_client').select('issue').where('person', '=', person))
    .where('issue.project', 'in', (eb) => eb.selectFrom('project_person').select('project').where('person', '=', person));
}

function listed(query: ReturnType<typeof issues>) {
  return query.select((eb) => {
    const asked = () => eb.selectFrom('question').whereRef('question.issue', '=', 'issue.id');
    return [
      eb
        .selectFrom('issue_client')
        .select((one) => one.fn.countAll<number>().as('n'))
        .whereRef('issue_client.issue', '=', 'issue.id')
        .$asScalar()
        .as('clients'),
      eb
        .selectFrom('download')
        .select((one) => one.fn.countAll<number>().as('n'))
        .whereRef('download.issue', '=', 'issue.id')
        .$asScalar()
        .as('downloads'),
      eb
        .selectFrom('receipt')
        .select((one) => one.fn.countAll<number>().as('n'))
        .whereRef('receipt.issue', '=', 'issue.id')
        .$asScalar()
        .as('receipts'),
      asked()
        .select((one) => one.fn.countAll<number>().as('n'))
        .$asScalar()
        .as('questions'),
      asked()
        .select((one) => one.fn.countAll<number>().as('n'))
        .where((one) => {
          const last = one
            .selectFrom('answer')
            .select('answer.person')
            .whereRef('answer.question', '=', 'question.id')
            .orderBy('answer.id', 'desc')
            .limit(1);
          return one(one.fn.coalesce(last, one.ref('question.person')), '=', one.ref('question.person'));
        })
        .$asScalar()
        .as('open'),
    ];
  });
}

type Read = Awaited<ReturnType<ReturnType<typeof issues>['executeTakeFirstOrThrow']>>;

function counts(row: Readonly<Record<'clients' | 'downloads' | 'receipts' | 'questions' | 'open', number | null>>) {
  const { clients, downloads, receipts, questions, open } = row;
  return {
    clients: clients ?? 0,
    downloads: downloads ?? 0,
    receipts: receipts ?? 0,
    questions: questions ?? 0,
    open: open ?? 0,
  };
}

function record(row: Read): IssueRecord {
  return {
    id: row.id,
    office: row.office,
    project: { id: row.project, name: row.project_name, number: row.project_number },
    batch: { id: row.batch, name: row.batch_name },
    revision: { id: row.revision, letter: row.letter },
    number: row.number,
    state: row.state,
    note: row.note,
    cover: JSON.parse(row.cover) as IssueCover,
    reportFrames: JSON.parse(row.report_frames) as ReportFrames,
    supersedes: row.supersedes === null ? null : { id: row.supersedes, number: row.earlier_number ?? '' },
    supersededBy: row.later_id === null ? null : { id: row.later_id, number: row.later_number ?? '' },
    engine: row.engine,
    issuedBy: { id: row.issued_by, name: row.issuer_name },
    issuedAt: row.issued_at,
    handedAt: row.handed_at,
    failure: row.failure,
    withdrawn:
      row.withdrawn_at === null
        ? null
        : { by: row.withdrawer_name ?? '', at: row.withdrawn_at, reason: row.withdrawn_reason ?? '' },
  };
}
