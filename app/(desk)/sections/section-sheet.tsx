import { SectionFacts, type PropertyShown } from '@/components/sections/section-facts';
import { SectionPicture } from '@/components/sections/section-picture';
import { Zone } from '@/components/ui/sheet';
import { columnsOfLibrary, libraryNumber, libraryUnit } from '@/lib/library/columns-of-library';
import type { LibraryRow } from '@/lib/library/library-view';
import { sectionOutline } from '@/lib/library/section-outline';
import { ranges } from '@/lib/sections/library';
import { fromSI, unitLabel } from '@/lib/units/batch-unit';
import { formatNumber } from '@/lib/units/format';
import type { System } from '@/lib/units/quantity';

const dimensionWords = { h: 'depth', b: 'width', tw: 'web', tf: 'flange', t: 'wall', d: 'diameter', r: 'radius' } as const;

/** As the standard writes it: 7.1, not 7.100. */
const dimension = (si: number, units: System): string => String(Number(fromSI(si, 'dimension', units).toPrecision(4)));

/** One section of the library: its picture to scale, dimensions and every property. */
export function SectionSheet({ chosen, units }: { readonly chosen: LibraryRow; readonly units: System }) {
  const { section, row, range } = chosen;
  const name = section.designation ?? section.name;
  const length = (si: number | null): string => `${si === null ? '–' : dimension(si, units)} ${unitLabel('dimension', units)}`;
  const dimensions = (Object.keys(dimensionWords) as (keyof typeof dimensionWords)[]).flatMap((key): PropertyShown[] => {
    const si = section.dimensions?.[key] ?? null;
    if (si === null) return [];
    const value = dimension(si, units);
    return [{ key, what: dimensionWords[key], symbol: key, value, unit: unitLabel('dimension', units), source: 'nominal' }];
  });
  const properties = columnsOfLibrary
    .filter(({ key }) => key !== 'depth' && key !== 'width')
    .map(({ key, label, what, quantity, value }): PropertyShown => {
      const si = value(section);
      const text = si === null ? null : formatNumber(libraryNumber(si, quantity, units), { significant: 4 });
      return { key: `of-${key}`, what, symbol: label, value: text, unit: libraryUnit(quantity, units), source: 'derived' };
    });
  const { standard, made } = ranges[range];
  return (
    <Zone title={name} note={`${range}, ${standard}`}>
      <SectionPicture
        outline={sectionOutline(row.dimensions)}
        name={name}
        depth={length(section.properties.depth_m)}
        width={length(section.properties.width_m)}
      />
      <p className="section-facts">
        Nominal dimensions of {standard}
        {made === null ? '' : `, ${made}`}. Properties are derived from them, fillets and corner radii included, and are what is
        computed with. Mass is that of steel of 7,850 kg/m³. Not available: there is no closed form for this shape.
      </p>
      <SectionFacts name={name} properties={[...dimensions, ...properties]} />
    </Zone>
  );
}
