import type { SectionOutline } from '@/lib/library/section-outline';

interface SectionPictureProps {
  readonly outline: SectionOutline;
  /** "IPE 300" */
  readonly name: string;
  /** "300 mm", "150 mm" */
  readonly depth: string;
  readonly width: string;
}

/** A section drawn to scale, with its depth and width; both axes are to one scale. */
export function SectionPicture({ outline, name, depth, width }: SectionPictureProps) {
  const { path } = outline;
  const size = Math.max(outline.depth, outline.width);
  const margin = 0.2 * size;
  const text = 0.075 * size;
  const [right, bottom] = [outline.width / 2, outline.depth / 2];
  const [x, y] = [right + 0.45 * margin, bottom + 0.45 * margin];
  const box = [-right - 0.4 * margin, -bottom - 0.3 * margin, outline.width + 2.6 * margin, outline.depth + 1.7 * margin].join(
    ' ',
  );
  const tick = 0.15 * margin;
  return (
    <svg className="section-picture" viewBox={box} role="img" aria-label={`${name} to scale: depth ${depth}, width ${width}`}>
      <path
        className="section-axis"
        d={`M${-right - 0.3 * margin} 0H${right + 0.3 * margin}M0 ${-bottom - 0.2 * margin}V${bottom + 0.2 * margin}`}
      />
      <path className="section-steel" d={path} fillRule="evenodd" />
      <path
        className="section-dimension"
        d={`M${x} ${-bottom}V${bottom}M${x - tick} ${-bottom}h${2 * tick}M${x - tick} ${bottom}h${2 * tick}M${-right} ${y}H${right}M${-right} ${y - tick}v${2 * tick}M${right} ${y - tick}v${2 * tick}`}
      />
      <text x={x + 0.15 * margin} y={0} dy="0.35em" fontSize={text}>
        {depth}
      </text>
      <text x={0} y={y + 1.4 * text} fontSize={text} textAnchor="middle">
        {width}
      </text>
    </svg>
  );
}
