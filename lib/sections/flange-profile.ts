/**
 * Half a flange seen in section: thickness y over its outstand x, from the web's face to the toe, with the root fillet, the
 * sloping inner face and the rounded inner corner of the toe. Lengths in one unit, x from the same line as `at`.
 */
export interface FlangeProfile {
  /** Face of the web, and end of the flange. */
  readonly from: number;
  readonly to: number;
  /** tf where it is measured, and there. */
  readonly tf: number;
  readonly at: number;
  /** Fall of the thickness per length outwards. */
  readonly slope: number;
  readonly root: number;
  readonly toe: number;
}

/** Gauss–Legendre, 12 points of −1…1, half of them (symmetric): exact to rounding for the smooth stretches below. */
const gauss = [
  [0.1252334085114689, 0.2491470458134028],
  [0.3678314989981802, 0.2334925365383548],
  [0.5873179542866175, 0.2031674267230659],
  [0.7699026741943047, 0.1600783285433462],
  [0.9041172563704749, 0.1069393259953184],
  [0.9815606342467192, 0.0471753363865118],
] as const;

function integral(f: (u: number) => number, a: number, b: number): number {
  const [middle, half] = [(a + b) / 2, (b - a) / 2];
  let sum = 0;
  for (const [x, weight] of gauss) sum += weight * (f(middle - half * x) + f(middle + half * x));
  return half * sum;
}

/**
 * ∫ g(y, x) dx over the profile, up to `end`: with g = y the area, y·x its first moment, and so on. The arcs are integrated
 * over their angle, so that their vertical tangents do no harm.
 */
export function overProfile(p: FlangeProfile, g: (y: number, x: number) => number, end = p.to): number {
  const q = Math.sqrt(1 + p.slope ** 2);
  const face = (x: number): number => p.tf + p.slope * (p.at - x);
  const rootX = p.from + p.root;
  const rootY = face(rootX) + p.root * q;
  const toeX = p.to - p.toe;
  const toeY = face(toeX) - p.toe * q;
  const lineFrom = rootX - (p.root * p.slope) / q;
  const lineTo = toeX + (p.toe * p.slope) / q;
  // an arc x = c − r cos φ (root) or c + r cos φ (toe), cut at `end`
  const angle = (cosine: number): number => Math.acos(Math.min(1, Math.max(-1, cosine)));
  let sum = 0;
  if (p.root > 0) {
    const last = angle((rootX - Math.min(end, lineFrom)) / p.root);
    sum += integral((u) => g(rootY - p.root * Math.sin(u), rootX - p.root * Math.cos(u)) * p.root * Math.sin(u), 0, last);
  }
  if (end > lineFrom) sum += integral((x) => g(face(x), x), lineFrom, Math.min(end, lineTo));
  if (p.toe > 0 && end > lineTo) {
    const [first, last] = [angle((lineTo - toeX) / p.toe), angle((end - toeX) / p.toe)];
    sum += integral((u) => g(toeY + p.toe * Math.sin(u), toeX + p.toe * Math.cos(u)) * p.toe * Math.sin(u), last, first);
  }
  return sum;
}
