import { SheetIndex } from '@/components/sheet-index/sheet-index';
import { TitleBlock } from '@/components/title-block/title-block';
import { day } from '@/app/_server/dates';
import { pagePerson } from '@/app/_server/page-person';
import { db } from '@/db/client';
import { listRows } from '@/db/queries/lists';
import type { RevisionRecord } from '@/db/queries/revisions';
import { may } from '@/lib/access/may';
import { pages } from '@/lib/api/addresses';
import { whyNotMove } from '@/lib/checking/checking-states';
import type { TableName } from '@/lib/tables/view';
import { CheckingLine } from './checking-line';
import { IssueLine } from './issue-line';
import { MadeFrom } from './made-from';
import { letterBefore } from './letter-before';
import { stateWords } from './state-words';
import { ResultTools } from './result-tools';

export type SheetName = 'read' | 'settings' | 'change' | 'run' | 'glance' | 'compare' | 'checking' | 'issue' | 'size' | TableName;

interface RevisionHeadProps {
  readonly revision: RevisionRecord;
  readonly sheet: SheetName;
}

/** The numbered sheets. */
const sheets = [
  'glance', 'frames', 'members', 'checks', 'reactions', 'movements', 'problems', 'compare', 'checking',
] as const; // prettier-ignore

/** Title block and sheet index over every page of a revision. */
export async function RevisionHead({ revision, sheet }: RevisionHeadProps) {
  const person = await pagePerson();
  const { batch, letter, frames, errors, warnings, notes } = revision;
  const number = sheets.findIndex((name) => name === sheet) + 1;
  const hasResults = revision.runStartedAt !== null;
  const counts = hasResults ? await rowCounts(revision) : {};
  const known: Partial<Record<SheetName, number>> = { frames, problems: errors + warnings + notes, ...counts };
  return (
    <>
      <TitleBlock {...titleOf(revision)} sheet={number > 0 ? `${number} of ${sheets.length}` : sheet} />
      {sheet !== 'issue' && <IssueLine revision={revision} />}
      <CheckingLine revision={revision} />
      <MadeFrom revision={revision} />
      {(hasResults || number > 0 || sheet === 'settings' || sheet === 'change' || sheet === 'issue' || sheet === 'size') && (
        <SheetIndex
          sheets={sheets.map((name) => ({
            label: labelOf(revision, name),
            href: sheetHref(revision, name),
            count: known[name] ?? null,
            current: name === sheet,
          }))}
          tools={
            <ResultTools
              batch={batch}
              letter={letter}
              ready={hasResults && revision.state !== 'running'}
              checking={person !== null && may(person, 'send to check') && whyNotMove(revision.state, 'send') === null}
            />
          }
        />
      )}
    </>
  );
}

/** The revision that it was made from, or the one before it; null = it is the first. */
const otherOf = ({ letter, madeFrom }: RevisionRecord): string | null => madeFrom ?? letterBefore(letter);

/** "Frames", "Compare with A" */
function labelOf(revision: RevisionRecord, name: (typeof sheets)[number]): string {
  const other = otherOf(revision);
  if (name === 'checking') return 'Marks';
  return name === 'compare' && other !== null ? `Compare with ${other}` : name[0]!.toUpperCase() + name.slice(1);
}

/** Null: not there yet, or nothing to compare with. */
function sheetHref(revision: RevisionRecord, name: (typeof sheets)[number]): string | null {
  const { batch, letter, runStartedAt } = revision;
  if (runStartedAt === null && name !== 'problems') return null;
  if (name === 'checking') return pages.checking(batch, letter);
  if (name !== 'compare') return pages.sheet(batch, letter, name);
  const other = otherOf(revision);
  return other === null ? null : pages.compare(batch, letter, { with: other });
}

/** Rows of the tables of results; the database keeps them tallied. */
async function rowCounts({ office, id }: RevisionRecord): Promise<Partial<Record<SheetName, number>>> {
  const names = ['members', 'checks', 'reactions', 'movements'] as const;
  const counted = names.map(async (table) => {
    const page = await listRows(db(), office, id, { table, filters: [], sort: null, columns: null }, { limit: 1 });
    return [table, page?.total ?? 0] as const;
  });
  return Object.fromEntries(await Promise.all(counted));
}

/** What the title block says of a revision. */
export function titleOf(revision: RevisionRecord) {
  const { project, projectName, projectNumber, batch, batchName, letter } = revision;
  const name = projectNumber === null || projectNumber === '' ? projectName : `${projectNumber} ${projectName}`;
  return {
    project: { name, href: pages.project(project) },
    batch: { name: batchName, href: pages.revision(batch, letter) },
    revision: { letter, date: day(revision.createdAt) },
    state: stateWords(revision),
    prepared: `${revision.createdBy.name}, ${day(revision.createdAt)}`,
    checked: revision.checked && `${revision.checked.name}, ${day(revision.checked.at)}`,
    issued: revision.issued && `${revision.issued.number}, ${day(revision.issued.at)}`,
    inputHash: revision.input?.sha256 ?? null,
    scope: onlyStress(revision.settings) ? 'stress and movement only' : null,
  };
}

/** Elastic stress without the screening of stability; a design code checks buckling by its own clauses. */
const onlyStress = (settings: RevisionRecord['settings']): boolean =>
  settings?.stability === 'by others' && settings.strengthCheck === 'elastic stress';
