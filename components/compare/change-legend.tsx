const shapes: readonly { readonly name: string; readonly look: string; readonly path: string }[] = [
  { name: 'moved up', look: 'up', path: 'M1 10H11L6 1z' },
  { name: 'moved down', look: 'down', path: 'M1 2H11L6 11z' },
  { name: 'became over', look: 'over', path: 'M1 11V1L6 5 11 1V11z' },
  { name: 'became near', look: 'near', path: 'M1 10H11L6 1z' },
  { name: 'became within', look: 'within', path: 'M2 2H10L6 10z' },
  { name: 'became not checked', look: 'unchecked', path: 'M1.5 11V2h9V11' },
  { name: 'as it was', look: 'same', path: 'M1 6h10' },
];

/** What each shape of the strip of changes is. */
export function ChangeLegend() {
  return (
    <ul className="compare-legend" aria-label="Shapes of the strip">
      {shapes.map(({ name, look, path }) => (
        <li key={name}>
          <svg className="compare-key" width="13" height="13" viewBox="0 0 12 12" aria-hidden="true">
            <path className={`change-${look}`} d={path} />
          </svg>
          {name}
        </li>
      ))}
    </ul>
  );
}
