/** N_c,Rd = A fy/γM0 for class 1, 2 and 3, N (EN 1993-1-1 6.2.4(2), (6.10)). */
export const compressionResistance = (A: number, fy: number, gammaM0: number): number => (A * fy) / gammaM0;
