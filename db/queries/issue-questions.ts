import type { Db } from '@/db/open';

export interface PostRecord {
  readonly person: number;
  readonly name: string;
  readonly text: string;
  readonly at: string;
}

/** A question with what was said to it since, by the office and by who asked. */
export interface QuestionRecord extends PostRecord {
  readonly id: number;
  readonly issue: number;
  /** Place of the frame in sheet order, from 0; null = on the whole issue. */
  readonly frame: number | null;
  readonly frameId: string | null;
  readonly answers: readonly PostRecord[];
  /** The last word is not the office's. */
  readonly open: boolean;
}

/** Questions on an issue, the oldest first. @param of only those of one who asked */
export async function listQuestions(
  db: Db,
  office: number,
  issue: number,
  of: { readonly person?: number } = {},
): Promise<QuestionRecord[]> {
  let query = db
    .selectFrom('question')
    .innerJoin('person', 'person.id', 'question.person')
    .select([
      'question.id',
      'question.issue',
      'question.person',
      'person.name',
      'question.frame',
      'question.frame_id as frameId',
      'question.text',
      'question.at',
    ])
    .where('question.office', '=', office)
    .where('question.issue', '=', issue);
  if (of.person !== undefined) query = query.where('question.person', '=', of.person);
  const rows = await query.orderBy('question.id').execute();
  if (rows.length === 0) return [];
  const answers = await db
    .selectFrom('answer')
    .innerJoin('person', 'person.id', 'answer.person')
    .select(['answer.question', 'answer.person', 'person.name', 'answer.text', 'answer.at'])
    .where('answer.office', '=', office)
    .where(
      'answer.question',
      'in',
      rows.map(({ id }) => id),
    )
    .orderBy('answer.id')
    .execute();
  return rows.map((row) => {
    const own = answers.filter(({ question }) => question === row.id).map(({ question: _of, ...post }) => post);
    return { ...row, answers: own, open: (own.at(-1)?.person ?? row.person) === row.person };
  });
}
