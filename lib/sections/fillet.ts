/**
 * The root fillet (spandrel): a square of side r less the quarter circle of radius r whose centre is
 * the square's far corner. Distances are from the two straight edges that it fills.
 */

/** Area of a fillet, r² (1 − π/4). */
export const filletArea = (r: number): number => r * r * (1 - Math.PI / 4);

/** Distance of its centroid from either straight edge, r (10 − 3π) / (12 − 3π) = 0.2234 r. */
export const filletCentroid = (r: number): number => (r * (10 - 3 * Math.PI)) / (12 - 3 * Math.PI);

/** Second moment about an axis through its own centroid, parallel to an edge: r⁴ (1 − 5π/16) − A c². */
export const filletInertia = (r: number): number => r ** 4 * (1 - (5 * Math.PI) / 16) - filletArea(r) * filletCentroid(r) ** 2;
