/**
 * Version of everything that turns sheets into numbers. Part of every frame's content address and of every
 * result file: raise it with any change that can move a figure or a verdict.
 */
export const engineVersion = '0.1.0';
