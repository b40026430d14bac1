/** A filled triangle with the revision's letter; the earlier of two is outlined. */
export function RevisionMark({ letter, earlier = false }: { readonly letter: string; readonly earlier?: boolean }) {
  return (
    <svg
      className={`rev ${earlier ? 'rev-earlier' : ''}`}
      width="22"
      height="20"
      viewBox="0 0 22 20"
      role="img"
      aria-label={`revision ${letter}`}
    >
      <path d="M11 1 21 19H1z" />
      <text x="11" y="16.2" textAnchor="middle" className={letter.length > 1 ? 'rev-two' : undefined}>
        {letter}
      </text>
    </svg>
  );
}
