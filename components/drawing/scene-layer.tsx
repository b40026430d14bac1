import type { PlacedLabel } from '@/lib/drawing/labels';
import { line, plus } from '@/lib/drawing/paper';
import { chainText, type Scene } from '@/lib/drawing/scene';
import { Supports } from './supports';

/** Dimensions with oblique ticks and extension lines. */
export function Dimensions({ scene }: { readonly scene: Scene }) {
  return (
    <g className="d-dims">
      {scene.dimensions.map((placed) => (
        <g key={placed.chain.direction}>
          <path
            className="d-dim-line"
            d={
              line(placed.stops[0]!, placed.stops[placed.stops.length - 1]!) +
              placed.stops
                .map((stop, i) =>
                  line(placed.from[i]!, { x: stop.x * 1.5 - placed.from[i]!.x * 0.5, y: stop.y * 1.5 - placed.from[i]!.y * 0.5 }),
                )
                .join('')
            }
          />
          <path
            className="d-dim-tick"
            d={placed.stops.map((stop) => line({ x: stop.x - 4, y: stop.y + 4 }, { x: stop.x + 4, y: stop.y - 4 })).join('')}
          />
          {placed.chain.texts.map((text, i) => {
            const { at, turn } = chainText(placed, i);
            return (
              <text
                key={i}
                className="d-dim-text"
                textAnchor="middle"
                dominantBaseline="central"
                transform={`translate(${at.x} ${at.y})${turn ? `rotate(${turn})` : ''}`}
              >
                {text}
              </text>
            );
          })}
        </g>
      ))}
    </g>
  );
}

interface FrameLinesProps {
  readonly scene: Scene;
  readonly thin?: boolean;
  readonly pointed?: number | null;
  /** Members (index) drawn dashed: they carry nothing. */
  readonly slack?: readonly number[];
}

/** Supports, members and nodes; pinned ends as small open circles drawn back from the node, springs as a filled one. */
export function FrameLines({ scene, thin = false, pointed = null, slack = [] }: FrameLinesProps) {
  const { data, paper, axes, support } = scene;
  const dense = data.members.length > 120;
  return (
    <g className={thin ? 'd-frame d-frame-thin' : 'd-frame'}>
      <Supports data={data} paper={paper} size={support} />
      {axes.map((axis) => (
        <path
          key={axis.index}
          className={`d-member ${pointed === axis.index ? 'd-member-pointed' : ''} ${dense ? 'd-member-dense' : ''} ${slack.includes(axis.index) ? 'd-member-slack' : ''}`}
          data-slack={slack.includes(axis.index) || undefined}
          d={line(axis.a, axis.b)}
          data-member={data.members[axis.index]?.id}
        />
      ))}
      {!thin &&
        axes.flatMap((axis) => {
          const member = data.members[axis.index]!;
          const r = scene.large ? 3 : 2.2;
          const back = Math.min(r * 2.6, axis.drawn * 0.2);
          return [
            { joint: member.startJoint, at: plus(axis.a, axis.t, back), key: 's' },
            { joint: member.endJoint, at: plus(axis.b, axis.t, -back), key: 'e' },
          ].flatMap(({ joint, at, key }) =>
            joint === 'rigid'
              ? []
              : [
                  <circle
                    key={`${axis.index}${key}`}
                    className={joint === 'pin' ? 'd-pin' : 'd-joint-spring'}
                    cx={at.x}
                    cy={at.y}
                    r={r}
                  />,
                ],
          );
        })}
      {!thin &&
        !dense &&
        data.nodes.map((node, i) => {
          const p = paper.at(node.x, node.y);
          return <circle key={i} className="d-node" cx={p.x} cy={p.y} r={scene.large ? 2.8 : 2} />;
        })}
    </g>
  );
}

/** Texts with a halo of the sheet behind them. */
export function Labels({ labels }: { readonly labels: readonly PlacedLabel[] }) {
  return (
    <g className="d-labels">
      {labels.map((label) => (
        <g key={label.key}>
          {label.leader && <path className="d-leader" d={line(label.leader, label.at)} />}
          <text
            className={label.className}
            fontSize={label.size}
            textAnchor="middle"
            dominantBaseline="central"
            transform={`translate(${Math.round(label.at.x * 10) / 10} ${Math.round(label.at.y * 10) / 10})${label.turn ? `rotate(${Math.round(label.turn * 10) / 10})` : ''}`}
          >
            {label.text.includes('\n')
              ? label.text.split('\n').map((row, i, rows) => (
                  <tspan key={row} x={0} y={(i - (rows.length - 1) / 2) * label.size * 1.05}>
                    {row}
                  </tspan>
                ))
              : label.text}
          </text>
        </g>
      ))}
    </g>
  );
}
