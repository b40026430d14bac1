import type { Frame } from '@/lib/model/frame';
import type { Settings } from '@/lib/model/settings';
import type { Failure } from '@/lib/results/result';
import { memberData } from './member-data';
import { shearRefusal } from './shear-refusal';

const noSolution = (message: string, node: string | null = null): Failure => ({ code: 'not-solved', message, node });

/** No section and material has EA or EI above this, or below its inverse, N and N·m²: products of several must not overflow. */
const most = 1e30;

/**
 * What the analysis cannot do for this frame, said before it is tried: it never computes something simpler instead.
 * The reader has met most of these at their cells; a frame made otherwise meets them here.
 */
export function refusal(frame: Frame, noRotation: Uint8Array, settings: Settings): Failure | null {
  const data = memberData(frame);
  for (let i = 0; i < data.length; i++) {
    const m = data[i]!;
    const member = frame.members[i]!;
    const section = frame.sections[member.section]!;
    if (member.tensionOnly && !(m.startSpring === 0 && m.endSpring === 0))
      return noSolution(`Member ${member.id} is tension only: its joints must be pinned at both ends.`);
    if (!(m.length > 0)) return noSolution(`Member ${member.id} has no length: its ends are at one place.`);
    if (member.turned && section.properties.Iminor_m4 === null)
      return noSolution(`Member ${member.id} is turned: section ${section.name} needs I minor.`);
    if (!(m.EA > 0 && m.EI > 0 && Number.isFinite(m.EA) && Number.isFinite(m.EI)))
      return noSolution(`Member ${member.id}: E, A and I of its section and material must be numbers above zero.`);
    if (Math.max(m.EA, m.EI) > most || Math.min(m.EA, m.EI) < 1 / most)
      return noSolution(
        `Member ${member.id}: E, A and I of its section and material are out of all proportion: look at their units.`,
      );
    if (!(m.startSpring >= 0 && m.endSpring >= 0))
      return noSolution(`Member ${member.id}: a joint's stiffness can't be negative.`);
  }
  return settingRefusal(frame, settings) ?? loadRefusal(frame) ?? supportRefusal(frame, noRotation);
}

/** What a setting needs and the frame does not give. */
function settingRefusal(frame: Frame, settings: Settings): Failure | null {
  if (settings.stiffnessReduction !== 'none') {
    const member = frame.members.find(({ tensionOnly, material }) => !tensionOnly && !(frame.materials[material]!.fy_Pa! > 0));
    if (member)
      return noSolution(
        `Stiffness reduction is on: material ${frame.materials[member.material]!.name} of member ${member.id} needs fy (τ_b, AISC 360-22 C2.3).`,
      );
  }
  return settings.shearDeformation ? shearRefusal(frame) : null;
}

function loadRefusal(frame: Frame): Failure | null {
  const data = memberData(frame);
  const heavy = frame.cases.find((loadCase) => loadCase.selfWeight !== 0);
  const light = heavy ? data.findIndex((m) => !Number.isFinite(m.weight)) : -1;
  if (heavy && light >= 0) {
    const member = frame.members[light]!;
    return noSolution(
      `Case ${heavy.name} has self-weight: material ${frame.materials[member.material]!.name} of member ${member.id} needs a density.`,
    );
  }
  for (const load of frame.memberLoads) {
    if (load.kind !== 'temperature') continue;
    const member = frame.members[load.member]!;
    const m = data[load.member]!;
    if ((load.dT_K !== 0 || load.dTAcross_K !== 0) && !Number.isFinite(m.expansion))
      return noSolution(
        `Member ${member.id} has a temperature load: material ${frame.materials[member.material]!.name} needs its expansion.`,
      );
    if (load.dTAcross_K !== 0 && !(m.depth > 0))
      return noSolution(`Member ${member.id} has dT across: section ${frame.sections[member.section]!.name} needs its depth.`);
  }
  return null;
}

function supportRefusal(frame: Frame, noRotation: Uint8Array): Failure | null {
  for (const load of frame.nodeLoads) {
    if (load.Mz_Nm === 0 || !noRotation[load.node]) continue;
    const node = frame.nodes[load.node]!.id;
    return noSolution(`Node ${node} has a moment, but every member there is pinned, so nothing can take it.`, node);
  }
  for (const settlement of frame.settlements) {
    const node = frame.nodes[settlement.node]!.id;
    const support = frame.supports.find((s) => s.node === settlement.node);
    for (const [value, restraint, word] of [
      [settlement.dx_m, support?.ux, 'dx'],
      [settlement.dy_m, support?.uy, 'dy'],
      [settlement.rz_rad, support?.rz, 'rz'],
    ] as const)
      if (value !== null && value !== 0 && restraint !== 'fixed')
        return noSolution(`Node ${node} has a settlement ${word}, but is not fixed in that direction.`, node);
  }
  return null;
}
