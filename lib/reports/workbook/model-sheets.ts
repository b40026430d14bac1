/** What the frames are made of, as it was used: sections, materials, load cases, combinations, limits, load totals. */
import { originOfPart, type PartOrigin } from '@/lib/intake/own/own-thing';
import type { Material, SectionProperties } from '@/lib/model/frame';
import { cellOf, quantityColumn, text } from '@/lib/reports/workbook/report-sheet';
import type { ReportRow, ReportSheet } from '@/lib/reports/workbook/report-sheet';
import { imperfectionTotals, loadTotals } from '@/lib/reports/workbook/load-totals';
import type { ReportSource } from '@/lib/reports/workbook/report-source';
import type { BatchFacts } from '@/lib/reports/workbook/batch-facts';
import { unitLabel } from '@/lib/units/batch-unit';
import type { Quantity, System } from '@/lib/units/quantity';

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

export function sectionsSheet({ parts }: BatchFacts, system: System, origins: readonly PartOrigin[] = []): ReportSheet {
  const from = new Map(origins.map((part) => [`${part.kind} ${part.name}`, originOfPart(part)]));
  const line = (kind: string, name: string, of: string, value: number | null, quantity: Quantity, source: string): ReportRow =>
    [kind, name, of, value === null ? 'not available' : cellOf(value, quantity, system), unitLabel(quantity, system), source, from.get(`${kind} ${name}`) ?? '']; // prettier-ignore
  return {
    name: 'Sections and materials',
    columns: [
      text('kind', 10),
      text('name', 18),
      text('property', 28),
      { heading: 'value (in unit)', format: '0.000', width: 14 },
      text('unit', 8),
      text('source', 10),
      text('comes from', 26),
    ],
    *rows(): Iterable<ReportRow> {
      for (const section of parts.sections.values()) {
        for (const [key, word, quantity] of sectionRows) {
          const value = section.properties[key];
          yield line('section', section.name, word, value, quantity, value === null ? '' : (section.sources[key] ?? 'derived'));
        }
      }
      for (const material of parts.materials.values()) {
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

export function loadCasesSheet({ parts }: BatchFacts): ReportSheet {
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
    *rows(): Iterable<ReportRow> {
      for (const each of parts.cases.values()) {
        yield [each.name, each.kind, each.selfWeight, each.alternative, each.reversible ? 'yes' : 'no', each.note];
      }
    },
  };
}

export function combinationsSheet({ parts }: BatchFacts): ReportSheet {
  return {
    name: 'Combinations',
    columns: [text('combination', 16), text('purpose'), text('case'), { heading: 'factor', format: '0.000' }],
    rows: () => parts.terms.values(),
  };
}

export function limitsSheet({ parts }: BatchFacts, system: System): ReportSheet {
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
    *rows(): Iterable<ReportRow> {
      for (const each of parts.limits.values()) {
        yield [each.name, each.target, each.measure, each.direction, each.toNode, each.ratio, cellOf(each.absolute_m, 'displacement', system), each.combination ?? 'every service combination', each.source]; // prettier-ignore
      }
    },
  };
}

/** By frame: each case, then the imperfection forces of each combination, where there are any. */
export function loadTotalsSheet(facts: BatchFacts, source: ReportSource): ReportSheet {
  const system = source.settings.units;
  const together = async function* (): AsyncIterable<ReportRow> {
    for await (const { id, frame, evaluation } of source.frames({ states: true, checks: false })) {
      if (frame === null) continue;
      yield* loadTotals(id, frame, system);
      yield* imperfectionTotals(id, frame, evaluation?.states ?? [], system);
    }
  };
  return {
    name: 'Applied load totals',
    columns: [
      text('frame'),
      text('case', 18),
      quantityColumn('ΣFx', 'force', system),
      quantityColumn('ΣFy', 'force', system),
      quantityColumn('ΣMz about the origin', 'moment', system),
    ],
    rows: () => (source.settings.imperfections === 'none' ? facts.totalRows : together()),
  };
}
