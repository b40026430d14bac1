import { door, type Params } from '@/app/_server/door';
import { parse, queryOf } from '@/app/_server/input';
import { keepAll, ownWords, requireOwnKind } from '@/app/_server/own-parts';
import { requirePerson } from '@/app/_server/person';
import { readUpload } from '@/app/_server/upload';
import { db } from '@/db/client';
import { listOwnParts } from '@/db/queries/own-parts';
import { ApiError } from '@/lib/api/error';
import { ownImportInput } from '@/lib/api/own-inputs';
import { readOwnTable } from '@/app/_server/own-table';
import { idKey } from '@/lib/intake/ids';

/** Problems that are answered at most; the rest is counted. */
const mostProblems = 500;

/** A table of them from a sheet: what it says, every problem at its cell, and with `keep=yes` and no error its versions. */
export const POST = door(async (request, { params }: Params<'kind'>) => {
  const person = await requirePerson(request, 'change sections');
  const kind = requireOwnKind((await params).kind);
  const { units, keep } = parse(ownImportInput, queryOf(request));
  const { files } = await readUpload(request);
  const { records, problems } = await readOwnTable(kind, files, units);
  const wrong = problems.some(({ severity }) => severity === 'error');
  if (keep === 'yes' && wrong)
    throw new ApiError('problems', 'Nothing was kept: mend the cells that are named and send the table again.', {
      problems: problems.slice(0, mostProblems),
    });
  if (keep === 'yes' && records.length === 0) throw new ApiError('bad-request', `The table holds no ${ownWords[kind]}.`);
  const known = new Map((await listOwnParts(db(), person.office, kind)).map((part) => [idKey(part.name), part.version]));
  const kept = keep === 'yes' ? await keepAll(person, records) : [];
  return Response.json({
    records: records.map(({ record, note, section, material }) => {
      const before = known.get(idKey(record.name));
      return { name: record.name, cells: record.cells, note, version: (before ?? 0) + 1, section, material };
    }),
    problems: problems.slice(0, mostProblems),
    more: Math.max(0, problems.length - mostProblems),
    kept: kept.length,
    unchanged: kept.filter(({ isNew }) => !isNew).length,
  });
});
