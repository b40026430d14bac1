import type { Metadata } from 'next';
import { pageRevision, type RevisionParams } from '@/app/_server/page-revision';
import { settingsOffered, settingsShown } from '@/app/_server/settings-shown';
import { SettingTable } from '@/components/changes/setting-table';
import { Notice } from '@/components/ui/notice';
import { Sheet, Zone } from '@/components/ui/sheet';
import { db } from '@/db/client';
import { listCombinationSets } from '@/db/queries/combination-sets';
import { letterOf, listRevisions } from '@/db/queries/revisions';
import { may } from '@/lib/access/may';
import { api } from '@/lib/api/addresses';
import { RevisionHead } from '../_head/revision-head';
import { ChooseOfficeSet } from './choose-office-set';
import { ChooseSettings } from './choose-settings';

export const metadata: Metadata = { title: 'Settings' };

const stillReading = 'The sheets are still being read. Open this page again in a moment.';
const nothingRead = 'No frame of this revision could be read, so it has no settings. Mend its sheets and bring them in again.';

/** How a revision is analysed and checked, where each setting comes from, and the next revision with others. */
export default async function SettingsPage({ params }: { readonly params: Promise<RevisionParams> }) {
  const { person, revision } = await pageRevision(params, 'settings');
  const { office, batch, letter, settings, origins, frames, framesStopped } = revision;
  const revisions = await listRevisions(db(), office, batch);
  const latest = revisions.at(-1)?.letter ?? letter;
  const next = letterOf(revisions.length);
  const mayChange = may(person, 'change a revision');
  if (settings === null || origins === null || frames === 0) {
    return (
      <Sheet>
        <RevisionHead revision={revision} sheet="settings" />
        <Zone title="Settings" level={1}>
          <p>{revision.state === 'reading' ? stillReading : nothingRead}</p>
        </Zone>
      </Sheet>
    );
  }
  const sets = mayChange ? (await listCombinationSets(db(), office)).filter(({ withdrawnAt }) => withdrawnAt === null) : [];
  const shown = (
    <Zone
      title={`Settings of revision ${letter}`}
      level={1}
      aside={
        <a className="link" href={api.part(batch, letter, 'input')} download>
          Input workbook
        </a>
      }
    >
      <SettingTable settings={settingsShown(settings, origins)} />
      <p className="setting-note">
        The input workbook holds the sheets with every change made on screen. Brought in anew it gives the same frames.
      </p>
    </Zone>
  );
  const choose = (
    <Zone title={`Choose others for revision ${next}`} note={`${letter} stays as it is`}>
      {latest !== letter && (
        <Notice>
          The latest revision is {latest}. What is chosen here starts from {letter}: what was changed or brought in after it is
          not in {next}.
        </Notice>
      )}
      <ChooseSettings
        // a form of its own for each revision: what was typed for one is nothing to another
        key={`${batch} ${letter}`}
        batch={batch}
        letter={letter}
        next={next}
        frames={frames - framesStopped}
        offered={settingsOffered(settings)}
      />
    </Zone>
  );
  return (
    <Sheet>
      <RevisionHead revision={revision} sheet="settings" />
      {mayChange ? (
        <div className="grid min-[1100px]:grid-cols-[minmax(0,480fr)_minmax(0,920fr)]">
          <div className="min-w-0">{shown}</div>
          <div className="border-hair min-w-0 max-[1099px]:border-t min-[1100px]:border-l">
            {choose}
            {sets.length > 0 && (
              <Zone title={`Or combine ${next} by a set of the office`}>
                <ChooseOfficeSet
                  key={`${batch} ${letter}`}
                  batch={batch}
                  letter={letter}
                  next={next}
                  sets={sets.map(({ set, version, name }) => ({ set, version, name }))}
                />
              </Zone>
            )}
          </div>
        </div>
      ) : (
        shown
      )}
    </Sheet>
  );
}
