import { forNobody, type Reader } from '@/lib/intake/reader';
import { type Row, rawCell } from '@/lib/intake/table';
import type { PropertySource, Section, SectionProperties } from '@/lib/model/frame';
import * as say from '@/lib/problems/wording';

const columns = {
  A_m2: 'A', I_m4: 'I', Wtop_m3: 'W top', Wbottom_m3: 'W bottom', depth_m: 'depth', AvTyped_m2: 'Av', Wpl_m3: 'Wpl',
  Iminor_m4: 'I minor', Wminor_m3: 'W minor', WplMinor_m3: 'Wpl minor', It_m4: 'It', Iw_m6: 'Iw', t_m: 't',
} as const; // prettier-ignore
type Typed = keyof typeof columns;

/** Properties that a row may type, with their columns. */
export const propertyColumns = Object.entries(columns) as readonly (readonly [Typed, string])[];

type Values = Partial<Record<Typed | 'W', number>>;

/** The properties that a row types, in SI; undefined where a cell is wrong (told). */
function typedValues(row: Row, reader: Reader): Values | undefined {
  const values: Values = {};
  let sound = true;
  const take = (key: Typed | 'W', column: string): void => {
    const value = reader.number(row, column, forNobody);
    if (value === undefined) sound = false;
    else if (value !== null) {
      const least = key === 'Iw_m6' ? value >= 0 : value > 0;
      if (least) values[key] = value;
      else {
        reader.tell(
          row,
          column,
          { code: 'not-positive', message: say.notPositive(column, rawCell(row, column)?.text ?? '') },
          forNobody,
        );
        sound = false;
      }
    }
  };
  for (const key of Object.keys(columns) as Typed[]) take(key, columns[key]);
  take('W', 'W');
  return sound ? values : undefined;
}

/** Published beside derived: further apart is more than rounding. */
const mostApart = 0.1;

/** A section of a shape with published properties: these are used as given, the others as the dimensions give them. */
export function withPublished(row: Row, section: Section, reader: Reader): Section | undefined {
  const values = typedValues(row, reader);
  if (!values) return undefined;
  const properties: Record<string, number | null> = { ...section.properties };
  const sources: Partial<Record<keyof SectionProperties, PropertySource>> = { ...section.sources };
  const put = (key: Typed, value: number | undefined, column: string): void => {
    if (value === undefined) return;
    const before = section.properties[key];
    if (before !== null && Math.abs(value / before - 1) > mostApart) {
      const message = say.publishedFar(column, value / before - 1);
      reader.tell(row, column, { code: 'suspect-unit', message }, forNobody);
    }
    properties[key] = value;
    sources[key] = 'typed';
  };
  for (const key of Object.keys(columns) as Typed[]) {
    // of a hollow section t is the wall, which its shape has read
    if (key === 't_m' && (section.shape === 'rhs' || section.shape === 'chs')) continue;
    const ofW = key === 'Wtop_m3' || key === 'Wbottom_m3';
    const column = ofW && values[key] === undefined ? 'W' : columns[key];
    put(key, values[key] ?? (ofW ? values.W : undefined), column);
  }
  return { ...section, properties: properties as unknown as SectionProperties, sources };
}

/**
 * A section given by its properties. W from I and depth only if neither W is given: "taken as symmetric".
 *
 * @param outer depth and width in m of a published section whose shape is not given
 */
export function readProperties(
  row: Row,
  name: string,
  reader: Reader,
  outer: { readonly h?: number; readonly b?: number } = {},
): Section | undefined {
  const values = typedValues(row, reader);
  if (!values) return undefined;
  if (outer.h !== undefined) values.depth_m ??= outer.h;
  let sound = true;
  for (const key of ['A_m2', 'I_m4'] as const) {
    if (values[key] !== undefined) continue;
    reader.tell(row, columns[key], { code: 'not-a-number', message: say.propertyMissing(columns[key]) }, forNobody);
    sound = false;
  }
  const { A_m2: A, I_m4: I, depth_m: depth } = values;
  if (!sound || A === undefined || I === undefined) return undefined;
  const sources: Partial<Record<keyof SectionProperties, PropertySource>> = {};
  for (const key of Object.keys(columns) as Typed[]) if (values[key] !== undefined) sources[key] = 'typed';
  let top = values.Wtop_m3 ?? values.W;
  let bottom = values.Wbottom_m3 ?? values.W;
  if (outer.b !== undefined) sources.width_m = 'typed';
  if (values.W !== undefined) sources.Wtop_m3 = sources.Wbottom_m3 = 'typed';
  if (top === undefined && bottom === undefined && depth !== undefined) {
    top = bottom = (2 * I) / depth;
    sources.Wtop_m3 = sources.Wbottom_m3 = 'derived';
    reader.tell(row, 'I', { code: 'derived', message: say.symmetricModulus() }, forNobody);
  }
  if (depth !== undefined) suspectInertia(row, A, I, depth, reader);
  const properties: SectionProperties = {
    A_m2: A,
    I_m4: I,
    Wtop_m3: top ?? null,
    Wbottom_m3: bottom ?? null,
    depth_m: depth ?? null,
    width_m: outer.b ?? null,
    AvTyped_m2: values.AvTyped_m2 ?? null,
    AvPeak_m2: null,
    AvPeakTurned_m2: null,
    AvShear_m2: null,
    AvShearTurned_m2: null,
    Wpl_m3: values.Wpl_m3 ?? null,
    Iminor_m4: values.Iminor_m4 ?? null,
    Wminor_m3: values.Wminor_m3 ?? null,
    WplMinor_m3: values.WplMinor_m3 ?? null,
    It_m4: values.It_m4 ?? null,
    Iw_m6: values.Iw_m6 ?? null,
    t_m: values.t_m ?? null,
  };
  return { name, designation: null, shape: null, made: null, dimensions: null, properties, sources };
}

/** No section of depth h has I above A·h²/4 (all of it in the two faces); below A·h²/30 a unit has likely slipped. */
function suspectInertia(row: Row, A: number, I: number, h: number, reader: Reader): void {
  const ratio = I / (A * h * h);
  if (ratio > 0.25 * (1 + 1e-9)) reader.tell(row, 'I', { code: 'suspect-unit', message: say.inertiaTooLarge() }, forNobody);
  else if (ratio < (1 - 1e-9) / 30) reader.tell(row, 'I', { code: 'suspect-unit', message: say.inertiaSmall() }, forNobody);
}
