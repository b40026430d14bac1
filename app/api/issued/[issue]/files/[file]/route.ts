import { door } from '@/app/_server/door';
import { issueDownload } from '@/app/_server/issue-download';
import { atIssue } from '@/app/_server/issue-things';

/** A file of what was issued to the client, as it was made: _report_, _workbook_ or _input_. The download is recorded. */
export const GET = door(
  atIssue<'file'>('read what was issued', ({ person, issue, params }) => issueDownload(person, issue, params.file)),
);
