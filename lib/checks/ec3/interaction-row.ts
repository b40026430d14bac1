import type { Settings } from '@/lib/model/settings';
import type { ClauseRow } from '../design-code/clause-row';
import type { Demand, Stretch } from '../design-code/demand';
import { majorFactorsA, minorFactorsA, type AnnexAInput, type AnnexATorsion } from './annex-a';
import { kyyB, kyzB, kzyStiff, kzySoft, kzzB, type AnnexBInput } from './annex-b';
import { modulusOf } from './bending';
import { interaction } from './bending-compression';
import type { Classified } from './classification';
import { criticalMoment, endRatio, isStraight } from './critical-moment';
import type { Ec3Member } from './ec3-member';
import { basics, checkedRow, clauses, refusedRow, type Inputs } from './ec3-rows';
import { momentFactorA, momentFactorB } from './equivalent-moment';
import type { LateralStretch } from './lateral-stretch';

/** A free end, or an effective length beyond the member's own: the buckling mode is one of sway. */
function sways(of: Ec3Member): boolean {
  const { inPlane, length_m, free } = of.of;
  return free.start || free.end || inPlane.length_m > length_m * (1 + 1e-9);
}

interface Factors {
  readonly k61: number;
  readonly k62: number;
  readonly inputs: Inputs;
}

/**
 * 6.3.3 of one state: N the greatest compression; M/M_b,Rd the largest of all stretches between restraints of the pressed face
 * (M_Ed/(W fy/γM1) where nothing buckles sideways), which is on the safe side. (6.61) and (6.62), the larger.
 */
export function interactionRow(
  of: Ec3Member,
  demand: Demand,
  N: number,
  found: Classified,
  stretches: readonly LateralStretch[] | string,
  settings: Settings,
): ClauseRow {
  const refused = (why: string): ClauseRow => refusedRow(clauses.interaction, demand, why);
  if (of.shape === 'channel') return refused('6.3.3 is for doubly symmetric sections');
  if (!demand.inPlane.allowed) return refused(demand.inPlane.why);
  if (typeof stretches === 'string') return refused(stretches);
  const { turned } = of.of;
  const plastic = found.class <= 2;
  const lateral = stretches.length > 0;
  let worst: LateralStretch | null = null;
  for (const one of stretches) if (worst === null || one.ratio > worst.ratio) worst = one;
  const MRd = (modulusOf(found.class, of.Wpl, of.Wel) * of.fy) / of.gammaM1;
  const [M, MbRd] = worst ? [worst.M, worst.MbRd] : [demand.moment, MRd];
  const chiLT = MbRd / MRd;
  const [y, z, torsional] = of.buckling;
  // torsional buckling where it comes before flexural buckling about z
  const out = torsional && torsional.NbRd < z.NbRd ? torsional : z;
  const whole = demand.whole();
  const factors =
    settings.interaction === 'Annex A'
      ? byAnnexA(of, N, M, plastic, whole, stretches)
      : byAnnexB(of, plastic, lateral, whole, stretches, N / y.NbRd, N / out.NbRd, out.lambda);
  if (typeof factors === 'string') return refused(factors);
  const r61 = interaction(N / y.NbRd, factors.k61, M / MbRd);
  const r62 = interaction(N / out.NbRd, factors.k62, M / MbRd);
  const ratio = Math.max(r61, r62);
  const at = worst ? worst.stretch.compressingAt : demand.momentAt;
  return checkedRow(clauses.interaction, demand, 'number', ratio, 1, at, null, () => ({
    ...basics(of),
    class: found.class,
    plate: found.plate,
    ct: found.slenderness,
    hollow: of.shape === 'I' ? 0 : 1,
    ...diagramInputs(of, whole),
    annex: settings.interaction === 'Annex A' ? 'A' : 'B',
    turned: turned ? 1 : 0,
    susceptible: lateral ? 1 : 0,
    N,
    M,
    chiY: y.chi,
    lambdaY: y.lambda,
    NbyRd: y.NbRd,
    outMode: out.mode,
    chiZ: out.chi,
    lambdaZ: out.lambda,
    NbzRd: out.NbRd,
    nY: N / y.NbRd,
    nZ: N / out.NbRd,
    m: M / MbRd,
    W: modulusOf(found.class, of.Wpl, of.Wel),
    chiLT,
    MbRd,
    ...factors.inputs,
    k61: factors.k61,
    k62: factors.k62,
    r61,
    r62,
  }));
}

/** The diagram of the whole member, and the line of Table B.3 that it belongs to. */
function diagramInputs(of: Ec3Member, whole: Stretch): Inputs {
  const { start, middle, end, largest } = whole;
  const Mh = Math.abs(start) >= Math.abs(end) ? start : end;
  const known = Math.max(Math.abs(Mh), Math.abs(middle)) >= 0.95 * Math.abs(largest);
  const atEnd = Math.abs(middle) <= Math.abs(Mh);
  const CmBy = sways(of) ? 'sway' : isStraight(whole) ? 'straight' : !known ? 'none' : atEnd ? 'end' : 'middle';
  const [over, under] = atEnd ? [middle, Mh] : [Mh, middle];
  return { CmBy, psi: endRatio(whole), Mh, Ms: middle, alpha: under === 0 ? 0 : over / under };
}

function byAnnexB(
  of: Ec3Member,
  plastic: boolean,
  lateral: boolean,
  whole: Stretch,
  stretches: readonly LateralStretch[],
  nY: number,
  nZ: number,
  lambdaZ: number,
): Factors {
  const input: AnnexBInput = { plastic, hollow: of.shape !== 'I', lambdaY: of.buckling[0].lambda, lambdaZ, nY, nZ };
  const table = momentFactorB(whole);
  // sway mode: 0.9 (Table B.3, last line)
  const Cm = sways(of) ? Math.max(0.9, table) : table;
  if (of.of.turned) {
    const kzz = kzzB(input, Cm);
    return { k61: kyzB(input, kzz), k62: kzz, inputs: { Cm } };
  }
  const kyy = kyyB(input, Cm);
  if (!lateral) return { k61: kyy, k62: kzyStiff(input, kyy), inputs: { Cm } };
  let CmLT = 0.4;
  for (const { stretch } of stretches)
    CmLT = Math.max(CmLT, stretch.heldAtStart && stretch.heldAtEnd ? momentFactorB(stretch) : 1);
  return { k61: kyy, k62: kzySoft(input, CmLT), inputs: { Cm, CmLT } };
}

function byAnnexA(
  of: Ec3Member,
  N: number,
  M: number,
  plastic: boolean,
  whole: Stretch,
  stretches: readonly LateralStretch[],
): Factors | string {
  if (sways(of)) return 'Table A.2 has no C_m,0 for a member that sways; Annex B has';
  const [y, z, torsional] = of.buckling;
  const input: AnnexAInput = {
    plastic,
    N,
    NcrY: y.Ncr,
    NcrZ: z.Ncr,
    chiY: y.chi,
    chiZ: z.chi,
    lambdaY: y.lambda,
    lambdaZ: z.lambda,
    npl: N / ((of.A * of.fy) / of.gammaM1),
    WelY: of.WelY,
    WplY: of.WplY,
    WelZ: of.WelZ,
    WplZ: of.WplZ,
  };
  const Cm0 = momentFactorA(whole, N / (of.of.turned ? z.Ncr : y.Ncr));
  const torsion = of.of.turned ? null : torsionOf(of, N, M, torsional?.Ncr ?? null, stretches);
  const found = of.of.turned ? minorFactorsA(input, Cm0) : majorFactorsA(input, Cm0, torsion);
  if (found === null) return 'compression is not below the critical force, for which Annex A has no factors';
  const { muY, muZ, Cm, CmLT, C61, C62, k61, k62 } = found;
  const more: Inputs = torsion
    ? { aLT: torsion.aLT, lambda0: torsion.lambda0, NcrT: torsion.NcrT, epsilonY: torsion.epsilonY, C1: torsion.C1 }
    : {};
  return {
    k61,
    k62,
    inputs: { Cm0, Cm, CmLT, muY, muZ, npl: input.npl, NcrY: y.Ncr, NcrZ: z.Ncr, C61, C62, ...more },
  };
}

/** λ̄0 of the longest stretch and the smallest C1: both put C_mLT on the safe side. Null = not susceptible. */
function torsionOf(
  of: Ec3Member,
  N: number,
  M: number,
  NcrT: number | null,
  stretches: readonly LateralStretch[],
): AnnexATorsion | null {
  const { lateral } = of;
  if (stretches.length === 0 || lateral.kind === 'none' || lateral.kind === 'refused' || of.It === null) return null;
  let [L, C1] = [0, Infinity];
  for (const one of stretches) [L, C1] = [Math.max(L, one.L), Math.min(C1, one.C1)];
  const Mcr0 = criticalMoment(of.E, lateral.G, of.Iz, lateral.It, lateral.Iw, L, 1);
  const W = stretches[0]!.W;
  return {
    aLT: Math.max(0, 1 - of.It / of.Iy),
    NcrT: NcrT ?? Infinity,
    lambda0: Math.sqrt((W * of.fy) / Mcr0),
    C1,
    epsilonY: ((M / N) * of.A) / of.WelY,
  };
}
