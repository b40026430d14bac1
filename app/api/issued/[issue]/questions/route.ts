import { door } from '@/app/_server/door';
import { readJson } from '@/app/_server/input';
import { frameOfIssue } from '@/app/_server/issued-view';
import { atIssue } from '@/app/_server/issue-things';
import { publicQuestion } from '@/app/_server/public-issue';
import { db } from '@/db/client';
import { insertQuestion } from '@/db/queries/issue-acts';
import { listQuestions } from '@/db/queries/issue-questions';
import { ApiError } from '@/lib/api/error';
import { questionInput } from '@/lib/api/issue-inputs';

/** The client's own questions on an issue, with their answers. */
export const GET = door(
  atIssue('read what was issued', async ({ person, issue }) => {
    const questions = await listQuestions(db(), issue.office, issue.id, { person: person.id });
    return Response.json({ questions: questions.map(publicQuestion) });
  }),
);

/** Asks the office about the issue, or about one of its frames. */
export const POST = door(
  atIssue('ask about an issue', async ({ request, person, issue }) => {
    const { frame, text } = await readJson(request, questionInput);
    const about = frame === null || frame === undefined ? null : await frameOfIssue(issue, frame);
    if (about === undefined) {
      const sentence = 'There is no such frame in this issue.';
      throw new ApiError('bad-request', sentence, { fields: { frame: [sentence] } });
    }
    const id = await insertQuestion(db(), issue, { by: person, frame: about, text });
    const found = (await listQuestions(db(), issue.office, issue.id, { person: person.id })).find((one) => one.id === id)!;
    return Response.json({ question: publicQuestion(found) }, { status: 201 });
  }),
);
