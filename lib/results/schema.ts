/** The published results file, `tallyframe-results/1`: SI base units, no clock, path or host in it. */
import { z } from 'zod';

export const resultsFormat = 'tallyframe-results/1';

const verdict = z.enum(['within', 'near', 'over', 'not checked']);
const forces = z.strictObject({ N: z.number(), V: z.number(), M: z.number() });
const extreme = z.strictObject({ max: z.number(), maxAt: z.number(), min: z.number(), minAt: z.number() });

const memberResult = z.strictObject({
  member: z.string(),
  start: forces,
  end: forces,
  extremes: z.strictObject({ N: extreme, V: extreme, M: extreme }),
  /** Largest departure from the line between the member's moved ends, signed along local y. */
  deflection: z.strictObject({ value: z.number(), at: z.number() }),
});

/** How a state was found that is not of plain first order. */
const method = z.strictObject({
  /** Which way the imperfections lean. */
  imperfection: z.enum(['right', 'left']).nullable(),
  shearDeformation: z.boolean(),
  /** Analysed under this many times the loads, and the results divided by it. */
  loadScale: z.number(),
  /** Passes until equilibrium stood still, and the largest relative change of the last. */
  iterations: z.number().int(),
  change: z.number(),
  /** Tension-only members that are slack. */
  slack: z.array(z.string()),
  /** Forces that stand for the imperfections, where they are not zero. */
  notional: z.array(z.strictObject({ node: z.string(), fx: z.number(), fy: z.number() })),
  /** Factors on EA and EI of members, where they are not 1. */
  stiffness: z.array(z.strictObject({ member: z.string(), EA: z.number(), EI: z.number() })),
});

const result = z.strictObject({
  name: z.string(),
  kind: z.enum(['case', 'combination']),
  purpose: z.enum(['strength', 'service']).nullable(),
  order: z.union([z.literal(1), z.literal(2)]),
  criticalLoadFactor: z.number().nullable(),
  /** Absent: plain first order. */
  method: method.optional(),
  displacements: z.array(z.strictObject({ node: z.string(), ux: z.number(), uy: z.number(), rz: z.number().nullable() })),
  reactions: z.array(z.strictObject({ node: z.string(), fx: z.number(), fy: z.number(), mz: z.number() })),
  members: z.array(memberResult),
});

const check = z.strictObject({
  subject: z.string(),
  check: z.string(),
  combination: z.string().nullable(),
  at: z.number().nullable(),
  face: z.enum(['top', 'bottom']).nullable(),
  value: z.number().nullable(),
  limit: z.number().nullable(),
  ratio: z.number().nullable(),
  verdict,
  reason: z.string().nullable(),
  reference: z.string(),
});

const certificate = z.strictObject({
  residual: z.number(),
  equilibrium: z.number(),
  condition: z.number(),
  digits: z.number(),
  second: z.number().nullable(),
  secondReason: z.string().nullable(),
});

const frameResultSchema = z.strictObject({
  frame: z.string(),
  status: z.enum(['solved', 'not solved']),
  verdict,
  governing: z
    .strictObject({
      subject: z.string(),
      check: z.string(),
      combination: z.string().nullable(),
      ratio: z.number().nullable(),
    })
    .nullable(),
  notChecked: z.array(z.string()),
  /** Results that such a frame has not, and why (load cases alone of tension-only members). Absent: none. */
  notApplicable: z.array(z.string()).optional(),
  /** kg of one frame; null where a density is missing or the frame could not be read. */
  mass: z.number().nullable(),
  results: z.array(result),
  checks: z.array(check),
  certificate: certificate.nullable(),
});
export type FrameResult = z.infer<typeof frameResultSchema>;

const problemSchema = z.strictObject({
  severity: z.enum(['error', 'warning', 'note']),
  code: z.string(),
  file: z.string().nullable(),
  sheet: z.string().nullable(),
  row: z.number().int().nullable(),
  column: z.string().nullable(),
  cell: z.string().nullable(),
  /** The first of `frames`. */
  frame: z.string().nullable(),
  frames: z.array(z.string()),
  found: z.string().nullable(),
  message: z.string(),
});
export type ProblemJson = z.infer<typeof problemSchema>;

const settingSchema = z.strictObject({
  value: z.union([z.string(), z.number(), z.boolean()]).nullable(),
  defaulted: z.boolean(),
  source: z.enum(['sheet', 'office', 'default']),
});

export const resultsSchema = z.strictObject({
  format: z.literal(resultsFormat),
  engine: z.string(),
  input: z.strictObject({
    name: z.string(),
    sha256: z.string(),
    files: z.array(z.strictObject({ name: z.string(), sha256: z.string(), size: z.number().int() })),
  }),
  settings: z.record(z.string(), settingSchema),
  /** What these settings have checked and what they leave out, in the words of cover and screens. */
  checked: z.string(),
  notChecked: z.string(),
  problems: z.array(problemSchema),
  frames: z.array(frameResultSchema),
});
export type ResultsJson = z.infer<typeof resultsSchema>;
