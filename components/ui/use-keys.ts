'use client';
import { useEffect, useRef } from 'react';

export type KeyMap = Readonly<Record<string, () => void>>;

/** True where a key is being typed into something (a tick box takes no letters), or a chord belongs to the browser. */
function taken(event: KeyboardEvent): boolean {
  if (event.defaultPrevented || event.ctrlKey || event.metaKey || event.altKey) return true;
  const target = event.target;
  return (
    target instanceof HTMLElement &&
    target.closest(
      'input:not([type="checkbox"], [type="radio"]), textarea, select, [contenteditable], [role="listbox"], dialog',
    ) !== null
  );
}

/** Single keys for the whole page (`j`, `k`, `1` …), silent while something is being typed. */
export function useKeys(keys: KeyMap): void {
  const latest = useRef(keys);
  useEffect(() => {
    latest.current = keys;
  });
  useEffect(() => {
    const onKey = (event: KeyboardEvent) => {
      if (taken(event)) return;
      const act = latest.current[event.key];
      if (!act) return;
      event.preventDefault();
      act();
    };
    document.addEventListener('keydown', onKey);
    return () => document.removeEventListener('keydown', onKey);
  }, []);
}
