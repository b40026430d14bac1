'use client';
import 'katex/dist/katex.min.css';
import { useEffect, useState, type ReactNode } from 'react';
import { latexOf } from '@/lib/checks/working-latex';
import type { WorkingPart } from '@/lib/checks/working-parts';

type Set = (latex: string) => string;

let ready: Set | null = null;

/** The typesetter, fetched with the first calculation that needs it; null until it is there. */
function useTypesetter(): Set | null {
  const [set, keep] = useState<Set | null>(() => ready);
  useEffect(() => {
    if (set !== null) return;
    let wanted = true;
    void import('katex').then(({ default: katex }) => {
      ready = (latex) => katex.renderToString(latex, { throwOnError: false, strict: 'ignore', trust: false });
      if (wanted) keep(() => ready);
    });
    return () => {
      wanted = false;
    };
  }, [set]);
  return set;
}

interface TypesetProps {
  readonly parts: readonly WorkingPart[];
  /** The line as it stands until the typesetter is there, and where scripts don't run. */
  readonly children: ReactNode;
}

/** A line of calculation typeset as the standards print it, with MathML for those who listen to it. */
export function Typeset({ parts, children }: TypesetProps) {
  const set = useTypesetter();
  if (set === null || parts.every((part) => part.kind === 'text')) return children;
  // KaTeX escapes what it is given, and allows no links, images or scripts (trust: false)
  return <span className="w-tex" dangerouslySetInnerHTML={{ __html: set(latexOf(parts)) }} />;
}
