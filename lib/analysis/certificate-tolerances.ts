/** ‖K d − f‖ / (‖K‖‖d‖ + ‖f‖), at most (engine, Certificate 1). */
export const residualTolerance = 1e-10;
/** Loads as typed against reactions, relative, at most. */
export const equilibriumTolerance = 1e-8;
/** Decimal digits that the condition must leave (engine, Certificate 2). */
export const leastDigits = 6;
/** Difference of the two analyses, relative to the largest value, at most (engine, Certificate 3). */
export const secondTolerance = 1e-6;
/** The second analysis is dense: above this number of unknowns it would cost more than all the rest. */
export const secondUnknowns = 300;
