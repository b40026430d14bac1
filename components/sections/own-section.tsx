import { SectionFacts, type PropertyShown } from '@/components/sections/section-facts';
import { SectionPicture } from '@/components/sections/section-picture';
import { columnsOfLibrary, libraryNumber, libraryUnit } from '@/lib/library/columns-of-library';
import { outlineOfSection } from '@/lib/library/own-outline';
import type { Section, SectionProperties } from '@/lib/model/frame';
import { fromSI, unitLabel } from '@/lib/units/batch-unit';
import { formatNumber } from '@/lib/units/format';
import type { System } from '@/lib/units/quantity';

export const dimensionWords = { h: 'depth', b: 'width', tw: 'web', tf: 'flange', t: 'wall', d: 'diameter', r: 'radius' } as const;

/** The property that a column shows, for its source. */
const keys: Readonly<Record<string, keyof SectionProperties>> = {
  mass: 'A_m2', depth: 'depth_m', width: 'width_m', A: 'A_m2', I: 'I_m4', W: 'Wtop_m3', Wpl: 'Wpl_m3', Iminor: 'Iminor_m4',
  Wminor: 'Wminor_m3', WplMinor: 'WplMinor_m3', It: 'It_m4', Iw: 'Iw_m6', Av: 'AvPeak_m2', t: 't_m',
}; // prettier-ignore

/** As it was typed: 7.1, not 7.100. */
const dimension = (si: number, units: System): string => String(Number(fromSI(si, 'dimension', units).toPrecision(5)));

/** One of the office's own sections: its picture to scale, and every dimension and property with where it comes from. */
export function OwnSection({ section, units }: { readonly section: Section; readonly units: System }) {
  const { name, properties, sources } = section;
  const unit = unitLabel('dimension', units);
  const length = (si: number | null): string => (si === null ? '–' : `${dimension(si, units)} ${unit}`);
  const dimensions = (Object.keys(dimensionWords) as (keyof typeof dimensionWords)[]).flatMap((key): PropertyShown[] => {
    const si = section.dimensions?.[key] ?? null;
    return si === null
      ? []
      : [{ key, what: dimensionWords[key], symbol: key, value: dimension(si, units), unit, source: 'given' }];
  });
  const shown = columnsOfLibrary
    .filter(({ key }) => section.dimensions === null || (key !== 'depth' && key !== 'width'))
    .map(({ key, label, what, quantity, value }): PropertyShown => {
      const typedShear = key === 'Av' && properties.AvTyped_m2 !== null;
      const si = typedShear ? properties.AvTyped_m2 : value(section);
      const of = keys[key];
      const given = typedShear || (of !== undefined && sources[of] === 'typed');
      return {
        key: `of-${key}`,
        what: typedShear ? 'shear area along the depth' : what,
        symbol: label,
        value: si === null ? null : formatNumber(libraryNumber(si, quantity, units), { significant: 4 }),
        unit: libraryUnit(quantity, units),
        source: given && key !== 'mass' ? 'given' : 'derived',
      };
    });
  const outline = outlineOfSection(section);
  return (
    <>
      {outline ? (
        <SectionPicture outline={outline} name={name} depth={length(properties.depth_m)} width={length(properties.width_m)} />
      ) : (
        <p className="section-facts">Given by its properties: there is no shape to draw.</p>
      )}
      <SectionFacts name={name} properties={[...dimensions, ...shown]} />
    </>
  );
}
