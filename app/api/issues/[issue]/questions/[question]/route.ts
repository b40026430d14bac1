import { door } from '@/app/_server/door';
import { readJson } from '@/app/_server/input';
import { atIssue, requireQuestion } from '@/app/_server/issue-things';
import { publicQuestion } from '@/app/_server/public-issue';
import { db } from '@/db/client';
import { insertAnswer } from '@/db/queries/issue-acts';
import { sayInput } from '@/lib/api/issue-inputs';

/** Answers a client's question; who asked it is told. */
export const POST = door(
  atIssue<'question'>('answer questions', async ({ request, person, issue, params }) => {
    const question = await requireQuestion(person, issue, params.question);
    const { text } = await readJson(request, sayInput);
    await insertAnswer(db(), issue, question, { by: person, text });
    return Response.json({ question: publicQuestion(await requireQuestion(person, issue, params.question)) }, { status: 201 });
  }),
);
