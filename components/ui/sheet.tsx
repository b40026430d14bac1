import type { ReactNode } from 'react';

/** The white drawing sheet on the pad: one ink border, divided into zones by hairlines. */
export function Sheet({ children, wide = true }: { readonly children: ReactNode; readonly wide?: boolean }) {
  return <div className={`page-sheet ${wide ? '' : 'page-sheet-narrow'}`}>{children}</div>;
}

interface ZoneProps {
  readonly title?: ReactNode;
  /** Beside the heading, in ink 2: what the zone shows and how. */
  readonly note?: ReactNode;
  /** At the right of the heading. */
  readonly aside?: ReactNode;
  readonly children?: ReactNode;
  readonly className?: string;
  /** Content runs to the zone's edges (tables, drawings). */
  readonly flush?: boolean;
  readonly level?: 1 | 2 | 3;
}

/** One zone of the sheet, with its heading. */
export function Zone({ title, note, aside, children, className = '', flush = false, level = 2 }: ZoneProps) {
  const Heading = `h${level}` as const;
  return (
    <section className={`zone ${flush ? 'zone-flush' : ''} ${className}`}>
      {(title || aside) && (
        <div className="zone-head">
          <Heading>{title}</Heading>
          {note && <span className="zone-note">{note}</span>}
          {aside && <span className="zone-aside">{aside}</span>}
        </div>
      )}
      {children}
    </section>
  );
}

/** Two zones side by side (916 px and the rest at 1440), the second below the first under 1100 px. */
export function Columns({
  main,
  side,
  className = '',
}: {
  readonly main: ReactNode;
  readonly side: ReactNode;
  readonly className?: string;
}) {
  return (
    <div className={`columns ${className}`}>
      <div className="columns-main">{main}</div>
      <div className="columns-side">{side}</div>
    </div>
  );
}
