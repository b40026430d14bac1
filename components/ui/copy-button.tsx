'use client';
import { useEffect, useState } from 'react';

interface CopyButtonProps {
  /** What goes to the clipboard. */
  readonly text: string;
  /** What is copied, for its name: "Copy k, local axes". */
  readonly what: string;
  readonly label?: string;
}

/** Copies a text; says that it did, in place. */
export function CopyButton({ text, what, label = 'Copy' }: CopyButtonProps) {
  const [told, setTold] = useState<string | null>(null);
  useEffect(() => {
    if (told === null) return;
    const later = setTimeout(() => setTold(null), 2500);
    return () => clearTimeout(later);
  }, [told]);
  return (
    <span className="copy no-print">
      <button
        type="button"
        className="link copy-button"
        aria-label={`${label} ${what}`}
        onClick={() => {
          copyText(text).then(
            () => setTold('copied'),
            () => setTold('not copied: the browser does not allow it'),
          );
        }}
      >
        {label}
      </button>
      <span role="status" className="copy-told">
        {told}
      </span>
    </span>
  );
}

/** By the clipboard; where a page has none (no TLS), by selecting the text and copying it as a person would. */
async function copyText(text: string): Promise<void> {
  if (typeof navigator.clipboard?.writeText === 'function') return navigator.clipboard.writeText(text);
  const area = document.createElement('textarea');
  area.value = text;
  area.setAttribute('aria-hidden', 'true');
  area.style.position = 'fixed';
  area.style.opacity = '0';
  document.body.append(area);
  area.select();
  const done = document.execCommand('copy');
  area.remove();
  if (!done) throw new Error('The browser did not copy');
}
