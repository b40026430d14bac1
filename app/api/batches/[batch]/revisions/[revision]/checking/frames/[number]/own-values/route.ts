import { atRevision } from '@/app/_server/at-revision';
import { refuse, requireChecker, requireMarkedFrame } from '@/app/_server/checking-detail';
import { door } from '@/app/_server/door';
import { readJson } from '@/app/_server/input';
import { db } from '@/db/client';
import { insertOwnValue } from '@/db/queries/checking-marks';
import { findFrame } from '@/db/queries/frames';
import { ownValueInput } from '@/lib/api/checking-inputs';
import { ApiError, notFound } from '@/lib/api/error';
import { figureOfOurs } from '@/lib/checking/figure';
import { batchUnit, unitLabel } from '@/lib/units/batch-unit';
import { readQuantity } from '@/lib/units/read-number';

/** Keeps a checker's own value beside one of ours; the value as typed, in the batch's unit or its own (`75.2 kN`). */
export const POST = door(
  atRevision<'number'>('check', async ({ request, person, revision, params }) => {
    await requireChecker(person, revision);
    const { figure, value, note } = await readJson(request, ownValueInput);
    const marked = await requireMarkedFrame(revision, params.number);
    const stored = await findFrame(db(), person.office, revision.id, marked.index);
    if (!stored?.frame || !stored.evaluation) throw notFound('frame');
    const ours = figureOfOurs(stored.frame, stored.evaluation, figure);
    if ('none' in ours) throw new ApiError('bad-request', ours.none, { fields: { figure: [ours.none] } });
    const { quantity } = ours;
    const read = readQuantity(value, { quantity, unit: batchUnit(quantity, revision.units), decimalMark: null });
    if (read.kind !== 'number') {
      const unit = unitLabel(quantity, revision.units);
      const sentence = `Give a number${unit ? `, in ${unit} or with its unit` : ''}, like 75.2${unit ? ` or 75.2 ${unit}` : ''}.`;
      throw new ApiError('bad-request', sentence, { fields: { value: [sentence] } });
    }
    const kept = { figure, label: ours.label, quantity, ours: ours.value, theirs: read.si, typed: value, note };
    refuse(await insertOwnValue(db(), revision, marked, person, kept));
    const { label } = ours;
    return Response.json({ ownValue: { label, quantity, ours: ours.value, theirs: read.si } }, { status: 201 });
  }),
);
