import { useId } from 'react';

/** The mark, drawn large with its dimensions; centre lines are blue, so they would not print. */
export function SignInDrawing() {
  const mask = useId();
  const uprights = [5.5, 12.5, 19.5, 26.5];
  return (
    <svg
      className="si-mark"
      viewBox="-8 -3 50 42"
      role="img"
      aria-label="The mark of Tallyframe, dimensioned: four uprights at 7, 26 high, and a brace at 30 degrees"
    >
      <mask id={mask} maskUnits="userSpaceOnUse" x="-8" y="-4" width="52" height="44">
        <path d="M-8-4h52v44H-8z" fill="#fff" />
        <path d="M-2 26.39 34 5.61" stroke="#000" strokeWidth="6" />
      </mask>
      <path className="mark-stroke" d={uprights.map((x) => `M${x} 3v26`).join('')} mask={`url(#${mask})`} />
      <path className="mark-stroke" d="M1 24.66 31 7.34" />
      <path className="si-centre" d={`${uprights.map((x) => `M${x} 0.6V31.4`).join('')}M-1 25.8 33 6.2`} />
      <path
        className="si-dim"
        d="M-1.2 3V29M-1.9 3h1.4M-1.9 29h1.4M5.5 33H26.5M5.5 32.3v1.4M12.5 32.3v1.4M19.5 32.3v1.4M26.5 32.3v1.4"
      />
      <path className="si-tick" d={`M-1.5 3.3l.6-.6M-1.5 29.3l.6-.6${uprights.map((x) => `M${x - 0.3} 33.3l.6-.6`).join('')}`} />
      <text x="9" y="32.5" textAnchor="middle">
        7
      </text>
      <text x="16" y="32.5" textAnchor="middle">
        7
      </text>
      <text x="23" y="32.5" textAnchor="middle">
        7
      </text>
      <text transform="translate(-1.6 16)rotate(-90)" textAnchor="middle">
        26
      </text>
      <text x="33.8" y="6.4">
        30°
      </text>
    </svg>
  );
}
