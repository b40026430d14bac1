import { forNobody, type Reader } from '@/lib/intake/reader';
import { type Row, rawCell } from '@/lib/intake/table';
import type { PropertySource, Section, SectionProperties } from '@/lib/model/frame';
import * as say from '@/lib/problems/wording';

const columns = {
  A_m2: 'A', I_m4: 'I', Wtop_m3: 'W top', Wbottom_m3: 'W bottom', depth_m: 'depth', AvTyped_m2: 'Av', Wpl_m3: 'Wpl',
  Iminor_m4: 'I minor', Wminor_m3: 'W minor', WplMinor_m3: 'Wpl minor', It_m4: 'It', Iw_m6: 'Iw', t_m: 't',
} as const; // prettier-ignore
type Typed = keyof typeof columns;

/** A section given by its properties. W from I and depth only if neither W is given: "taken as symmetric". */
export function readProperties(row: Row, name: string, reader: Reader): Section | undefined {
  const values: Partial<Record<Typed | 'W', number>> = {};
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
  if (!sound) return undefined;
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
    width_m: null,
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
