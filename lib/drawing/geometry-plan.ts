import type { DrawingData } from './drawing-data';
import { placeLabels, type PlacedLabel } from './labels';
import { memberWishes, nodeWishes, setScene, type Scene } from './scene';

export interface GeometryPlan {
  readonly scene: Scene;
  readonly labels: readonly PlacedLabel[];
}

/** The frame alone: members with their sections, nodes, supports, dimensions. */
export function planGeometry(data: DrawingData, width: number, height: number): GeometryPlan {
  const scene = setScene(data, width, height, true);
  return { scene, labels: placeLabels([...nodeWishes(scene), ...memberWishes(scene)], scene.taken) };
}
