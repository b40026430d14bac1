/** Forces of the members over all strength combinations, and reactions of every result. */
import { extremeNumbers, readExtremes } from '@/lib/analysis/member-extremes';
import type { Frame } from '@/lib/model/frame';
import type { MemberResults } from '@/lib/results/member-results';
import type { FrameEvaluation, ResultState } from '@/lib/results/result';
import { unitLabel } from '@/lib/units/batch-unit';
import { formatQuantity } from '@/lib/units/format';
import type { System } from '@/lib/units/quantity';
import type { Flow } from './flow';
import { table, type Cell, type Column } from './table';

const forces = ['N', 'V', 'M'] as const;

/** What is less than a hundred-thousandth of the largest beside it is printed as 0. */
const cleaned = (value: number, largest: number): number => (Math.abs(value) < 1e-5 * largest ? 0 : value);
/** Names longer than this are told by their number in the list of reactions. */
const longName = 12;

export function forcesTable(
  flow: Flow,
  frame: Frame,
  { states }: FrameEvaluation,
  { extremes }: MemberResults,
  units: System,
): void {
  const strength = states.flatMap((state, i) => (state.purpose === 'strength' ? [{ state, numbers: extremes[i]! }] : []));
  if (strength.length === 0) return;
  const numbered = strength.some(({ state }) => state.name.length > longName);
  const named = (name: string): string =>
    numbered ? `no. ${states.findIndex((state) => state.name === name && state.purpose === 'strength') + 1}` : name;
  const count = strength.length === 1 ? 'the strength combination' : `${strength.length} strength combinations`;
  flow.heading(
    'Forces of the members',
    `largest and smallest of ${count}, and of which${numbered ? ': numbers are those of the list of reactions' : ''}`,
  );
  const columns = forces.flatMap((name): Column[] => {
    const unit = unitLabel(name === 'M' ? 'moment' : 'force', units);
    return ['max', 'min'].flatMap((which): Column[] => [
      { head: `${name} ${which}`, unit, align: 'right' },
      { head: 'of', soft: true },
    ]);
  });
  const largest = forces.map((name) => Math.max(0, ...strength.flatMap(({ numbers }) => frame.members.map((_, i) => { const { max, min } = readExtremes(numbers, extremeNumbers * i)[name]; return Math.max(Math.abs(max), Math.abs(min)); })))); // prettier-ignore
  table(
    flow,
    [{ head: 'Member', face: 'condensedMedium' }, ...columns],
    frame.members.map(({ id }, member) => {
      const all = strength.map(({ state, numbers }) => ({
        name: state.name,
        of: readExtremes(numbers, extremeNumbers * member),
      }));
      const cells = forces.flatMap((name, k): Cell[] => {
        const quantity = name === 'M' ? 'moment' : 'force';
        const max = all.reduce((best, one) => (one.of[name].max > best.of[name].max ? one : best));
        const min = all.reduce((best, one) => (one.of[name].min < best.of[name].min ? one : best));
        return [
          formatQuantity(cleaned(max.of[name].max, largest[k]!), quantity, units),
          { text: named(max.name), colour: 'ink2' },
          formatQuantity(cleaned(min.of[name].min, largest[k]!), quantity, units),
          { text: named(min.name), colour: 'ink2' },
        ];
      });
      return { cells: [id, ...cells] };
    }),
  );
}

/** A row a result, three columns a support; more than four supports in blocks. */
export function reactionsTable(flow: Flow, frame: Frame, states: readonly ResultState[], units: System): void {
  if (frame.supports.length === 0 || states.length === 0) return;
  flow.heading('Reactions', 'what each support does to the frame; on the foundation they are the reverse');
  const [force, moment] = [unitLabel('force', units), unitLabel('moment', units)];
  const most = 4;
  for (let from = 0; from < frame.supports.length; from += most) {
    const block = frame.supports.slice(from, from + most);
    const turning = block.map((support) => support.rz !== 'free');
    const columns = block.flatMap((support, i): Column[] => {
      const id = frame.nodes[support.node]?.id ?? '';
      return [
        { head: `${id} Fx`, unit: force, align: 'right' },
        { head: `${id} Fy`, unit: force, align: 'right' },
        ...(turning[i] ? [{ head: `${id} Mz`, unit: moment, align: 'right' as const }] : []),
      ];
    });
    const largest = Math.max(
      0,
      ...states.flatMap(({ reactions }) => [...reactions.subarray(3 * from, 3 * (from + block.length))].map(Math.abs)),
    );
    const clean = (value: number | undefined): number | null => (value === undefined ? null : cleaned(value, largest));
    table(
      flow,
      [{ head: '', align: 'right' }, { head: 'Result', face: 'condensedMedium', soft: true }, { head: 'For' }, ...columns],
      states.map(({ name, kind, purpose, reactions }, index) => ({
        cells: [
          { text: String(index + 1), colour: 'ink3' },
          name,
          kind === 'case' ? 'case' : (purpose ?? ''),
          ...block.flatMap((_, i) => {
            const at = 3 * (from + i);
            const [Fx, Fy, Mz] = [0, 1, 2].map((k) => clean(reactions[at + k]));
            const shown = [formatQuantity(Fx ?? null, 'force', units), formatQuantity(Fy ?? null, 'force', units)];
            return turning[i] ? [...shown, formatQuantity(Mz ?? null, 'moment', units)] : shown;
          }),
        ],
      })),
    );
  }
}
