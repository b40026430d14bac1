export type CheckMarkKind = 'seen' | 'queried' | 'accepted';

/** Strokes of a hand on a 12 px square: a tick, a query, a tick underlined. */
export const checkMarkPaths: Readonly<Record<CheckMarkKind, string>> = {
  seen: 'M1.5 6.5 4.5 9.5 10.5 2',
  queried: 'M3 3.6C3.2 1.8 4.6 1 6 1c1.9 0 3.2 1.2 3.2 2.8C9.2 6 6.2 6 6.2 8.2M6.2 10.9v.2',
  accepted: 'M2 4.8 4.8 7.6 10.5 .8M1.5 11H10.5',
};

/** A checker's mark, in green pencil; its word stands beside it or is told by `label`. */
export function CheckMark({ kind, size = 13, label }: { kind: CheckMarkKind; size?: number; label?: string }) {
  const named = label ? ({ role: 'img', 'aria-label': label } as const) : ({ 'aria-hidden': true } as const);
  return (
    <svg className="ck-mark" width={size} height={size} viewBox="0 0 12 12" {...named}>
      <path d={checkMarkPaths[kind]} />
    </svg>
  );
}
