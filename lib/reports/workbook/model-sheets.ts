/** What the frames are made of, as it was used: sections, materials, load cases, combinations, limits, load totals. */
import { appliedTotals } from '@/lib/analysis/applied-totals';
import type { Frame, Material, Section, SectionProperties } from '@/lib/model/frame';
import { cellOf, quantityColumn, text } from '@/lib/reports/workbook/report-sheet';
import type { ReportCell, ReportRow, ReportSheet } from '@/lib/reports/workbook/report-sheet';
import type { ReportSource } from '@/lib/reports/workbook/report-source';
import { unitLabel } from '@/lib/units/batch-unit';
import type { Quantity } from '@/lib/units/quantity';

const sectionRows: readonly (readonly [keyof SectionProperties, string, Quantity])[] = [
  ['A_m2', 'A', 'area'],
  ['I_m4', 'I major', 'secondMoment'],
  ['Wtop_m3', 'W top', 'modulus'],
  ['Wbottom_m3', 'W bottom', 'modulus'],
  ['depth_m', 'depth', 'dimension'],
  ['width_m', 'width', 'dimension'],
  ['AvTyped_m2', 'Av as typed', 'area'],
  ['AvPeak_m2', 'Av for the elastic peak', 'area'],
  ['AvPeakTurned_m2', 'Av for the elastic peak, turned', 'area'],
  ['Wpl_m3', 'Wpl', 'modulus'],
  ['Iminor_m4', 'I minor', 'secondMoment'],
  ['Wminor_m3', 'W minor', 'modulus'],
  ['WplMinor_m3', 'Wpl minor', 'modulus'],
  ['It_m4', 'It', 'secondMoment'],
  ['Iw_m6', 'Iw', 'warping'],
  ['t_m', 't', 'dimension'],
];
const materialRows: readonly (readonly [keyof Material['sources'], string, Quantity])[] = [
  ['E_Pa', 'E', 'stress'],
  ['G_Pa', 'G', 'stress'],
  ['fy_Pa', 'fy', 'stress'],
  ['fu_Pa', 'fu', 'stress'],
  ['density_kg_m3', 'density', 'density'],
  ['expansion_perK', 'expansion', 'expansion'],
];

/** Yields each thing of the frames once, by its content. */
async function* distinct<T>(source: ReportSource, of: (frame: Frame) => Iterable<T>): AsyncIterable<T> {
  const seen = new Set<string>();
  for await (const each of source.frames({ states: false })) {
    if (each.frame === null) continue;
    for (const thing of of(each.frame)) {
      const key = JSON.stringify(thing);
      if (seen.has(key)) continue;
      seen.add(key);
      yield thing;
    }
  }
}

export function sectionsSheet(source: ReportSource): ReportSheet {
  const system = source.settings.units;
  const line = (kind: string, name: string, of: string, value: number | null, quantity: Quantity, from: string): ReportRow =>
    [kind, name, of, value === null ? 'not available' : cellOf(value, quantity, system), unitLabel(quantity, system), from]; // prettier-ignore
  return {
    name: 'Sections and materials',
    columns: [
      text('kind', 10),
      text('name', 18),
      text('property', 28),
      { heading: 'value (in unit)', format: '0.000', width: 14 },
      text('unit', 8),
      text('source', 10),
    ],
    async *rows(): AsyncIterable<ReportRow> {
      for await (const section of distinct<Section>(source, (frame) => frame.sections)) {
        for (const [key, word, quantity] of sectionRows) {
          const value = section.properties[key];
          yield line('section', section.name, word, value, quantity, value === null ? '' : (section.sources[key] ?? 'derived'));
        }
      }
      for await (const material of distinct<Material>(source, (frame) => frame.materials)) {
        for (const [key, word, quantity] of materialRows) {
          const value = material[key];
          yield line(
            'material',
            material.name,
            word,
            value,
            quantity,
            value === null ? '' : (material.sources[key] ?? 'library'),
          );
        }
      }
    },
  };
}

export function loadCasesSheet(source: ReportSource): ReportSheet {
  return {
    name: 'Load cases',
    columns: [
      text('case'),
      text('kind'),
      { heading: 'self weight', format: '0.000' },
      text('alternative'),
      text('reversible'),
      text('note', 30),
    ],
    async *rows(): AsyncIterable<ReportRow> {
      for await (const each of distinct(source, (frame) => frame.cases)) {
        yield [each.name, each.kind, each.selfWeight, each.alternative, each.reversible ? 'yes' : 'no', each.note];
      }
    },
  };
}

export function combinationsSheet(source: ReportSource): ReportSheet {
  const named = (frame: Frame) =>
    frame.combinations.flatMap((each) =>
      each.terms.map((term) => [each.name, each.purpose, frame.cases[term.case]?.name ?? '', term.factor] satisfies ReportCell[]),
    );
  return {
    name: 'Combinations',
    columns: [text('combination', 16), text('purpose'), text('case'), { heading: 'factor', format: '0.000' }],
    rows: () => distinct<ReportRow>(source, named),
  };
}

export function limitsSheet(source: ReportSource): ReportSheet {
  const system = source.settings.units;
  return {
    name: 'Limits',
    columns: [
      text('applies to', 16),
      text('which is a'),
      text('measure'),
      text('direction'),
      text('to node'),
      { heading: 'ratio (n of L/n)', format: '0' },
      quantityColumn('absolute', 'displacement', system),
      text('combination', 16),
      text('source', 18),
    ],
    async *rows(): AsyncIterable<ReportRow> {
      for await (const each of distinct(source, (frame) => frame.limits)) {
        yield [each.name, each.target, each.measure, each.direction, each.toNode, each.ratio, cellOf(each.absolute_m, 'displacement', system), each.combination ?? 'every service combination', each.source]; // prettier-ignore
      }
    },
  };
}

/** Sum of all applied loads of each case, about the origin: what a checker compares with a hand take-off. */
export function loadTotalsSheet(source: ReportSource): ReportSheet {
  const system = source.settings.units;
  return {
    name: 'Applied load totals',
    columns: [
      text('frame'),
      text('case'),
      quantityColumn('ΣFx', 'force', system),
      quantityColumn('ΣFy', 'force', system),
      quantityColumn('ΣMz about the origin', 'moment', system),
    ],
    async *rows(): AsyncIterable<ReportRow> {
      for await (const each of source.frames({ states: false })) {
        if (each.frame === null) continue;
        const totals = appliedTotals(each.frame);
        for (const [index, loadCase] of each.frame.cases.entries()) {
          const sum = totals[index];
          yield [each.id, loadCase.name, cellOf(sum?.Fx_N, 'force', system), cellOf(sum?.Fy_N, 'force', system), cellOf(sum?.Mz_Nm, 'moment', system)]; // prettier-ignore
        }
      }
    },
  };
}
