import type { DrawingBuckled, DrawingData } from './drawing-data';
import { placeLabels, type PlacedLabel } from './labels';
import { path, plus, type Paper, type Point } from './paper';
import { nodeWishes, setScene, slackWishes, type Scene } from './scene';

export interface BuckledPlan {
  readonly scene: Scene;
  /** The buckled line of each member at a share (−1 to 1) of what is drawn. */
  readonly lines: (share: number) => readonly string[];
  readonly labels: readonly PlacedLabel[];
}

/** The shape in which a frame buckles. It has no size: its largest movement is drawn at a tenth of the paper. */
export function planBuckled(
  data: DrawingData,
  { members }: DrawingBuckled,
  slack: readonly number[],
  width: number,
  height: number,
  large: boolean,
): BuckledPlan {
  const most = Math.min(height * 0.12, large ? 50 : 24);
  const moved = (points: readonly number[], paper: Paper, share: number): Point[] => {
    const line: Point[] = [];
    for (let i = 0; i + 3 < points.length; i += 4) {
      const unmoved = paper.at(points[i]!, points[i + 1]!);
      line.push(plus(unmoved, { x: points[i + 2]!, y: -points[i + 3]! }, most * share));
    }
    return line;
  };
  const scene = setScene(data, width, height, large, (_, paper) => members.flatMap((points) => moved(points, paper, 1)));
  for (const points of members) scene.taken.lines(moved(points, scene.paper, 1));
  return {
    scene,
    lines: (share) => members.map((points) => path(moved(points, scene.paper, share))),
    labels: placeLabels([...(large ? nodeWishes(scene) : []), ...slackWishes(scene, slack)], scene.taken),
  };
}
