import 'server-only';
import { db } from '@/db/client';
import { findChecking, findFrameMarks, listCheckingActs, listRevisionsToCheck } from '@/db/queries/checking';
import { findCheckProgress, listToSee } from '@/db/queries/checking-list';
import { findMarkedFrame, listToAccept, type MarkedFrame } from '@/db/queries/checking-marks';
import { listPreparers, listWhoMayCheck } from '@/db/queries/checking-people';
import { listEarlierQueries, listQueries, type QueryRecord } from '@/db/queries/checking-queries';
import { findFrame } from '@/db/queries/frames';
import type { RevisionRecord } from '@/db/queries/revisions';
import { may, type Person } from '@/lib/access/may';
import { ApiError, notFound } from '@/lib/api/error';
import { frameNumberInput } from '@/lib/api/inputs';
import { canBeAnswered, canBeMarked, whyNotMove } from '@/lib/checking/checking-states';
import { handChecks } from '@/lib/checking/hand-checks/hand-checks';
import { deedWords, whyNotCheck } from '@/lib/checking/independence';
import { reasonWords, ruleWords } from '@/lib/checking/sample-rule';
import { whyNotPass } from '@/lib/checking/why-not-pass';
import { dayTime } from './dates';

/** @throws {ApiError} not-allowed, saying what they did of it, where the person may not check the revision */
export async function requireChecker(person: Person, revision: RevisionRecord): Promise<void> {
  const why = whyNotCheck(person, await listPreparers(db(), person.office, revision.id));
  if (why !== null) throw new ApiError('not-allowed', why);
}

/** A frame that can be marked. @throws {ApiError} not-found; conflict where it has no solution, and so is not issued */
export async function requireMarkedFrame(revision: RevisionRecord, number: string): Promise<MarkedFrame> {
  const asked = frameNumberInput.safeParse(number);
  const found = asked.success ? await findMarkedFrame(db(), revision.office, revision.id, asked.data - 1) : undefined;
  if (found === undefined) throw notFound('frame');
  if (found.engine === null) throw new ApiError('conflict', 'This frame has no solution: it is not issued, and not marked.');
  return { ...found, engine: found.engine };
}

/** @throws {ApiError} conflict with the sentence, where there is one */
export function refuse(why: string | null): void {
  if (why !== null) throw new ApiError('conflict', why);
}

/** Where the checking of a revision stands, and the list that it goes through, for the checker's page and the API. */
export async function checkingDetail(person: Person, revision: RevisionRecord) {
  const { office, id, state, letter } = revision;
  const [work, acts, progress, list, checking, queries, checkers] = [
    await listPreparers(db(), office, id),
    await listCheckingActs(db(), office, id),
    await findCheckProgress(db(), office, id),
    await listToSee(db(), office, id),
    await findChecking(db(), office, id),
    await listQueries(db(), office, id),
    await listWhoMayCheck(db(), office, id),
  ];
  const whyNot = whyNotCheck(person, work);
  return {
    letter,
    state,
    rule: ruleWords,
    /** Why this person may not check it; null = they may. */
    whyNotCheck: whyNot,
    mayMark: whyNot === null && canBeMarked(state),
    mayAnswer: may(person, 'answer a query') && canBeAnswered(state),
    whyNotReturn: whyNot ?? whyNotMove(state, 'return'),
    /** All that stands against passing it. */
    whyNotPass: [whyNot ?? whyNotMove(state, 'pass')]
      .flatMap((why) => why ?? [])
      .concat(canBeMarked(state) ? whyNotPass(progress) : []),
    checkers: checkers.map(({ name }) => name),
    preparers: work.map(({ name, did }) => ({ name, did: deedWords(did) })),
    acts: acts.map(({ what, name, at, note }) => ({ what, by: name, at, when: dayTime(at), note })),
    progress,
    list: list.map(({ reasons, index, ...row }) => ({ number: index + 1, ...row, why: reasons.map(reasonWords) })),
    notIssued: checking?.notIssued ?? [],
    queries: queries.map((one) => queryShown(one, person)),
  };
}
export type CheckingDetail = Awaited<ReturnType<typeof checkingDetail>>;

function queryShown({ frame, raisedBy, raisedAt, closed, messages, ...query }: QueryRecord, person: Person) {
  return {
    ...query,
    number: frame + 1,
    raisedBy: raisedBy.name,
    raisedAt,
    mine: raisedBy.id === person.id,
    closed: closed && { by: closed.name, at: closed.at, when: dayTime(closed.at) },
    messages: messages.map((one) => ({ ...one, when: dayTime(one.at) })),
  };
}
export type QueryShown = ReturnType<typeof queryShown>;

/** What is marked of one frame, what is to be accepted, and what a checker works out by hand. @throws {ApiError} not-found */
export async function frameChecking(person: Person, revision: RevisionRecord, number: string) {
  const { office, id, state, units } = revision;
  const asked = frameNumberInput.safeParse(number);
  const stored = asked.success ? await findFrame(db(), office, id, asked.data - 1) : undefined;
  if (stored === undefined) throw notFound('frame');
  const { index, frame, evaluation, status } = stored;
  const [work, marks, toAccept, queries, earlier] = [
    await listPreparers(db(), office, id),
    await findFrameMarks(db(), office, id, index),
    await listToAccept(db(), id, index),
    await listQueries(db(), office, id, index),
    await listEarlierQueries(db(), revision, stored.id),
  ];
  const whyNot = whyNotCheck(person, work);
  const accepted = new Map(marks.accepted.map((one) => [one.item, one]));
  return {
    number: index + 1,
    id: stored.id,
    state,
    units,
    sent: revision.sent !== null,
    whyNotCheck: whyNot,
    mayMark: whyNot === null && canBeMarked(state) && status === 'solved',
    mayAnswer: may(person, 'answer a query') && canBeAnswered(state),
    seen: marks.seen.map(({ person: who, ...one }) => ({ ...one, mine: who === person.id, when: dayTime(one.at) })),
    toAccept: toAccept.map(({ item, ...one }) => {
      const found = accepted.get(item);
      return {
        item,
        ...one,
        accepted: found ? { reason: found.reason, by: found.by, at: found.at, when: dayTime(found.at) } : null,
      };
    }),
    queries: queries.map((one) => queryShown(one, person)),
    /** Of this frame, by its name, in earlier revisions of the batch. */
    earlierQueries: earlier.map((one) => queryShown(one, person)),
    ownValues: marks.ownValues.map((one) => ({ ...one, when: dayTime(one.at) })),
    figures: {
      results: (evaluation?.states ?? []).map(({ name }) => name),
      supports: (frame?.supports ?? []).map(({ node }) => frame!.nodes[node]!.id),
      nodes: (frame?.nodes ?? []).map((node) => node.id),
      members: (frame?.members ?? []).map((member) => member.id),
      checks: (evaluation?.checks ?? []).flatMap(({ subject, check, combination, ratio }, i) =>
        ratio === null ? [] : [{ check: i, label: [check, subject, combination].filter(Boolean).join(', ') }],
      ),
    },
    handChecks: frame && handChecks(frame, evaluation?.states ?? []),
  };
}
export type FrameChecking = Awaited<ReturnType<typeof frameChecking>>;

/** The office's revisions that are with a checker, each with whether this person may check it. */
export async function toCheck(person: Person) {
  const revisions = await listRevisionsToCheck(db(), person.office);
  const found = [];
  for (const { id, ...revision } of revisions) {
    const why = whyNotCheck(person, await listPreparers(db(), person.office, id));
    found.push({ ...revision, sentWhen: dayTime(revision.sentAt), whyNotCheck: why });
  }
  return found;
}
