import 'server-only';
import type { z } from 'zod';
import { ApiError, badRequest } from '@/lib/api/error';
import { readBody } from '@/lib/api/multipart';

/** No JSON that the API takes is longer. */
const jsonLimit = 256 * 1024;

/** The request's JSON as the schema wants it. @throws {ApiError} bad-request naming the fields, too-large */
export async function readJson<T extends z.ZodType>(request: Request, schema: T): Promise<z.output<T>> {
  const bytes = await readBody(request.body, jsonLimit);
  let sent: unknown;
  try {
    sent = JSON.parse(new TextDecoder().decode(bytes));
  } catch {
    throw new ApiError('bad-request', 'The request must be JSON.');
  }
  return parse(schema, sent);
}

/** @throws {ApiError} bad-request naming the fields */
export function parse<T extends z.ZodType>(schema: T, sent: unknown): z.output<T> {
  const read = schema.safeParse(sent);
  if (!read.success) throw badRequest(read.error);
  return read.data;
}

/** The query as a plain record; a key given twice keeps its first value. */
export function queryOf(request: Request): Record<string, string> {
  const record: Record<string, string> = {};
  for (const [key, value] of new URL(request.url).searchParams) record[key] ??= value;
  return record;
}
