'use client';
import { useEffect, useId, useMemo, useState } from 'react';
import { formatNumber } from '@/lib/units/format';
import { HatchPattern } from '../charts/spread';
import { planBuckled } from '@/lib/drawing/buckled-plan';
import { planDeflected } from '@/lib/drawing/deflected-plan';
import { planDiagram, type Force } from '@/lib/drawing/diagram-plan';
import type { DrawingBuckled, DrawingData, DrawingResult } from '@/lib/drawing/drawing-data';
import { planLoads } from '@/lib/drawing/loads-plan';
import { planRatio } from '@/lib/drawing/ratio-plan';
import { Dimensions, FrameLines, Labels } from './scene-layer';

interface ViewProps {
  readonly data: DrawingData;
  readonly width: number;
  readonly height: number;
  readonly large: boolean;
  readonly pointed?: number | null;
}

/** View 1: N, V or M. */
export function DiagramView({
  data,
  result,
  force,
  pointed,
  width,
  height,
  large,
}: ViewProps & { readonly result: DrawingResult; readonly force: Force }) {
  const plan = useMemo(() => planDiagram(data, result, force, width, height, large), [data, result, force, width, height, large]);
  return (
    <>
      {plan.shapes.map((shape) => (
        <g key={shape.member} className="d-diagram" data-diagram={data.members[shape.member]?.id}>
          <path className="d-fill" d={shape.fill} />
          <path className="d-ordinates" d={shape.ordinates} />
          <path className="d-outline" d={shape.outline} />
        </g>
      ))}
      <FrameLines scene={plan.scene} pointed={pointed} slack={result.slack} />
      {plan.dots.map((dot, i) => (
        <circle key={i} className="d-dot" cx={dot.x} cy={dot.y} r={large ? 2.2 : 1.6} />
      ))}
      <Dimensions scene={plan.scene} />
      <Labels labels={plan.labels} />
      {plan.bar && large ? (
        <g className="d-bar" transform={`translate(${width - 20} ${height - 34})`}>
          <path d={`M0 0V${-plan.bar.length}M-4 0H4M-4 ${-plan.bar.length}H4`} />
          <text x={6} y={17} textAnchor="end">
            {plan.bar.text}
          </text>
        </g>
      ) : null}
      {!plan.bar && (
        <text className="d-nothing" x={width / 2} y={16} textAnchor="middle">
          {force} is zero everywhere
        </text>
      )}
    </>
  );
}

/** View 2: loads and reactions. */
export function LoadsView({ data, result, pointed, width, height, large }: ViewProps & { readonly result: DrawingResult }) {
  const plan = useMemo(() => planLoads(data, result, width, height, large), [data, result, width, height, large]);
  return (
    <>
      {plan.arrows.map((arrow) => (
        <path key={arrow.key} className={arrow.className} d={arrow.d} />
      ))}
      <FrameLines scene={plan.scene} pointed={pointed} slack={result.slack} />
      <Dimensions scene={plan.scene} />
      <Labels labels={plan.labels} />
      {plan.besides.length > 0 && (
        <text className="d-load-text d-besides" x={8} y={height - 6}>
          {plan.besides.join('; ')}
        </text>
      )}
    </>
  );
}

/** View 3: the deflected line, breathing between zero and full while it is looked at. */
export function DeflectedView({
  data,
  result,
  breathing,
  width,
  height,
  large,
}: ViewProps & { readonly result: DrawingResult; readonly breathing: boolean }) {
  const plan = useMemo(() => planDeflected(data, result, width, height, large), [data, result, width, height, large]);
  const share = useBreath(breathing && plan.times !== null);
  return (
    <>
      <FrameLines scene={plan.scene} thin slack={result.slack} />
      <MovedLines className="d-deflected" lines={plan.lines(share)} slack={result.slack} />
      <Dimensions scene={plan.scene} />
      <Labels labels={plan.labels} />
      <text
        className="d-nothing"
        x={large ? width - 10 : 8}
        y={large ? height - 8 : height - 6}
        textAnchor={large ? 'end' : 'start'}
      >
        {plan.times === null ? 'nothing moves' : `movements × ${factorText(plan.times)}`}
      </text>
    </>
  );
}

interface MovedLinesProps {
  readonly className: string;
  /** By member. */
  readonly lines: readonly string[];
  readonly slack: readonly number[];
}

/** The moved lines of all members, slack ones dotted as they are unmoved. */
function MovedLines({ className, lines, slack }: MovedLinesProps) {
  const of = (loose: boolean) => lines.filter((_, i) => slack.includes(i) === loose).join('');
  return (
    <>
      <path className={className} d={of(false)} />
      {slack.length > 0 && <path className="d-moved-slack" d={of(true)} />}
    </>
  );
}

interface BuckledViewProps extends ViewProps {
  readonly result: DrawingResult;
  readonly shape: DrawingBuckled;
  readonly breathing: boolean;
}

/** The shape in which the frame would buckle under α_cr times the loads: drawn as a shape, with no movement named. */
export function BuckledView({ data, result, shape, breathing, width, height, large }: BuckledViewProps) {
  const plan = useMemo(
    () => planBuckled(data, shape, result.slack, width, height, large),
    [data, shape, result.slack, width, height, large],
  );
  const share = useBreath(breathing);
  return (
    <>
      <FrameLines scene={plan.scene} thin slack={result.slack} />
      <MovedLines className="d-buckled" lines={plan.lines(share)} slack={result.slack} />
      <Dimensions scene={plan.scene} />
      <Labels labels={plan.labels} />
      <text className="d-extreme d-governing d-alpha" x={large ? width - 10 : 8} y={18} textAnchor={large ? 'end' : 'start'}>
        α
        <tspan className="d-sub" dy={3}>
          cr
        </tspan>
        <tspan dy={-3}>{` ${formatNumber(shape.factor, { significant: 3 })} for ${result.name}`}</tspan>
      </text>
      <text className="d-nothing" x={large ? width - 10 : 8} y={height - 8} textAnchor={large ? 'end' : 'start'}>
        a shape, of no size
      </text>
    </>
  );
}

/** 20, 0.5: a round factor without idle zeros. */
const factorText = (times: number) => String(Number(times.toPrecision(3)));

/** View 4: every member filled to the limit. */
export function RatioView({ data, pointed, width, height, large }: ViewProps) {
  const hatch = useId();
  const plan = useMemo(() => planRatio(data, width, height, large), [data, width, height, large]);
  return (
    <>
      <HatchPattern id={hatch} />
      {plan.fills.map((fill) => (
        <path
          key={fill.key}
          className={`d-level d-level-${fill.verdict.replace(' ', '-')}`}
          d={fill.d}
          fill={fill.verdict === 'near' ? `url(#${hatch})` : undefined}
        />
      ))}
      {plan.levels.map((level) => (
        <path key={level.key} className={`d-edge d-edge-${level.verdict}`} d={level.d} />
      ))}
      <path className="d-limits" d={plan.limits} />
      <FrameLines scene={plan.scene} thin pointed={pointed} />
      <Dimensions scene={plan.scene} />
      <Labels labels={plan.labels} />
    </>
  );
}

/** 1 at rest; while on, a 2 s sine between zero and one. None under reduced motion. */
function useBreath(on: boolean): number {
  const [share, setShare] = useState(1);
  useEffect(() => {
    if (!on || typeof matchMedia === 'undefined' || matchMedia('(prefers-reduced-motion: reduce)').matches) return;
    let frame = 0;
    let start: number | null = null;
    const step = (now: number) => {
      start ??= now;
      setShare(0.5 + 0.5 * Math.cos(((now - start) / 2000) * 2 * Math.PI));
      frame = requestAnimationFrame(step);
    };
    frame = requestAnimationFrame(step);
    return () => {
      cancelAnimationFrame(frame);
      setShare(1);
    };
  }, [on]);
  return share;
}
