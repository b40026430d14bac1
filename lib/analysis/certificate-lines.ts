import type { Certificate } from '@/lib/results/result';
import { equilibriumTolerance, leastDigits, residualTolerance, secondTolerance, secondUnknowns } from './certificate-tolerances';

/** One figure of a certificate with its bound, in words that a checker follows. */
export interface CertificateLine {
  /** Item of the certificate: 1 to 3. */
  readonly item: 1 | 2 | 3;
  readonly name: string;
  /** What the figure is. */
  readonly meaning: string;
  readonly figure: number | null;
  readonly bound: 'at most' | 'at least';
  readonly tolerance: number;
  readonly outcome: 'passed' | 'outside' | 'not made';
  /** Why it was not made. */
  readonly reason: string | null;
}

const noResults =
  'not applicable: the frame has no results, for with tension-only members load cases alone have none, and it has no combinations';
const whyNot: Readonly<Record<string, string>> = {
  'no results': noResults,
  sampled:
    'of a batch above 100 frames, 5 % are analysed twice, at least 100, picked by their content’s hash; this frame is not among them',
  'too large': `it is made only by choice above ${secondUnknowns} unknowns`,
};

/** Items 1 to 3 of a frame's certificate (README §5), each with its meaning, figure, tolerance and outcome. */
export function certificateLines(certificate: Certificate): CertificateLine[] {
  const { residual, equilibrium, condition, digits, second, secondReason } = certificate;
  const within = (figure: number, most: number) => (figure <= most ? 'passed' : 'outside');
  const none = second === null && secondReason === 'no results';
  const ofResults = (figure: number, most: number) =>
    none
      ? ({ figure: null, outcome: 'not made', reason: noResults } as const)
      : ({ figure, outcome: within(figure, most), reason: null } as const);
  return [
    {
      item: 1,
      name: 'The equations are met',
      meaning:
        'The displacements put back into K d = f: what is left over, beside the size of its terms; the largest of all results.',
      ...ofResults(residual, residualTolerance),
      bound: 'at most',
      tolerance: residualTolerance,
    },
    {
      item: 1,
      name: 'Loads and reactions balance',
      meaning:
        'The loads as the sheets give them and the reactions, summed in x, in y and about a point: what is left over, beside their size.',
      ...ofResults(equilibrium, equilibriumTolerance),
      bound: 'at most',
      tolerance: equilibriumTolerance,
    },
    {
      item: 2,
      name: 'Digits left',
      meaning: `Of the 16 digits a number holds, those that solving leaves right; judged by how unlike the frame’s stiffnesses are (condition ${Number(condition.toPrecision(2)).toLocaleString('en-GB')} of K scaled to a unit diagonal).`,
      figure: digits,
      bound: 'at least',
      tolerance: leastDigits,
      outcome: digits >= leastDigits ? 'passed' : 'outside',
      reason: null,
    },
    {
      item: 3,
      name: 'Two analyses agree',
      meaning:
        'A second analysis by another method, which shares nothing with the first but the model as typed: the largest difference of any movement or force, beside the largest of them.',
      figure: second,
      bound: 'at most',
      tolerance: secondTolerance,
      outcome: second === null ? 'not made' : within(second, secondTolerance),
      reason: second === null ? (whyNot[secondReason ?? ''] ?? secondReason ?? 'no reason was kept') : null,
    },
  ];
}
