import Link from 'next/link';
import { api, pages } from '@/lib/api/addresses';

interface ResultToolsProps {
  readonly batch: number;
  readonly letter: string;
  readonly ready: boolean;
}

/** What may be taken away from a revision, and the way back to its sheets. */
export function ResultTools({ batch, letter, ready }: ResultToolsProps) {
  return (
    <>
      {ready ? (
        <>
          <a href={api.part(batch, letter, 'workbook')} download>
            Result workbook
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
      <Link href={pages.sheet(batch, letter, 'settings')}>Settings</Link>
      <Link href={pages.sheet(batch, letter, 'read')}>What was read</Link>
    </>
  );
}
