import type { Frame } from '@/lib/model/frame';

/** Steel mass of one frame, kg: Σ density · A · L of its members; null where a density is missing. */
export function frameMass(frame: Frame): number | null {
  let mass = 0;
  for (const member of frame.members) {
    const density = frame.materials[member.material]!.density_kg_m3;
    if (density === null) return null;
    const a = frame.nodes[member.start]!;
    const b = frame.nodes[member.end]!;
    mass += density * frame.sections[member.section]!.properties.A_m2 * Math.hypot(b.x_m - a.x_m, b.y_m - a.y_m);
  }
  return mass;
}
