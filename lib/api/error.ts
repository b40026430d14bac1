/**
 * The one shape of error that the API answers with, whatever the route:
 *
 * ```json
 * { "error": { "code": "not-found", "message": "There is no such batch.",
 *              "problems": [ … ],                       // what is wrong in the sheets, each at its cell (422)
 *              "fields": { "email": ["Enter …"] } } }   // what is wrong in a form or a query (400)
 * ```
 *
 * `code` is for programs, `message` for people: what happened and what to do. A thing of another office is
 * answered as one that does not exist. Nothing of the service's inside (stack, path, query) is ever in it.
 */
import { z } from 'zod';

const errorStatus = {
  'bad-request': 400,
  'not-signed-in': 401,
  'not-allowed': 403,
  'other-origin': 403,
  'not-found': 404,
  conflict: 409,
  'too-large': 413,
  'wrong-kind': 415,
  problems: 422,
  'too-many': 429,
  failed: 500,
} as const;
export type ErrorCode = keyof typeof errorStatus;

const problemShape = z.object({
  severity: z.enum(['error', 'warning', 'note']),
  code: z.string(),
  sheet: z.string().nullable(),
  row: z.number().nullable(),
  column: z.string().nullable(),
  cell: z.string().nullable(),
  message: z.string(),
});

export const errorShape = z.object({
  error: z.object({
    code: z.enum(Object.keys(errorStatus) as [ErrorCode, ...ErrorCode[]]),
    message: z.string(),
    problems: z.array(problemShape).optional(),
    fields: z.record(z.string(), z.array(z.string())).optional(),
  }),
});
export type ErrorBody = z.infer<typeof errorShape>;

type More = Pick<ErrorBody['error'], 'problems' | 'fields'>;

/** Something a route answers with instead of its result; thrown by its steps, turned into a reply at the door. */
export class ApiError extends Error {
  constructor(
    readonly code: ErrorCode,
    message: string,
    readonly more: More = {},
  ) {
    super(message);
    this.name = 'ApiError';
  }

  get status(): number {
    return errorStatus[this.code];
  }

  toBody(): ErrorBody {
    return { error: { code: this.code, message: this.message, ...this.more } };
  }
}

/** The answer for what is not there and for what is another office's: the same words. */
export function notFound(what: string): ApiError {
  return new ApiError('not-found', `There is no such ${what}.`);
}

/** A zod fault as fields with sentences. */
export function badRequest(fault: z.ZodError): ApiError {
  const flat = z.flattenError(fault);
  const fields: Record<string, string[]> = {};
  for (const [name, sentences] of Object.entries(flat.fieldErrors)) {
    if (Array.isArray(sentences)) fields[name] = sentences.map(String);
  }
  const first = flat.formErrors[0] ?? Object.values(fields)[0]?.[0] ?? 'Something is missing.';
  return new ApiError('bad-request', first, { fields });
}
