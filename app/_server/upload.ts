import 'server-only';
import { ApiError } from '@/lib/api/error';
import { baseName, readBody, splitMultipart, tooLarge, type SentFile } from '@/lib/api/multipart';

/** Of all files of one upload together, as sent (sheets §1). */
const uploadLimit = 25 * 1024 * 1024;
/** Boundaries, headings and names of a form beside its files. */
const formLimit = 256 * 1024;
/** Uploads held in memory at one time; more are asked to come again. */
const atOnce = 8;

let inHand = 0;

export interface Upload {
  readonly files: readonly SentFile[];
  /** The form's other fields. */
  readonly fields: Readonly<Record<string, string>>;
}

/**
 * The files of an upload: a form with one or more files, or one file as the body with `?file=NAME`. The size is
 * checked by what the request says and again while it streams.
 *
 * @throws {ApiError} too-large, bad-request, too-many
 */
export async function readUpload(request: Request): Promise<Upload> {
  const said = Number(request.headers.get('content-length') ?? 0);
  if (said > uploadLimit + formLimit) throw tooLarge(uploadLimit);
  if (inHand >= atOnce) throw new ApiError('too-many', 'Many files are coming in at this moment. Send them again in a minute.');
  inHand += 1;
  try {
    const type = request.headers.get('content-type') ?? '';
    return check(/^multipart\/form-data/i.test(type) ? await readForm(request, type) : await readSingle(request));
  } finally {
    inHand -= 1;
  }
}

async function readForm(request: Request, type: string): Promise<Upload> {
  return splitMultipart(await readBody(request.body, uploadLimit + formLimit), type);
}

async function readSingle(request: Request): Promise<Upload> {
  const query = new URL(request.url).searchParams;
  const name = baseName(query.get('file') ?? '');
  if (name === '') throw new ApiError('bad-request', 'Say what the file is called: ?file=frames.xlsx.');
  const fields = Object.fromEntries([...query].filter(([key]) => key !== 'file'));
  return { files: [{ name, bytes: await readBody(request.body, uploadLimit) }], fields };
}

function check(upload: Upload): Upload {
  const files = upload.files.filter((file) => file.name !== '');
  if (files.length === 0) throw new ApiError('bad-request', 'No file came with the request. Choose an .xlsx, .csv or .zip file.');
  if (files.length > 50) throw new ApiError('bad-request', 'At most 50 files may be sent at once. Put them into a .zip.');
  const size = files.reduce((sum, file) => sum + file.bytes.length, 0);
  if (size > uploadLimit) throw tooLarge(uploadLimit);
  const names = new Set(files.map((file) => file.name.toLowerCase()));
  if (names.size < files.length) throw new ApiError('bad-request', 'Two of the files have the same name. Rename one.');
  return { ...upload, files };
}
