/** What is told of a state beside its figures: slack members, imperfection forces, in the frame's own names. */
import type { Frame } from '@/lib/model/frame';
import type { ResultState } from '@/lib/results/result';

/** Ids of the tension-only members that are slack in a state, in the frame's order. */
export function slackMembers(frame: Frame, state: ResultState): string[] {
  return (state.method?.slack ?? []).map((member) => frame.members[member]!.id);
}

/** A force that stands for the imperfections of a state, global, N. */
export interface ImperfectionForce {
  readonly node: string;
  readonly x_m: number;
  readonly y_m: number;
  readonly Fx_N: number;
  readonly Fy_N: number;
}

/** Forces at nodes that stand for a state's imperfections, those that are not zero, as they act at the loads of its name. */
export function imperfectionForces(frame: Frame, { method }: ResultState): ImperfectionForce[] {
  const forces = method?.notional;
  if (!method || !forces) return [];
  return frame.nodes.flatMap(({ id, x_m, y_m }, i) => {
    const [Fx, Fy] = [forces[2 * i]! / method.loadScale, forces[2 * i + 1]! / method.loadScale];
    return Fx === 0 && Fy === 0 ? [] : [{ node: id, x_m, y_m, Fx_N: Fx, Fy_N: Fy }];
  });
}

/** Why a frame has no results of its load cases alone; null where it has them. */
export function noCasesAlone(frame: Frame): string | null {
  const rods = frame.members.filter((member) => member.tensionOnly).map((member) => member.id);
  if (rods.length === 0) return null;
  const some = rods.length > 6 ? `${rods.slice(0, 5).join(', ')} and ${rods.length - 5} more` : rods.join(', ');
  return `load cases alone: not applicable, since with tension-only members (${some}) results of cases do not add up`;
}

/** Results named of a slack member; of more they are counted. */
const mostNamed = 6;

/** Which members are slack where: a line for all that are slack in the same results. */
export function slackAssumptions(frame: Frame, states: readonly ResultState[]): string[] {
  const slackIn = new Map<string, string[]>();
  for (const state of states)
    for (const member of slackMembers(frame, state)) slackIn.set(member, [...(slackIn.get(member) ?? []), state.name]);
  const together = new Map<string, { readonly names: readonly string[]; readonly members: string[] }>();
  for (const [member, names] of slackIn) {
    const key = names.join('\n');
    const same = together.get(key);
    if (same) same.members.push(member);
    else together.set(key, { names, members: [member] });
  }
  return [...together.values()].map(({ names, members }) => {
    const where =
      names.length <= mostNamed
        ? names.join(', ')
        : `${names.length} of ${states.length} results (${names.slice(0, mostNamed - 1).join(', ')} …)`;
    return `${members.join(', ')}: tension only, slack in ${where}`;
  });
}
