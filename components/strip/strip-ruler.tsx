import { VerdictMark } from '../ui/verdict-mark';
import { columnX, type StripLayout } from '@/lib/drawing/strip-layout';

/** A tick a frame, longer at five, a number at ten; and the marks that head the row tallies. */
export function StripRuler({ layout }: { readonly layout: StripLayout }) {
  const columns = Array.from({ length: layout.columns }, (_, i) => i);
  const middle = (column: number) => columnX(layout, column) + layout.cell / 2;
  return (
    <svg className="strip-ruler" viewBox={`0 0 ${layout.width} 22`} width="100%" aria-hidden="true">
      <path
        className="strip-ticks"
        d={columns.map((c) => `M${middle(c)} 21v${(c + 1) % 10 === 0 ? -6 : (c + 1) % 5 === 0 ? -4 : -1.5}`).join('')}
      />
      {columns
        .filter((c) => (c + 1) % 10 === 0)
        .map((c) => (
          <text key={c} className="strip-number" x={middle(c)} y={12} textAnchor="middle">
            {c + 1}
          </text>
        ))}
      {(['over', 'near', 'not checked'] as const).map((verdict, i) => (
        <g key={verdict} transform={`translate(${layout.width - layout.right + 11.5 + i * 19} 4)`}>
          <VerdictMark verdict={verdict} size={9} />
        </g>
      ))}
    </svg>
  );
}
