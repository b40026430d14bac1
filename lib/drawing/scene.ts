import { dimensionChains, lengthText, type DimensionChain } from './dimensions';
import type { DrawingData } from './drawing-data';
import { along, memberAxes, type MemberAxis } from './member-axis';
import { awayFrom } from './ground-direction';
import { around, Taken, textWidth, type LabelWish } from './labels';
import { boundsOf, fitPaper, plus, type Margins, type Paper, type Point } from './paper';

/** The paper of one view with the frame on it: what every view shares. */
export interface Scene {
  readonly data: DrawingData;
  readonly paper: Paper;
  readonly axes: readonly MemberAxis[];
  readonly taken: Taken;
  readonly large: boolean;
  readonly font: number;
  /** Half the width of a support's symbol, px. */
  readonly support: number;
  readonly dimensions: readonly PlacedChain[];
}
export interface PlacedChain {
  readonly chain: DimensionChain;
  /** Stops on paper, on the dimension line, and where extension lines begin. */
  readonly stops: readonly Point[];
  readonly from: readonly Point[];
}

/** Extra room each way that a view needs about the frame, px; its points are given for a provisional paper. */
export type Reach = (axes: readonly MemberAxis[], paper: Paper) => readonly Point[];

/** Fits the frame, its dimensions, its supports and whatever the view draws beside it onto the paper. */
export function setScene(data: DrawingData, width: number, height: number, large: boolean, reach?: Reach): Scene {
  const world = boundsOf(data.nodes);
  const chains = large ? dimensionChains(data) : [];
  const font = large ? 12.5 : 11.5;
  const support = large ? 13 : 9;
  const edge: Margins = large
    ? width < 500
      ? { left: 12, right: 14, top: 22, bottom: 20 }
      : { left: 30, right: 30, top: 26, bottom: 26 }
    : { left: 16, right: 16, top: 20, bottom: 14 };
  const dims = {
    left: chains.some((c) => c.direction === 'y') ? 44 : 0,
    bottom: chains.some((c) => c.direction === 'x') ? 34 : 0,
  };
  const feet = data.supports.flatMap((held) => {
    const node = data.nodes[held.node];
    return node ? [{ node, away: awayFrom(data, held) }] : [];
  });
  let extra: Margins = { left: 0, right: 0, top: 0, bottom: 0 };
  const fit = () =>
    fitPaper(world, width, height, {
      left: edge.left + dims.left + extra.left,
      right: edge.right + extra.right,
      top: edge.top + extra.top,
      bottom: edge.bottom + dims.bottom + extra.bottom,
    });
  let paper = fit();
  for (let round = 0; round < 2; round++) {
    const [low, high] = [paper.at(world.minX, world.minY), paper.at(world.maxX, world.maxY)];
    const ground = feet.map(({ node, away }) => plus(paper.at(node.x, node.y), away, support * 1.9));
    const drawn = boundsOf([...(reach?.(memberAxes(data, paper), paper) ?? []), ...ground, low, high]);
    extra = {
      left: low.x - drawn.minX,
      right: drawn.maxX - high.x,
      top: high.y - drawn.minY,
      bottom: drawn.maxY - low.y,
    };
    paper = fit();
  }
  const axes = memberAxes(data, paper);
  const taken = new Taken(width, height);
  for (const axis of axes) taken.line(axis.a, axis.b);
  for (const { node, away } of feet) {
    const middle = plus(paper.at(node.x, node.y), away, support * 0.85);
    taken.text(middle, support * 2, support * 1.6, Math.abs(away.x) > 0.7 ? 90 : 0);
  }
  const scene = {
    data,
    paper,
    axes,
    taken,
    large,
    font,
    support,
    dimensions: placeChains(
      chains.map((chain) => thatFits(chain, data, paper.scale, font)),
      world,
      paper,
      extra,
    ),
  };
  for (const placed of scene.dimensions) {
    taken.lines(placed.stops);
    placed.chain.texts.forEach((text, i) => {
      const place = chainText(placed, i);
      taken.text(place.at, text.length * 6.4, 13, place.turn);
    });
  }
  return scene;
}

/** A chain whose figures would run together is given as a whole. */
function thatFits(chain: DimensionChain, data: DrawingData, scale: number, font: number): DimensionChain {
  const tight = chain.texts.some((text, i) => (chain.stops[i + 1]! - chain.stops[i]!) * scale < textWidth(text, font));
  if (!tight || chain.texts.length === 1) return chain;
  const stops = [chain.stops[0]!, chain.stops[chain.stops.length - 1]!];
  return { ...chain, stops, texts: [lengthText(stops[1]! - stops[0]!, data.units)] };
}

function placeChains(
  chains: readonly DimensionChain[],
  world: ReturnType<typeof boundsOf>,
  paper: Paper,
  extra: Margins,
): PlacedChain[] {
  const corner = paper.at(world.minX, world.minY);
  return chains.map((chain) => {
    const across = chain.direction === 'x';
    const fixed = across ? corner.y + extra.bottom + 22 : corner.x - extra.left - 26;
    const on = (stop: number) => (across ? paper.at(stop, world.minY) : paper.at(world.minX, stop));
    return {
      chain,
      stops: chain.stops.map((stop) => (across ? { x: on(stop).x, y: fixed } : { x: fixed, y: on(stop).y })),
      from: chain.stops.map((stop) => (across ? { x: on(stop).x, y: fixed - 9 } : { x: fixed + 9, y: on(stop).y })),
    };
  });
}

/** Where the text of the i-th dimension stands: above its line, turned for one up the side. */
export function chainText(placed: PlacedChain, i: number): { at: Point; turn: number } {
  const [a, b] = [placed.stops[i]!, placed.stops[i + 1]!];
  const middle = { x: (a.x + b.x) / 2, y: (a.y + b.y) / 2 };
  return placed.chain.direction === 'x'
    ? { at: { x: middle.x, y: middle.y - 7 }, turn: 0 }
    : { at: { x: middle.x - 7, y: middle.y }, turn: -90 };
}

/** Node names, each towards the widest gap between the members that meet there. */
export function nodeWishes(scene: Scene): LabelWish[] {
  const { data, paper, axes, font } = scene;
  if (data.nodes.length > 60) return [];
  return data.nodes.map((node, i) => {
    const angles = axes
      .flatMap((axis) => {
        const member = data.members[axis.index]!;
        if (member.start === i) return [Math.atan2(axis.t.y, axis.t.x)];
        return member.end === i ? [Math.atan2(-axis.t.y, -axis.t.x)] : [];
      })
      .sort((p, q) => p - q);
    const p = paper.at(node.x, node.y);
    const prefer = widestGap(angles);
    return {
      key: `node-${i}`,
      text: node.id,
      className: 'd-node-name',
      size: font - 1,
      places: around(p, prefer, node.id, font - 1, 7),
    };
  });
}

function widestGap(angles: readonly number[]): Point {
  if (angles.length === 0) return { x: 0.7, y: -0.7 };
  let [best, at] = [-1, 0];
  angles.forEach((angle, i) => {
    const next = i + 1 < angles.length ? angles[i + 1]! : angles[0]! + 2 * Math.PI;
    if (next - angle > best) [best, at] = [next - angle, (next + angle) / 2];
  });
  return { x: Math.cos(at), y: Math.sin(at) };
}

/** "BC IPE 360" along each member, on whichever side and place is free; names alone are left off where there are many. */
export function memberWishes(scene: Scene, but: readonly number[] = []): LabelWish[] {
  const { data, axes, font } = scene;
  const many = data.members.length > 40;
  return [...axes]
    .sort((p, q) => q.drawn - p.drawn)
    .flatMap((axis): LabelWish[] => {
      const member = data.members[axis.index]!;
      const text = many ? member.section : `${member.id} ${member.section}`;
      if (but.includes(axis.index) || axis.drawn < text.length * font * 0.5 + 10) return [];
      return [{ key: `member-${axis.index}`, text, className: 'd-member-name', size: font - 1, places: placesAlong(axis, font) }];
    });
}

/** "BD slack" along each member that is slack, ahead of other names: dashes alone might be overlooked. */
export function slackWishes(scene: Scene, slack: readonly number[]): LabelWish[] {
  const { data, axes, font } = scene;
  return slack.flatMap((index) => {
    const axis = axes[index];
    const places = axis ? placesAlong(axis, font) : [];
    const text = `${data.members[index]?.id ?? ''} slack`;
    return [{ key: `slack-${index}`, text, className: 'd-slack-name', size: font - 1, places, must: slack.length <= 8 }];
  });
}

/** Beside a member, turned as it is and never upside down. */
function placesAlong(axis: MemberAxis, font: number): { at: Point; turn: number }[] {
  const steep = Math.abs(axis.t.x) < 0.05;
  let turn = (Math.atan2(axis.t.y, axis.t.x) * 180) / Math.PI;
  if (turn > 90.01) turn -= 180;
  if (turn < -89.99) turn += 180;
  if (steep) turn = -90;
  const off = font * 0.85;
  return [0.5, 0.32, 0.68, 0.2, 0.8].flatMap((share) =>
    [-off, off].map((side) => ({ at: along(axis, axis.length * share, side), turn })),
  );
}
