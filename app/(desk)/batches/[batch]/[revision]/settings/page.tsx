import type { Metadata } from 'next';
import { pageRevision, type RevisionParams } from '@/app/_server/page-revision';
import { settingsOffered, settingsShown } from '@/app/_server/settings-shown';
import { SettingTable } from '@/components/changes/setting-table';
import { ButtonLink } from '@/components/ui/button';
import { Sheet, Zone } from '@/components/ui/sheet';
import { db } from '@/db/client';
import { letterOf, listRevisions } from '@/db/queries/revisions';
import { may } from '@/lib/access/may';
import { api } from '@/lib/api/addresses';
import { RevisionHead } from '../_head/revision-head';
import { ChooseSettings } from './choose-settings';

export const metadata: Metadata = { title: 'Settings' };

/** How a revision is analysed and checked, where each setting comes from, and the next revision with others. */
export default async function SettingsPage({ params }: { readonly params: Promise<RevisionParams> }) {
  const { person, revision } = await pageRevision(params, 'settings');
  const { office, batch, letter, settings, origins, frames, framesStopped } = revision;
  const canRun = frames - framesStopped;
  const next = letterOf((await listRevisions(db(), office, batch)).length);
  const read = settings !== null && origins !== null && frames > 0;
  return (
    <Sheet>
      <RevisionHead revision={revision} sheet="settings" />
      {!read ? (
        <Zone title="Settings" level={1}>
          <p>
            {revision.state === 'reading'
              ? 'The sheets are still being read. Open this page again in a moment.'
              : 'No frame of this revision could be read, so it has no settings. Mend its sheets and bring them in again.'}
          </p>
        </Zone>
      ) : (
        <>
          <Zone
            title={`Settings of revision ${letter}`}
            note="how its frames are analysed and checked"
            level={1}
            aside={
              <ButtonLink href={api.part(batch, letter, 'input')} download>
                Download the input workbook
              </ButtonLink>
            }
          >
            <SettingTable settings={settingsShown(settings, origins)} />
          </Zone>
          {may(person, 'change a revision') && (
            <Zone title={`Choose others for revision ${next}`} note={`${letter} stays as it is, with its results`}>
              <ChooseSettings
                // a form of its own for each revision: what was typed for one is nothing to another
                key={`${batch} ${letter}`}
                batch={batch}
                letter={letter}
                next={next}
                frames={canRun}
                offered={settingsOffered(settings)}
              />
            </Zone>
          )}
        </>
      )}
    </Sheet>
  );
}
