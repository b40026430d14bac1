export interface PropertyShown {
  readonly key: string;
  /** "second moment, major axis" */
  readonly what: string;
  readonly symbol: string;
  /** Null = not available. */
  readonly value: string | null;
  readonly unit: string;
  /** "derived", "nominal" */
  readonly source: string;
}

/** Every property of a section with its unit and where it comes from. */
export function SectionFacts({ name, properties }: { readonly name: string; readonly properties: readonly PropertyShown[] }) {
  return (
    <div className="tbl-scroll" role="region" tabIndex={0} aria-label={`Properties of ${name}, scrolls`}>
      <table className="tbl">
        <caption className="sr-only">Properties of {name}</caption>
        <thead>
          <tr>
            <th scope="col">Property</th>
            <th scope="col">Symbol</th>
            <th scope="col" className="num">
              Value
            </th>
            <th scope="col">Unit</th>
            <th scope="col">Source</th>
          </tr>
        </thead>
        <tbody>
          {properties.map(({ key, what, symbol, value, unit, source }) => (
            <tr key={key}>
              <th scope="row" className="tbl-plain section-fact">
                {what}
              </th>
              <td>{symbol}</td>
              {value === null ? (
                <td colSpan={3} className="section-none">
                  not available
                </td>
              ) : (
                <>
                  <td className="num">{value}</td>
                  <td>{unit}</td>
                  <td>{source}</td>
                </>
              )}
            </tr>
          ))}
        </tbody>
      </table>
    </div>
  );
}
