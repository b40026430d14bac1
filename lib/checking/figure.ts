/** One of our figures that a checker sets their own value beside. */
import { z } from 'zod';
import { memberLine } from '@/lib/analysis/member-line';
import { valueAt } from '@/lib/analysis/value-at';
import type { Frame } from '@/lib/model/frame';
import type { FrameEvaluation, ResultState } from '@/lib/results/result';
import { extremesOf } from '@/lib/results/extremes-of';
import type { Quantity } from '@/lib/units/quantity';

const name = z.string().min(1).max(200);

export const figureSchema = z.discriminatedUnion(
  'kind',
  [
    z.strictObject({ kind: z.literal('reaction'), node: name, part: z.enum(['Fx', 'Fy', 'Mz']), result: name }),
    z.strictObject({ kind: z.literal('movement'), node: name, part: z.enum(['ux', 'uy', 'rz']), result: name }),
    z.strictObject({
      kind: z.literal('force'),
      member: name,
      part: z.enum(['N', 'V', 'M']),
      at_m: z.number().min(0),
      result: name,
    }),
    z.strictObject({ kind: z.literal('deflection'), member: name, result: name }),
    z.strictObject({ kind: z.literal('ratio'), check: z.number().int().min(0) }),
  ],
  { error: 'Say which figure: kind reaction, movement, force, deflection or ratio, with its place.' },
);
export type Figure = z.infer<typeof figureSchema>;

export interface FigureOfOurs {
  readonly label: string;
  readonly quantity: Quantity;
  /** SI. */
  readonly value: number;
}

/** Our figure as it is stored or follows from what is stored; or why there is none, in a sentence. */
export function figureOfOurs(
  frame: Frame,
  evaluation: FrameEvaluation,
  figure: Figure,
): FigureOfOurs | { readonly none: string } {
  if (figure.kind === 'ratio') {
    const check = evaluation.checks[figure.check];
    if (!check || check.ratio === null) return { none: 'There is no ratio of this check.' };
    const label = `ratio of ${[check.check, check.subject, check.combination].filter(Boolean).join(', ')}`;
    return { label, quantity: 'number', value: check.ratio };
  }
  const state = evaluation.states.find((one) => one.name === figure.result);
  if (!state) return { none: `There is no result ${figure.result}.` };
  return figure.kind === 'force' || figure.kind === 'deflection' ? ofMember(frame, state, figure) : ofNode(frame, state, figure);
}

function ofNode(
  frame: Frame,
  state: ResultState,
  figure: Extract<Figure, { kind: 'reaction' | 'movement' }>,
): FigureOfOurs | { readonly none: string } {
  const node = frame.nodes.findIndex(({ id }) => id === figure.node);
  if (node < 0) return { none: `There is no node ${figure.node}.` };
  const label = `${figure.part} at ${figure.node}, ${state.name}`;
  if (figure.kind === 'reaction') {
    const support = frame.supports.findIndex((one) => one.node === node);
    const value = state.reactions[3 * support + ['Fx', 'Fy', 'Mz'].indexOf(figure.part)];
    if (support < 0 || value === undefined) return { none: `There is no support at ${figure.node}.` };
    return { label: `reaction ${label}`, quantity: figure.part === 'Mz' ? 'moment' : 'force', value };
  }
  const value = state.displacements[3 * node + ['ux', 'uy', 'rz'].indexOf(figure.part)];
  if (value === undefined || !Number.isFinite(value)) return { none: `${figure.node} has no rotation of its own.` };
  return { label: `movement ${label}`, quantity: figure.part === 'rz' ? 'rotation' : 'displacement', value };
}

function ofMember(
  frame: Frame,
  state: ResultState,
  figure: Extract<Figure, { kind: 'force' | 'deflection' }>,
): FigureOfOurs | { readonly none: string } {
  const member = frame.members.findIndex(({ id }) => id === figure.member);
  if (member < 0) return { none: `There is no member ${figure.member}.` };
  if (figure.kind === 'deflection') {
    const { value } = extremesOf(frame, state, member).deflection;
    return { label: `largest deflection of ${figure.member}, ${state.name}`, quantity: 'displacement', value };
  }
  const line = memberLine(frame, state, member);
  if (figure.at_m > line.length * (1 + 1e-9)) return { none: `${figure.member} is not that long.` };
  const at = Math.min(figure.at_m, line.length);
  // at the far end the side within the member
  const value = valueAt(line, at, at >= line.length ? 'before' : 'after')[figure.part];
  const label = `${figure.part} of ${figure.member} at ${Number(at.toFixed(3))} m, ${state.name}`;
  return { label, quantity: figure.part === 'M' ? 'moment' : 'force', value };
}
