import { useId } from 'react';

interface MarkProps {
  readonly size?: number;
  /** Empty states draw only the first strokes of the tally. */
  readonly strokes?: 1 | 2 | 3 | 4 | 5;
  readonly label?: string;
}

/** The tally of five, which is also a braced frame: four uprights and a brace at 30° that passes in front. Always ink. */
export function Mark({ size = 24, strokes = 5, label }: MarkProps) {
  const mask = useId();
  const uprights = [5.5, 12.5, 19.5, 26.5].slice(0, Math.min(strokes, 4));
  const named = label ? ({ role: 'img', 'aria-label': label } as const) : ({ 'aria-hidden': true } as const);
  return (
    <svg className="mark" width={size} height={size} viewBox="0 0 32 32" {...named}>
      {strokes === 5 && (
        <mask id={mask} maskUnits="userSpaceOnUse" x="0" y="0" width="32" height="32">
          <path d="M0 0h32v32H0z" fill="#fff" />
          <path d="M-2 26.39 34 5.61" stroke="#000" strokeWidth="6" />
        </mask>
      )}
      <path
        className="mark-stroke"
        d={uprights.map((x) => `M${x} 3v26`).join('')}
        mask={strokes === 5 ? `url(#${mask})` : undefined}
      />
      {strokes === 5 && <path className="mark-stroke" d="M1 24.66 31 7.34" />}
    </svg>
  );
}
