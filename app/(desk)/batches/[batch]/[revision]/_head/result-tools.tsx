import Link from 'next/link';
import { api, pages } from '@/lib/api/addresses';

interface ResultToolsProps {
  readonly batch: number;
  readonly letter: string;
  readonly ready: boolean;
  /** It can be sent to check. */
  readonly checking: boolean;
}

/** What may be taken away from a revision, and the way back to its sheets. */
export function ResultTools({ batch, letter, ready, checking }: ResultToolsProps) {
  return (
    <>
      {checking && <Link href={pages.checking(batch, letter)}>Send to check</Link>}
      {ready ? (
        <>
          <a href={api.part(batch, letter, 'workbook')} download>
            Result workbook
          </a>
          <a href={api.part(batch, letter, 'report')} download>
            Draft report
          </a>
          <a href={`${api.part(batch, letter, 'report')}?frames=flagged`} download>
            Draft of flagged
          </a>
          <a href={api.part(batch, letter, 'csv')} download>
            CSV
          </a>
          <a href={api.part(batch, letter, 'json')} download>
            JSON
          </a>
        </>
      ) : (
        <Link href={pages.sheet(batch, letter, 'run')}>Run</Link>
      )}
      <Link href={pages.size(batch, letter)}>Size sections</Link>
      <Link href={pages.sheet(batch, letter, 'settings')}>Settings</Link>
      <Link href={pages.sheet(batch, letter, 'read')}>What was read</Link>
    </>
  );
}
