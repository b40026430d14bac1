import Link from 'next/link';
import { Button } from '@/components/ui/button';
import { Field } from '@/components/ui/field';
import { pages } from '@/lib/api/addresses';
import { boundedKeys, libraryColumn, libraryUnit } from '@/lib/library/columns-of-library';
import type { LibraryView } from '@/lib/library/library-view';
import { rangeNames, ranges } from '@/lib/sections/library';

/** What of the library is shown: a form that is its address, and works without a script. */
export function LibraryFilter({ view, params }: { readonly view: LibraryView; readonly params: URLSearchParams }) {
  const filtered = view.bounds.length > 0 || view.range !== null || view.search !== '';
  return (
    // a form of its own for each address: what was typed for one is nothing to another
    <form key={params.toString()} className="section-filter" action={pages.sections} role="search" aria-label="Sections">
      <Field
        className="section-search"
        label="Designation"
        name="q"
        type="search"
        defaultValue={view.search}
        placeholder="IPE 300, 305x165x40 UB, W12X26"
      />
      <label className="section-pick">
        Range
        <select name="range" defaultValue={view.range ?? ''}>
          <option value="">all ranges</option>
          {rangeNames.map((name) => (
            <option key={name} value={name}>
              {name} ({ranges[name].standard})
            </option>
          ))}
        </select>
      </label>
      <label className="section-pick">
        Units
        <select name="units" defaultValue={view.units}>
          <option value="metric">metric</option>
          <option value="us">US</option>
        </select>
      </label>
      {view.sort && <input type="hidden" name="sort" value={`${view.sort.descending ? '-' : ''}${view.sort.column}`} />}
      <Button type="submit" look="filled">
        Show
      </Button>
      {filtered && (
        <Link className="link" href={pages.sections}>
          Show every section
        </Link>
      )}
      <details className="section-bounds" open={view.bounds.length > 0}>
        <summary>Filter by property</summary>
        <div className="section-bound-grid">
          {boundedKeys.map((key) => {
            const { label, what, quantity } = libraryColumn(key)!;
            const unit = libraryUnit(quantity, view.units);
            return (
              <fieldset key={key} className="section-bound">
                <legend>
                  {label} <span className="unit">{unit}</span>
                </legend>
                {(['min', 'max'] as const).map((side) => (
                  <input
                    key={side}
                    name={`${side}-${key}`}
                    inputMode="decimal"
                    aria-label={`${what} in ${unit}, at ${side === 'min' ? 'least' : 'most'}`}
                    placeholder={side === 'min' ? 'at least' : 'at most'}
                    defaultValue={params.get(`${side}-${key}`) ?? ''}
                  />
                ))}
              </fieldset>
            );
          })}
        </div>
      </details>
    </form>
  );
}
