import type { NumberStep, NumberTable } from '@/components/numbers/numbers-data';
import type { BehindMember } from '@/lib/analysis/behind/behind-member';
import type { BentMember } from '@/lib/analysis/behind/bent-member';
import { memberLoads } from '@/lib/analysis/member-loads';
import type { Frame } from '@/lib/model/frame';
import type { ResultState } from '@/lib/results/result';
import { inUnits, unitText, type NumberUnits } from './number-units';
import { asForce, forceUnit, sixth } from './step-matrices';

/** What acts along the member, and the forces that hold its ends still meanwhile. */
export function loadsStep(
  frame: Frame,
  state: ResultState,
  index: number,
  behind: BehindMember,
  labels: { readonly q: readonly string[]; readonly d: readonly string[] },
  units: NumberUnits,
): NumberStep {
  const { fixedEnd, fixedEndByCase, toLoadVector, bent } = behind;
  const columns = fixedEndByCase.map(({ case: c, factor }) => ({ label: `${factorText(factor)} ${frame.cases[c]!.name}` }));
  const asked: NumberTable = {
    id: 'fixed-end',
    title: 'Fixed-end forces q_F, local axes',
    corner: 'what the nodes do to the member',
    columns: [...columns, { label: 'q_F' }],
    rows: sixth.map((i) => ({
      label: labels.q[i]!,
      unit: forceUnit(i, units),
      cells: [...fixedEndByCase.map(({ forces }) => forces[i]!), fixedEnd[i]!].map((value) => asForce(value, i, units)),
    })),
  };
  const share: NumberTable = {
    id: 'to-load-vector',
    title: 'What it adds to the load vector: −Tᵀ q_F',
    corner: 'direction',
    columns: [{ label: '−Tᵀ q_F' }],
    rows: sixth.map((i) => ({ label: labels.d[i]!, unit: forceUnit(i, units), cells: [asForce(toLoadVector[i]!, i, units)] })),
  };
  const acting = actingTables(frame, state, index, units);
  return {
    title: 'Its loads, with the ends held',
    words: [
      acting.length === 0 ? 'Nothing acts along it in this result.' : actingWords(behind),
      ...(bent ? [bentWords(bent)] : []),
    ],
    tables: acting.length === 0 ? [] : [...acting, ...(behind.slack ? [] : [asked, share])],
  };
}

function actingWords({ bent, slack }: BehindMember): string {
  const typed = 'Loads as typed, turned into local axes, before their factor; self-weight among them.';
  if (slack) return `${typed} It is slack, so they stand on its nodes.`;
  return bent ? typed : `${typed} q_F = −∫ Nᵀ q dx with the shape functions of the member, joints put in.`;
}

function bentWords({ loadScale }: BentMember): string {
  const divided = loadScale === 1 ? '' : `, worked out under ${loadScale} times the loads and divided by ${loadScale}`;
  return `q_F is that of the member under its axial force${divided}: it can’t be parted by cases. X and Y stand along and square to the undeformed axis.`;
}

function actingTables(frame: Frame, { factors }: ResultState, index: number, units: NumberUnits): NumberTable[] {
  const all = memberLoads(frame);
  const acting = frame.cases.flatMap(({ name }, c) => {
    const loads = all[index * frame.cases.length + c];
    return factors[c] === 0 || !loads ? [] : [{ name, factor: factors[c]!, loads }];
  });
  const length = (value: number) => inUnits(value, units, 0, 1);
  const spread = acting.flatMap(({ name, factor, loads }) =>
    loads.lines.map((one) => ({
      label: name,
      cells: [factor, length(one.a), length(one.b), ...[one.qx1, one.qx2, one.qy1, one.qy2].map((q) => inUnits(q, units, 1, -1))],
    })),
  );
  const placed = acting.flatMap(({ name, factor, loads }) =>
    loads.places.map(({ x, Px, Py, M }) => ({
      label: name,
      cells: [factor, length(x), inUnits(Px, units, 1, 0), inUnits(Py, units, 1, 0), inUnits(M, units, 1, 1)],
    })),
  );
  const warm = acting.flatMap(({ name, factor, loads: { strain, curvature } }) =>
    strain === 0 && curvature === 0 ? [] : [{ label: name, cells: [factor, strain, inUnits(curvature, units, 0, -1)] }],
  );
  const factor = { label: 'factor', apart: true };
  const along = (label: string) => ({ label, unit: units.length, apart: true });
  const line = (label: string) => ({ label, unit: unitText(units, 1, -1) });
  const tables: NumberTable[] = [
    {
      id: 'spread-loads',
      title: 'Spread loads, local axes',
      corner: 'case',
      columns: [factor, along('from'), along('to'), line('q_x from'), line('q_x to'), line('q_y from'), line('q_y to')],
      rows: spread,
    },
    {
      id: 'placed-loads',
      title: 'Loads at a place, local axes',
      corner: 'case',
      columns: [
        factor,
        along('at'),
        { label: 'P_x', unit: units.force },
        { label: 'P_y', unit: units.force },
        { label: 'M', unit: unitText(units, 1, 1), apart: true },
      ],
      rows: placed,
    },
    {
      id: 'warm-loads',
      title: 'Free strain and curvature (temperature)',
      corner: 'case',
      columns: [factor, { label: 'ε₀', apart: true }, { label: 'κ₀', unit: `1/${units.length}`, apart: true }],
      rows: warm,
    },
  ];
  return tables.filter(({ rows }) => rows.length > 0);
}

const factorText = (factor: number): string => String(Number(factor.toPrecision(6))).replace('-', '−');
