import { door } from '@/app/_server/door';
import { issueDownload } from '@/app/_server/issue-download';
import { atIssue } from '@/app/_server/issue-things';

/** A file of an issue as it was made: _report_, _workbook_ or _input_. The download is recorded. */
export const GET = door(atIssue<'file'>('read issues', ({ person, issue, params }) => issueDownload(person, issue, params.file)));
