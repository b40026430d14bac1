'use client';
import { useState, type KeyboardEvent, type PointerEvent, type ReactNode } from 'react';
import { Segments } from '../ui/segments';
import { useKeys } from '../ui/use-keys';
import { useWidth } from '../ui/use-width';
import { captionOf, viewNames, type Diagram, type ViewName } from '@/lib/drawing/captions';
import type { DrawingBuckled, DrawingData } from '@/lib/drawing/drawing-data';
import { DrawingReadout } from './drawing-readout';
import { nearestPoint } from './nearest-point';
import { boundsOf } from '@/lib/drawing/paper';
import { readStep, type ReadPoint } from '@/lib/drawing/read-step';
import { ResultChoice } from './result-choice';
import { ResultFacts } from './result-facts';
import { BuckledView, DeflectedView, DiagramView, LoadsView, RatioView } from './views';

interface FrameDrawingProps {
  readonly data: DrawingData;
  /** Another load case or combination was chosen: bring its `chosen` result. Absent: no choice is offered. */
  readonly onChoose?: (result: string) => void;
  /** The result being brought. */
  readonly loading?: boolean;
  /** The buckled shape of the chosen result; null until it has been brought. */
  readonly buckled?: DrawingBuckled | null;
  /** Another diagram is looked at: B asks for the buckled shape. */
  readonly onDiagram?: (diagram: Diagram) => void;
  readonly initialView?: ViewName;
  readonly initialDiagram?: Diagram;
}

const forces = (['N', 'V', 'M'] as const).map((value) => ({ value, label: value }));

/**
 * A frame on four numbered views, all in sight: the chosen diagram, loads and reactions, deflected line, ratio. Pressing
 * a small one (or its number) swaps it with the large one. Pointing at a member reads x, N, V, M and v there.
 */
export function FrameDrawing({
  data,
  onChoose,
  loading = false,
  buckled = null,
  onDiagram,
  // without a solution its members are all there is to see
  initialView = data.chosen ? 'diagram' : 'ratio',
  initialDiagram = 'M',
}: FrameDrawingProps) {
  const [box, width] = useWidth<HTMLDivElement>(905);
  const [large, setLarge] = useState<ViewName>(initialView);
  const [wanted, setDiagram] = useState<Diagram>(initialDiagram);
  const [point, setPoint] = useState<ReadPoint | null>(null);
  const [looked, setLooked] = useState<ViewName | null>(null);
  const result = data.chosen;
  const buckles = (result?.method.criticalLoadFactor ?? null) !== null;
  // kept for the next result that has a buckled shape; meanwhile moments
  const diagram = wanted === 'B' && !buckles ? 'M' : wanted;
  const phone = width < 640;
  const height = phone ? Math.max(250, Math.round(width * 0.72)) : largeHeight(data, width);
  const small = viewNames.filter((name) => name !== large);
  const smallWidth = phone ? width : Math.floor((width - 2) / 3);
  const smallHeight = phone ? 200 : Math.round(Math.max(150, smallWidth * 0.62));
  const choose = (one: Diagram) => {
    setDiagram(one);
    onDiagram?.(one);
  };
  useKeys({
    ...Object.fromEntries(viewNames.map((name, i) => [String(i + 1), () => setLarge(name)])),
    n: () => choose('N'),
    v: () => choose('V'),
    m: () => choose('M'),
    ...(buckles ? { b: () => choose('B') } : {}),
  });

  const draw = (name: ViewName, w: number, h: number, isLarge: boolean): ReactNode => {
    const view = { data, width: w, height: h, large: isLarge, pointed: point?.member ?? null };
    if (name === 'ratio') return <RatioView {...view} />;
    const shown = name === 'deflected' ? (data.movement ?? result) : result;
    if (!shown) return <Said width={w}>not solved, so there is nothing to draw here</Said>;
    if (name === 'diagram') {
      if (diagram !== 'B') return <DiagramView {...view} result={shown} force={diagram} />;
      if (!buckled) return <Said width={w}>working out the shape</Said>;
      return <BuckledView {...view} result={shown} shape={buckled} breathing={looked === 'diagram'} />;
    }
    if (name === 'loads') return <LoadsView {...view} result={shown} />;
    return <DeflectedView {...view} result={shown} breathing={looked === 'deflected'} />;
  };
  const caption = (name: ViewName) => captionOf(name, data, diagram, buckled);
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
    const moved = readStep(event.key, data, point);
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
              options={[...forces, ...(buckles ? [{ value: 'B', label: 'Buckled' }] : [])]}
              value={diagram}
              onChange={(value) => {
                choose(value as Diagram);
                setLarge('diagram');
              }}
            />
            {onChoose && data.results.length > 0 && (
              <ResultChoice results={data.results} notApplicable={data.notApplicable} chosen={result.name} onChoose={onChoose} />
            )}
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
      {result && <ResultFacts data={data} result={result} />}
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

/** As tall as the frame's own proportions ask for, between 340 and 560 px. */
function largeHeight(data: DrawingData, width: number): number {
  const { minX, maxX, minY, maxY } = boundsOf(data.nodes);
  const wanted = 170 + ((maxY - minY) / Math.max(maxX - minX, 1e-6)) * (width - 260);
  return Math.round(Math.min(560, Math.max(340, wanted)));
}

/** 5 mm squares, behind drawings only. */
function Grid({ width, height }: { readonly width: number; readonly height: number }) {
  let d = '';
  for (let x = 19; x < width; x += 19) d += `M${x}.5 0V${height}`;
  for (let y = 19; y < height; y += 19) d += `M0 ${y}.5H${width}`;
  return <path className="d-grid" d={d} />;
}

/** A sentence in place of a drawing. */
function Said({ width, children }: { readonly width: number; readonly children: string }) {
  return (
    <text className="d-nothing" x={width / 2} y={30} textAnchor="middle">
      {children}
    </text>
  );
}

/** Kept apart so that the dot follows the pointer without drawing the view again. */
function Pointed({ data, point }: { readonly data: DrawingData; readonly point: ReadPoint | null }) {
  const name = point ? data.members[point.member]?.id : null;
  return name ? <desc>{`${name} is being read`}</desc> : null;
}
