/** Cautions, what was analysed and how, settings with where they come from, assumptions, what the frames are made of. */
import { originWords } from '@/lib/changes/origin-words';
import { settingText } from '@/lib/changes/setting-text';
import { originOfPart, type PartOrigin } from '@/lib/intake/own/own-thing';
import type { Material, Section } from '@/lib/model/frame';
import { settingWords, statedSettings } from '@/lib/model/settings';
import { cautions, checkedWords } from '@/lib/reports/cautions';
import { methodWords } from '@/lib/reports/method-words';
import type { ReportSource } from '@/lib/reports/workbook/report-source';
import { unitLabel } from '@/lib/units/batch-unit';
import { formatNumber, formatQuantity } from '@/lib/units/format';
import type { Quantity, System } from '@/lib/units/quantity';
import type { Flow } from './flow';
import type { ReportFacts } from './report-facts';
import { table, type Row } from './table';

const signs = [
  'Global X right, Y up; rotations and moments anticlockwise. Local x runs from a member’s start to its end; local y stands 90° anticlockwise from it: "top" is the local +y face, "bottom" the other.',
  'N: tension positive. M: positive with tension on the bottom face. V = dM/dx. Moments are drawn on the tension side.',
  'Reactions are what a support does to the frame; the load on the foundation is the reverse.',
];

export function basisPages(flow: Flow, source: ReportSource, facts: ReportFacts): void {
  const { settings, origins } = source;
  flow.part({ title: 'Basis', note: 'what was analysed, how, and what must not be concluded from it' });
  flow.bookmark('Cautions and basis');
  flow.heading('Cautions');
  flow.list(cautions);
  const words = checkedWords(settings);
  flow.heading('What was checked');
  flow.paragraph(`Checked: ${words.checked}`);
  flow.space(2);
  flow.paragraph(`Not checked: ${words.notChecked}`);
  flow.heading('How it was analysed');
  const tied = 'tension-only members: which are slack is settled combination by combination';
  flow.list([...methodWords(settings), ...(facts.tied ? [tied] : [])]);
  flow.heading('Signs');
  flow.list(signs);
  const stated = statedSettings(settings, origins).flatMap((name): Row[] => {
    const value = settingText(name, settings);
    return name === 'title' || value === null ? [] : [{ cells: [settingWords[name], value, originWords(origins[name])] }];
  });
  flow.heading('Settings', 'and where each comes from');
  table(flow, [{ head: 'Setting' }, { head: 'Value', face: 'condensedMedium' }, { head: 'Given by', soft: true }], stated);
  flow.heading('Assumptions');
  if (facts.assumptions.length === 0) flow.paragraph('None beyond the settings above.');
  flow.list(facts.assumptions);
}

/** Combinations, limits, sections, materials, as they were used. */
export function partsPages(
  flow: Flow,
  { settings, parts: origins = [] }: ReportSource,
  { parts, combinations }: ReportFacts,
): void {
  const system = settings.units;
  flow.part({ title: 'Criteria and parts', note: 'combinations, limits, sections, materials' });
  flow.bookmark('Criteria and parts');
  const cases = [...parts.cases.values()];
  flow.heading('Load cases');
  if (cases.length === 0) flow.paragraph('None: no frame could be read.');
  table(
    flow,
    [
      { head: 'Case' },
      { head: 'Kind' },
      { head: 'Self-weight', align: 'right' },
      { head: 'Alternative' },
      { head: 'Reversible' },
      { head: 'Note', soft: true },
    ],
    cases.map(({ name, kind, selfWeight, alternative, reversible, note }) => ({
      cells: [
        name,
        kind,
        selfWeight === 0 ? '–' : `× ${formatNumber(selfWeight, { significant: 3 })}`,
        alternative ?? '–',
        reversible ? 'yes' : 'no',
        note,
      ],
    })),
  );
  flow.heading('Combinations');
  table(
    flow,
    [{ head: 'Name', face: 'condensedMedium' }, { head: 'For' }, { head: 'Loads', soft: true }],
    combinations.map(({ name, purpose, terms }) => ({ cells: [name, purpose, terms] })),
  );
  const limits = [...parts.limits.values()];
  flow.heading('Limits on movement', limits.length === 0 ? 'none was given' : null);
  table(
    flow,
    [
      { head: 'Applies to' },
      { head: 'Which is a' },
      { head: 'Measure' },
      { head: 'Limit' },
      { head: 'Combination' },
      { head: 'Source', soft: true },
    ],
    limits.map((limit) => ({
      cells: [
        limit.toNode === null ? limit.name : `${limit.name} to ${limit.toNode}`,
        limit.target,
        [limit.measure, limit.direction].filter(Boolean).join(' in '),
        [limit.ratio === null ? null : `L/${limit.ratio}`, limit.absolute_m === null ? null : `${formatQuantity(limit.absolute_m, 'displacement', system)} ${unitLabel('displacement', system)}`].filter(Boolean).join(', ') || 'none', // prettier-ignore
        limit.combination ?? 'every service one',
        limit.source,
      ],
    })),
  );
  sections(flow, [...parts.sections.values()], system);
  materials(flow, [...parts.materials.values()], system);
  whereFrom(flow, origins);
}

function sections(flow: Flow, all: readonly Section[], system: System): void {
  const of = (si: number | null, quantity: Quantity): string => formatQuantity(si, quantity, system);
  const unit = (quantity: Quantity): string => unitLabel(quantity, system);
  flow.heading('Sections', 'properties as used');
  const right = { align: 'right' } as const;
  table(
    flow,
    [
      { head: 'Section', face: 'condensedMedium', soft: true },
      { head: 'A', unit: unit('area'), ...right },
      { head: 'I', unit: unit('secondMoment'), ...right },
      { head: 'W top', unit: unit('modulus'), ...right },
      { head: 'W bottom', unit: unit('modulus'), ...right },
      { head: 'Wpl', unit: unit('modulus'), ...right },
      { head: 'I minor', unit: unit('secondMoment'), ...right },
      { head: 'It', unit: unit('secondMoment'), ...right },
      { head: 'Av', unit: unit('area'), ...right },
      { head: 'depth', unit: unit('dimension'), ...right },
      { head: 'Source' },
    ],
    all.map(({ name, properties: p, sources }) => ({
      cells: [
        name, of(p.A_m2, 'area'), of(p.I_m4, 'secondMoment'), of(p.Wtop_m3, 'modulus'), of(p.Wbottom_m3, 'modulus'), of(p.Wpl_m3, 'modulus'),
        of(p.Iminor_m4, 'secondMoment'), of(p.It_m4, 'secondMoment'), of(p.AvTyped_m2 ?? p.AvPeak_m2, 'area'), of(p.depth_m, 'dimension'),
        [...new Set(Object.values(sources))].join(', ') || 'derived',
      ],
    })), // prettier-ignore
  );
}

function materials(flow: Flow, all: readonly Material[], system: System): void {
  const of = (si: number | null, quantity: Quantity): string => formatQuantity(si, quantity, system);
  const unit = (quantity: Quantity): string => unitLabel(quantity, system);
  const right = { align: 'right' } as const;
  flow.heading('Materials', 'yield by the thickest part of the section');
  table(
    flow,
    [
      { head: 'Material', face: 'condensedMedium', soft: true },
      { head: 'E', unit: unit('stress'), ...right },
      { head: 'G', unit: unit('stress'), ...right },
      { head: 'fy', unit: unit('stress'), ...right },
      { head: 'fu', unit: unit('stress'), ...right },
      { head: 'density', unit: unit('density'), ...right },
      { head: 'expansion', unit: unit('expansion'), ...right },
      { head: 'Source' },
    ],
    all.map((one) => ({
      cells: [
        one.name, of(one.E_Pa, 'stress'), of(one.G_Pa, 'stress'), of(one.fy_Pa, 'stress'), of(one.fu_Pa, 'stress'), of(one.density_kg_m3, 'density'),
        one.expansion_perK === null ? '–' : formatQuantity(one.expansion_perK, 'expansion', system),
        [...new Set(Object.values(one.sources))].join(', ') || 'library',
      ],
    })), // prettier-ignore
  );
}

function whereFrom(flow: Flow, all: readonly PartOrigin[]): void {
  if (all.length === 0) return;
  const ofKind = (kind: PartOrigin['kind']) => all.filter((part) => part.kind === kind);
  flow.heading('Where sections and materials come from', 'sheets, the office’s own, standard ranges');
  table(
    flow,
    [
      { head: 'Kind' },
      { head: 'Name', face: 'condensedMedium' },
      { head: 'Comes from', soft: true },
      { head: 'The office’s name', ifAny: true },
      { head: 'Frames', align: 'right' },
    ],
    [...ofKind('section'), ...ofKind('material')].map((part) => ({
      cells: [
        part.kind,
        part.name,
        originOfPart(part),
        part.own === part.name ? null : part.own,
        part.frames.toLocaleString('en-GB'),
      ],
    })),
  );
}
