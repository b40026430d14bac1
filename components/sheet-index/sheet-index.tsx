'use client';
import Link from 'next/link';
import { useRouter } from 'next/navigation';
import type { ReactNode } from 'react';
import { useKeys, type KeyMap } from '../ui/use-keys';

export interface IndexSheet {
  readonly label: string;
  /** null: not there yet for this revision. */
  readonly href: string | null;
  readonly count?: number | null;
  readonly current?: boolean;
}

interface SheetIndexProps {
  /** In order: the first is 1. */
  readonly sheets: readonly IndexSheet[];
  /** Links and buttons in blue at the right. */
  readonly tools?: ReactNode;
}

/** The revision's views numbered like a drawing set; keys 1–9 go there. */
export function SheetIndex({ sheets, tools }: SheetIndexProps) {
  const router = useRouter();
  const keys: KeyMap = Object.fromEntries(
    sheets.slice(0, 9).flatMap(({ href }, index) => (href ? [[String(index + 1), () => router.push(href)]] : [])),
  );
  useKeys(keys);
  return (
    <nav className="sheet-index" aria-label="Sheets of this revision">
      <ol>
        {sheets.map((sheet, index) => (
          <li key={sheet.label}>
            {sheet.href ? (
              <Link href={sheet.href} aria-current={sheet.current ? 'page' : undefined}>
                <Inside sheet={sheet} number={index + 1} />
              </Link>
            ) : (
              <span>
                <Inside sheet={sheet} number={index + 1} />
              </span>
            )}
          </li>
        ))}
      </ol>
      {tools && <div className="si-tools">{tools}</div>}
    </nav>
  );
}

function Inside({ sheet, number }: { sheet: IndexSheet; number: number }) {
  return (
    <>
      <span className="si-number">{number}</span>
      {sheet.label}
      {sheet.count !== undefined && sheet.count !== null && (
        <span className="si-count">{sheet.count.toLocaleString('en-GB')}</span>
      )}
    </>
  );
}
