import { atRevision } from '@/app/_server/at-revision';
import { door } from '@/app/_server/door';
import { reportDownload } from '@/app/_server/report-download';

/** The calculation report as a draft, `?frames=` all, flagged, or places in sheet order; streamed while a thread writes it. */
export const GET = door(
  atRevision('take results away', ({ request, person, revision }) =>
    reportDownload(person, revision, new URL(request.url).searchParams.get('frames') ?? 'all'),
  ),
);
