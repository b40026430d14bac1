import { door, type Params } from '@/app/_server/door';
import { attachment } from '@/app/_server/download';
import { parse, queryOf } from '@/app/_server/input';
import { ownWords, requireOwnKind } from '@/app/_server/own-parts';
import { requirePerson } from '@/app/_server/person';
import { ownTemplateInput } from '@/lib/api/own-inputs';
import { ownTemplate } from '@/lib/reports/template/own-template';

/** A sheet to fill in, with example rows; `?units=us`, `?format=csv`. */
export const GET = door(async (request, { params }: Params<'kind'>) => {
  await requirePerson(request, 'read sections');
  const kind = requireOwnKind((await params).kind);
  const { units, format } = parse(ownTemplateInput, queryOf(request));
  return attachment(`Tallyframe own ${ownWords[kind]}s ${units}.${format}`, new Uint8Array(ownTemplate(kind, units, format)));
});
