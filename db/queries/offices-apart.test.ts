import { expect, it } from 'vitest';
import { findBatch, insertBatch, listBatches } from '@/db/queries/batches';
import { insertActivity, listActivity, listActivityChoices } from '@/db/queries/activity';
import { insertInvitation, listInvitations } from '@/db/queries/invitations';
import { listLetters } from '@/db/queries/outbox';
import { findKeeper, findStanding } from '@/db/queries/standing';
import { insertToken, listTokens } from '@/db/queries/tokens';
import { findFrame, findFrameIndex, findNeighbours, iterateFrames } from '@/db/queries/frames';
import {
  findSetVersion,
  insertCombinationSet,
  insertSetVersion,
  listCombinationSets,
  listSetUses,
  listSetVersions,
  updateSetOffered,
} from '@/db/queries/combination-sets';
import { listCombinations } from '@/db/queries/combinations';
import { findCompared } from '@/db/queries/compare';
import { findMaking, insertChangedRevision, listChanges } from '@/db/queries/changes';
import { insertIntake } from '@/db/queries/intake';
import { findLatestJob, insertJob } from '@/db/queries/jobs';
import { iterateRows, listFacets, listRows } from '@/db/queries/lists';
import { listOfficeLimits, updateOfficeLimits } from '@/db/queries/office-limits';
import { findPerson, listPeople } from '@/db/queries/people';
import { iterateInputRows, listInputRowsAround, listProblems, listSheets } from '@/db/queries/problems';
import { findProject, listAssigned, listProjects, listProjectsOf, updateAssigned } from '@/db/queries/projects';
import {
  countRevisionVerdicts,
  findRevision,
  findRevisionById,
  insertRevision,
  listRevisions,
  updateRevisionState,
} from '@/db/queries/revisions';
import { findSizing, insertSizing, listSizings } from '@/db/queries/sizing';
import { findSummary, listParameterRatios, listParameters } from '@/db/queries/summary';
import { deleteUploads, insertUpload, listUploadedFiles, listUploads } from '@/db/queries/uploads';
import type { OpenDatabase } from '@/db/open';
import { newDatabase } from '@/db/testing/database';
import { collected, intakeOf, type Office, office, portal, read, run, seeded } from '@/db/testing/sample';
import type { View } from '@/lib/tables/view';

/** A full office with a run batch, and another that is as full. */
async function twoOffices() {
  const database = await newDatabase();
  const fill = async (name: string) => {
    const own = await office(database.db, name);
    const revision = await read(database, own, intakeOf([portal('F1', 10), portal('F2', 12)]));
    run(database.raw, revision.id, own.person, seeded(1));
    const upload = { name: 'shed.xlsx', size: 3, sha256: 'ab', bytes: Buffer.from('abc'), person: own.person };
    await insertUpload(database.db, own.office, { ...upload, revision: revision.id });
    await updateAssigned(database.db, own.office, own.project, [own.person]);
    await insertActivity(database.db, own.office, { what: 'ran a revision', person: own.person, project: own.project });
    const change = { kind: 'setting', setting: 'nearLimit', value: '0.8' } as const;
    const words = { what: 'near limit', from: '0.90', to: '0.80' };
    const made = { from: revision.id, person: own.person, changes: [{ change, ...words }], reason: 'asked for', run: false };
    const changed = (await insertChangedRevision(database.db, own.office, made))!.id;
    await insertJob(database.db, own.office, { kind: 'run', revision: revision.id, person: own.person });
    await insertSizing(database.db, own.office, {
      revision: revision.id,
      person: own.person,
      request: { groups: [] },
      engine: 'e',
    });
    const by = { person: { id: own.person, name: 'Northlight analyst', officeName: name }, serverSecret: 'of tests' };
    await insertInvitation(database.db, own.office, { email: `wren@${name}.example`, role: 'client', projects: [] }, by);
    const token = { person: own.person, name: 'nightly', scope: 'read', expiresAt: '2099-01-01T00:00:00.000Z' } as const;
    await insertToken(database.db, own.office, token);
    return { ...own, name, revision: revision.id, changed };
  };
  return { ...database, own: await fill('Northlight'), other: await fill('Southgate') };
}
type Filled = Office & { readonly name: string; readonly revision: number; readonly changed: number };

const members: View = { table: 'members', filters: [], sort: null, columns: null };

/** Every query that reads a thing of an office: what it gives of `of`'s things to someone of the office asking. */
const queries: Readonly<Record<string, (given: OpenDatabase, asking: number, of: Filled) => Promise<unknown>>> = {
  findPerson: ({ db }, asking, of) => findPerson(db, asking, of.person),
  findProject: ({ db }, asking, of) => findProject(db, asking, of.project),
  listAssigned: ({ db }, asking, of) => listAssigned(db, asking, of.project),
  listProjectsOf: ({ db }, asking, of) => listProjectsOf(db, asking, of.person),
  findBatch: ({ db }, asking, of) => findBatch(db, asking, of.batch),
  listBatches: ({ db }, asking, of) => listBatches(db, asking, of.project),
  findRevision: ({ db }, asking, of) => findRevision(db, asking, of.batch, 'A'),
  findRevisionById: ({ db }, asking, of) => findRevisionById(db, asking, of.revision),
  listRevisions: ({ db }, asking, of) => listRevisions(db, asking, of.batch),
  countRevisionVerdicts: async ({ db }, asking, of) => {
    const { over, near, within, notChecked } = await countRevisionVerdicts(db, asking, of.revision);
    return Array(over + near + within + notChecked).fill('frame');
  },
  listUploads: ({ db }, asking, of) => listUploads(db, asking, of.revision),
  listUploadedFiles: ({ db }, asking, of) => listUploadedFiles(db, asking, of.revision),
  listProblems: ({ db }, asking, of) => listProblems(db, asking, of.revision),
  listCombinations: async ({ db }, asking, of) => (await listCombinations(db, asking, of.revision, 10)).list,
  listSheets: ({ db }, asking, of) => listSheets(db, asking, of.revision),
  iterateInputRows: ({ db }, asking, of) => collected(iterateInputRows(db, asking, of.revision)),
  listInputRowsAround: ({ db }, asking, of) =>
    listInputRowsAround(db, asking, of.revision, { sheet: 'Members', row: 2, around: 2 }),
  listChanges: ({ db }, asking, of) => listChanges(db, asking, of.changed),
  findMaking: async ({ raw }, asking, of) => findMaking(raw, asking, of.changed),
  findCompared: async ({ raw }, asking, of) => findCompared(raw, asking, of.revision, of.changed),
  findFrame: ({ db }, asking, of) => findFrame(db, asking, of.revision, 0),
  findFrameIndex: ({ db }, asking, of) => findFrameIndex(db, asking, of.revision, 'F2'),
  iterateFrames: ({ db }, asking, of) => collected(iterateFrames(db, asking, of.revision)),
  findNeighbours: async ({ db }, asking, of) =>
    Array((await findNeighbours(db, asking, of.revision, 0, members)).of).fill('frame'),
  listRows: ({ db }, asking, of) => listRows(db, asking, of.revision, members, { limit: 10 }),
  iterateRows: ({ db }, asking, of) => collected(iterateRows(db, asking, of.revision, members)),
  listFacets: ({ db }, asking, of) => listFacets(db, asking, of.revision, 'members', 'section'),
  listFacetsOfParameters: ({ db }, asking, of) => listFacets(db, asking, of.revision, 'frames', 'p:span'),
  findSummary: ({ db }, asking, of) => findSummary(db, asking, of.revision),
  listParameters: ({ db }, asking, of) => listParameters(db, asking, of.revision),
  listParameterRatios: ({ db }, asking, of) => listParameterRatios(db, asking, of.revision, 'span'),
  findLatestJob: ({ db }, asking, of) => findLatestJob(db, asking, of.revision, 'run'),
  listSizings: ({ db }, asking, of) => listSizings(db, asking, of.revision),
  findSizing: async ({ db }, asking, of) =>
    findSizing(db, asking, of.revision, (await listSizings(db, of.office, of.revision))[0]?.id ?? 0),
  findStanding: ({ db }, asking, of) => findStanding(db, asking, of.person),
  findKeeper: ({ db }, asking, of) => findKeeper(db, asking, of.batch),
  listTokens: ({ db }, asking, of) => listTokens(db, asking, of.person),
  listInvitations: async ({ db }, asking, of) => (await listInvitations(db, asking)).filter((one) => one.email.includes(of.name)),
  listLetters: async ({ db }, asking, of) => (await listLetters(db, asking)).filter((one) => one.recipient.includes(of.name)),
  listActivityChoices: async ({ db }, asking, of) => (await listActivityChoices(db, asking, of.project)).whats,
  listActivityOfProject: ({ db }, asking, of) => listActivity(db, asking, { project: of.project }),
};

const nothing = (found: unknown) => found === undefined || (Array.isArray(found) && found.length === 0);

it.each(Object.entries(queries))('%s finds its own office’s things and nothing of another’s', async (_, query) => {
  const { own, other, ...database } = await twoOffices();
  expect(nothing(await query(database, own.office, own))).toBe(false);
  expect(nothing(await query(database, own.office, other))).toBe(true);
});

it('lists only the office’s own people, projects and activity', async () => {
  const { db, own } = await twoOffices();
  expect((await listPeople(db, own.office)).map((one) => one.name)).toEqual(['Northlight analyst']);
  expect((await listProjects(db, own.office)).map((one) => one.id)).toEqual([own.project]);
  expect(new Set((await listActivity(db, own.office)).map((one) => one.person))).toEqual(new Set(['Northlight analyst']));
});

it('keeps each office’s limits to itself, in their order', async () => {
  const { db, own, other } = await twoOffices();
  const limit = (ratio: number) => ({ appliesTo: 'beam', measure: 'deflection', ratio, source: 'a table' }) as const;
  await updateOfficeLimits(db, other.office, { person: other.person, limits: [limit(360)] });
  await updateOfficeLimits(db, own.office, { person: own.person, limits: [limit(200), { ...limit(300), measure: 'sway' }] });
  expect((await listOfficeLimits(db, own.office)).map(({ ratio }) => ratio)).toEqual([200, 300]);
  await updateOfficeLimits(db, own.office, { person: own.person, limits: [] });
  expect(await listOfficeLimits(db, own.office)).toEqual([]);
  expect(await listOfficeLimits(db, other.office)).toEqual([limit(360)]);
});

it('keeps each office’s combination sets to itself, every version as it was', async () => {
  const { db, own, other } = await twoOffices();
  const rules = [{ from: 'handbook', purpose: 'strength', suffix: '', rule: '1.35 dead' }] as const;
  const given = { basedOn: null, level: 'factored', together: false, rules, provenance: 'handbook' } as const;
  const set = (await insertCombinationSet(db, own.office, { ...given, name: 'Sheds', person: own.person }))!;
  expect(await insertCombinationSet(db, own.office, { ...given, name: 'SHEDS', person: own.person })).toBeUndefined();
  expect(await insertCombinationSet(db, other.office, { ...given, name: 'Sheds', person: other.person })).toBeDefined();
  const next = { ...given, provenance: 'handbook, 2nd', set, after: 1 };
  expect(await insertSetVersion(db, other.office, { ...next, person: other.person })).toBe(false);
  expect(await insertSetVersion(db, own.office, { ...next, person: own.person })).toBe(true);
  expect(await insertSetVersion(db, own.office, { ...next, person: own.person })).toBe(false);
  expect((await listSetVersions(db, own.office, set)).map(({ version, provenance }) => [version, provenance])).toEqual([[2, 'handbook, 2nd'], [1, 'handbook']]); // prettier-ignore
  expect(await listSetVersions(db, other.office, set)).toEqual([]);
  expect(await findSetVersion(db, other.office, set, 1)).toBeUndefined();
  const change = { kind: 'office combinations', set, version: 1, listed: 'keep' } as const;
  const words = { what: 'combinations', from: 'as listed', to: 'the office’s set Sheds' };
  const made = { from: own.revision, person: own.person, changes: [{ change, ...words }], reason: 'ours', run: false };
  await insertChangedRevision(db, own.office, made);
  expect((await listSetUses(db, own.office, set)).map(({ version, letter }) => [version, letter])).toEqual([[1, 'C']]);
  expect(await listSetUses(db, other.office, set)).toEqual([]);
  expect((await listCombinationSets(db, own.office)).map(({ version, used }) => [version, used])).toEqual([[2, 1]]);
  expect(await updateSetOffered(db, other.office, set, false)).toBe(false);
  expect(await updateSetOffered(db, own.office, set, false)).toBe(true);
  expect((await listCombinationSets(db, own.office))[0]?.withdrawnAt).not.toBeNull();
});

it('changes nothing of another office', async () => {
  const { db, raw, own, other } = await twoOffices();
  const size = () => raw.prepare('select (select count(*) from batch) + (select count(*) from revision)').pluck().get();
  const before = size();
  expect(await insertBatch(db, own.office, { project: other.project, name: 'Mine', person: own.person })).toBeUndefined();
  expect(await insertRevision(db, own.office, { batch: other.batch, person: own.person })).toBeUndefined();
  const made = { from: other.revision, person: own.person, changes: [], reason: 'none', run: false };
  expect(await insertChangedRevision(db, own.office, made)).toBeUndefined();
  expect(await updateRevisionState(db, own.office, other.revision, ['read'], 'running')).toBe(false);
  expect(await updateAssigned(db, own.office, other.project, [])).toBe(false);
  const upload = { revision: other.revision, name: 'x', size: 1, sha256: 'x', bytes: Buffer.from('x'), person: own.person };
  await deleteUploads(db, own.office, other.revision);
  expect(await listUploads(db, other.office, other.revision)).toHaveLength(1);
  await expect(insertUpload(db, own.office, upload)).rejects.toThrow(RangeError);
  expect(() => insertIntake(raw, own.office, other.revision, intakeOf([]))).toThrow(RangeError);
  expect(size()).toBe(before);
  expect((await listAssigned(db, other.office, other.project)).length).toBe(1);
});

it('does not share results between offices, though their frames are the same', async () => {
  const { raw } = await twoOffices();
  expect(raw.prepare('select count(*), count(distinct hash) from frame_version').raw().get()).toEqual([4, 2]);
});
