import type { DrawingData } from '@/lib/drawing/drawing-data';
import { awayFrom } from '@/lib/drawing/ground-direction';
import type { Paper } from '@/lib/drawing/paper';
import { supportSymbol } from '@/lib/drawing/support-symbol';

interface SupportsProps {
  readonly data: DrawingData;
  readonly paper: Paper;
  readonly size: number;
}

/** Every support by what it holds. */
export function Supports({ data, paper, size }: SupportsProps) {
  return (
    <g className="d-supports">
      {data.supports.map((support, i) => {
        const node = data.nodes[support.node];
        if (!node) return null;
        return supportSymbol(support, paper.at(node.x, node.y), awayFrom(data, support), size).map((part, j) => (
          <path key={`${i}-${j}`} className={part.className} d={part.d} />
        ));
      })}
    </g>
  );
}
