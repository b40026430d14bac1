'use client';
import { useState, type KeyboardEvent, type PointerEvent, type ReactNode } from 'react';
import { Choice } from '../ui/choice';
import { Segments } from '../ui/segments';
import { useKeys } from '../ui/use-keys';
import { useWidth } from '../ui/use-width';
import type { Force } from './diagram-plan';
import { unitLabel } from '@/lib/units/batch-unit';
import type { DrawingData, DrawingResult } from './drawing-data';
import { DrawingReadout, type ReadPoint } from './drawing-readout';
import { nearestPoint } from './nearest-point';
import { boundsOf } from './paper';
import { DeflectedView, DiagramView, LoadsView, RatioView } from './views';

interface FrameDrawingProps {
  readonly data: DrawingData;
  /** Another load case or combination was chosen: bring its `chosen` result. Absent: no choice is offered. */
  readonly onChoose?: (result: string) => void;
  /** The result being brought. */
  readonly loading?: boolean;
  readonly initialView?: ViewName;
  readonly initialForce?: Force;
}

const viewNames = ['diagram', 'loads', 'deflected', 'ratio'] as const;
export type ViewName = (typeof viewNames)[number];

const forceTitles = { N: 'Axial force', V: 'Shear force', M: 'Bending moment' } as const;

/**
 * A frame on four numbered views, all in sight: the chosen diagram, loads and reactions, deflected line, ratio. Pressing
 * a small one (or its number) swaps it with the large one. Pointing at a member reads x, N, V, M and v there.
 */
export function FrameDrawing({
  data,
  onChoose,
  loading = false,
  // without a solution its members are all there is to see
  initialView = data.chosen ? 'diagram' : 'ratio',
  initialForce = 'M',
}: FrameDrawingProps) {
  const [box, width] = useWidth<HTMLDivElement>(905);
  const [large, setLarge] = useState<ViewName>(initialView);
  const [force, setForce] = useState<Force>(initialForce);
  const [point, setPoint] = useState<ReadPoint | null>(null);
  const [looked, setLooked] = useState<ViewName | null>(null);
  const result = data.chosen;
  const phone = width < 640;
  const height = phone ? Math.max(250, Math.round(width * 0.72)) : largeHeight(data, width);
  const small = viewNames.filter((name) => name !== large);
  const smallWidth = phone ? width : Math.floor((width - 2) / 3);
  const smallHeight = phone ? 200 : Math.round(Math.max(150, smallWidth * 0.62));
  useKeys({
    ...Object.fromEntries(viewNames.map((name, i) => [String(i + 1), () => setLarge(name)])),
    n: () => setForce('N'),
    v: () => setForce('V'),
    m: () => setForce('M'),
  });

  const draw = (name: ViewName, w: number, h: number, isLarge: boolean): ReactNode => {
    const view = { data, width: w, height: h, large: isLarge, pointed: point?.member ?? null };
    if (name === 'ratio') return <RatioView {...view} />;
    const shown = name === 'deflected' ? (data.movement ?? result) : result;
    if (!shown) return <NotSolved width={w} />;
    if (name === 'diagram') return <DiagramView {...view} result={shown} force={force} />;
    if (name === 'loads') return <LoadsView {...view} result={shown} />;
    return <DeflectedView {...view} result={shown} breathing={looked === 'deflected'} />;
  };
  const caption = (name: ViewName) => captionOf(name, data, force);
  const onPointer = (event: PointerEvent<SVGSVGElement>) => {
    const bounds = event.currentTarget.getBoundingClientRect();
    const at = {
      x: ((event.clientX - bounds.left) * width) / bounds.width,
      y: ((event.clientY - bounds.top) * height) / bounds.height,
    };
    const found = nearestPoint(event.currentTarget, data, at);
    if (found) setPoint(found);
  };
  const onKeyDown = (event: KeyboardEvent) => {
    const moved = step(event.key, data, point);
    if (!moved) return;
    event.preventDefault();
    setPoint(moved);
  };
  const main = caption(large);
  return (
    <div className="drawing" ref={box} aria-busy={loading}>
      <div className="d-tools">
        <h2>
          <span className="d-number">{viewNames.indexOf(large) + 1}</span> {main.title}{' '}
          <span className="zone-note">{main.note}</span>
        </h2>
        {result && (
          <div className="d-choices">
            <Segments
              label="Diagram"
              options={(['N', 'V', 'M'] as const).map((value) => ({ value, label: value }))}
              value={force}
              onChange={(value) => {
                setForce(value as Force);
                setLarge('diagram');
              }}
            />
            {onChoose && data.results.length > 0 && <ResultChoice data={data} chosen={result.name} onChoose={onChoose} />}
          </div>
        )}
      </div>
      <svg
        className="d-view d-view-large"
        viewBox={`0 0 ${width} ${height}`}
        width="100%"
        role="img"
        tabIndex={0}
        aria-label={`Frame ${data.frame}, ${main.title}${main.note ? `, ${main.note}` : ''}. Arrow keys read values along a member.`}
        data-view={large}
        onPointerMove={onPointer}
        onPointerDown={onPointer}
        onPointerEnter={() => setLooked(large)}
        onPointerLeave={() => setLooked(null)}
        onFocus={() => setLooked(large)}
        onBlur={() => setLooked(null)}
        onKeyDown={onKeyDown}
      >
        <Grid width={width} height={height} />
        {draw(large, width, height, true)}
        <Pointed data={data} point={point} />
      </svg>
      {result && <DrawingReadout data={data} result={result} point={point} />}
      <div className="d-small">
        {small.map((name) => {
          const { title, note } = caption(name);
          return (
            <button
              key={name}
              type="button"
              className="d-swap"
              onClick={() => setLarge(name)}
              onPointerEnter={() => setLooked(name)}
              onPointerLeave={() => setLooked(null)}
              onFocus={() => setLooked(name)}
              onBlur={() => setLooked(null)}
              aria-label={`Make view ${viewNames.indexOf(name) + 1} large: ${title}, ${note}`}
            >
              <svg
                className="d-view"
                viewBox={`0 0 ${smallWidth} ${smallHeight}`}
                width="100%"
                aria-hidden="true"
                data-view={name}
              >
                <Grid width={smallWidth} height={smallHeight} />
                {draw(name, smallWidth, smallHeight, false)}
              </svg>
              <span className="d-caption">
                <span className="d-number">{viewNames.indexOf(name) + 1}</span> <b>{title}</b> {note}
              </span>
            </button>
          );
        })}
      </div>
    </div>
  );
}

/** Every case and combination in sight; more than fourteen in a list that opens. */
function ResultChoice({ data, chosen, onChoose }: { data: DrawingData; chosen: string; onChoose: (result: string) => void }) {
  const options = data.results.map(({ name }) => ({ value: name, label: name }));
  const label = 'Load case or combination';
  if (options.length <= 14) return <Segments label={label} options={options} value={chosen} onChange={onChoose} />;
  return (
    <span className="choice-list-right">
      <Choice label={label} options={options} value={[chosen]} onChange={([name]) => name && onChoose(name)} />
    </span>
  );
}

/** As tall as the frame's own proportions ask for, between 340 and 560 px. */
function largeHeight(data: DrawingData, width: number): number {
  const { minX, maxX, minY, maxY } = boundsOf(data.nodes);
  const wanted = 170 + ((maxY - minY) / Math.max(maxX - minX, 1e-6)) * (width - 260);
  return Math.round(Math.min(560, Math.max(340, wanted)));
}

function captionOf(name: ViewName, data: DrawingData, force: Force): { title: string; note: string } {
  const result = data.chosen;
  const told = (one: DrawingResult | null) => (one ? [one.name, one.description].filter(Boolean).join(', ') : 'not solved');
  if (name === 'diagram')
    return {
      title: forceTitles[force],
      note: result
        ? `${told(result)}; ${unitLabel(force === 'M' ? 'moment' : 'force', data.units)}${force === 'M' ? ', drawn on the tension side' : force === 'N' ? ', tension positive' : ''}`
        : told(null),
    };
  if (name === 'loads') return { title: 'Loads and reactions', note: told(result) };
  if (name === 'deflected') return { title: 'Deflected line', note: told(data.movement ?? result) };
  return { title: 'Ratio', note: result ? 'each member filled to its governing ratio' : 'nothing is checked yet' };
}

/** 5 mm squares, behind drawings only. */
function Grid({ width, height }: { readonly width: number; readonly height: number }) {
  let d = '';
  for (let x = 19; x < width; x += 19) d += `M${x}.5 0V${height}`;
  for (let y = 19; y < height; y += 19) d += `M0 ${y}.5H${width}`;
  return <path className="d-grid" d={d} />;
}

function NotSolved({ width }: { readonly width: number }) {
  return (
    <text className="d-nothing" x={width / 2} y={30} textAnchor="middle">
      not solved, so there is nothing to draw here
    </text>
  );
}

/** Kept apart so that the dot follows the pointer without drawing the view again. */
function Pointed({ data, point }: { readonly data: DrawingData; readonly point: ReadPoint | null }) {
  const name = point ? data.members[point.member]?.id : null;
  return name ? <desc>{`${name} is being read`}</desc> : null;
}

/** Arrow left and right walk along the member in twentieths, up and down go to the next one. */
function step(key: string, data: DrawingData, point: ReadPoint | null): ReadPoint | null {
  const count = data.members.length;
  const lengthOf = (index: number) => {
    const member = data.members[index]!;
    const [p, q] = [data.nodes[member.start]!, data.nodes[member.end]!];
    return Math.hypot(q.x - p.x, q.y - p.y);
  };
  if (count === 0 || !['ArrowLeft', 'ArrowRight', 'ArrowUp', 'ArrowDown', 'Home', 'End'].includes(key)) return null;
  if (!point) return { member: 0, x: 0 };
  const length = lengthOf(point.member);
  if (key === 'Home' || key === 'End') return { ...point, x: key === 'Home' ? 0 : length };
  if (key === 'ArrowLeft' || key === 'ArrowRight') {
    const x = point.x + ((key === 'ArrowRight' ? 1 : -1) * length) / 20;
    return { ...point, x: Math.min(Math.max(x, 0), length) };
  }
  const member = (point.member + (key === 'ArrowDown' ? 1 : -1) + count) % count;
  return { member, x: (point.x / length) * lengthOf(member) };
}
