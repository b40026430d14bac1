import { Fact } from '../ui/fact';
import { powerText } from '@/lib/units/power-text';

export interface RunCertificateData {
  /** Different frames solved. */
  readonly solved: number;
  readonly residual: number | null;
  readonly equilibrium: number | null;
  readonly digits: number | null;
  readonly seconds: number;
  readonly second: number | null;
}

/** By which figures the solutions of a run are vouched for: the worst of all frames. Null: gathered when the run has ended. */
export function RunCertificate({ certificate }: { readonly certificate: RunCertificateData | null }) {
  if (certificate === null) return <p className="text-ink2">Gathered when the run has ended.</p>;
  const { solved, residual, equilibrium, digits, seconds, second } = certificate;
  if (solved === 0) return <p className="text-ink2">No frame is solved yet.</p>;
  return (
    <dl className="facts">
      <Fact name="largest residual">{told(residual)}</Fact>
      <Fact name="equilibrium, worst of x, y and moment">{told(equilibrium)}</Fact>
      <Fact name="digits left, fewest">{digits === null ? 'not known' : digits.toFixed(1)}</Fact>
      <Fact name="analysed a second time">{`${seconds.toLocaleString('en-GB')} of ${solved.toLocaleString('en-GB')}`}</Fact>
      <Fact name="largest difference of the two">{second === null ? 'none made' : powerText(second)}</Fact>
    </dl>
  );
}

const told = (value: number | null): string => (value === null ? 'not known' : powerText(value));
