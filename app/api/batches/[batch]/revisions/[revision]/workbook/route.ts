import { atRevision } from '@/app/_server/at-revision';
import { door } from '@/app/_server/door';
import { resultDownload } from '@/app/_server/result-download';

/** The result workbook; streamed while a thread writes it. */
export const GET = door(atRevision('take results away', ({ person, revision }) => resultDownload(person, revision, 'workbook')));
