import type { Metadata } from 'next';
import { day, dayTime } from '@/app/_server/dates';
import { requirePagePerson } from '@/app/_server/page-person';
import { Columns, Sheet, Zone } from '@/components/ui/sheet';
import { db } from '@/db/client';
import { listDeclined } from '@/db/queries/mail-choices';
import { listTokens } from '@/db/queries/tokens';
import { choosable, mailKinds } from '@/lib/mail/kinds';
import { ChooseLetters } from './choose-letters';
import { MakeToken } from './make-token';
import { OwnPassword } from './own-password';
import { TokenList } from './token-list';

export const metadata: Metadata = { title: 'Your page' };

/** What one settles for oneself: letters, password, tokens. */
export default async function OwnPage() {
  const person = await requirePagePerson('be oneself', '/me');
  const declined = await listDeclined(db(), person.office, person.id);
  const tokens = await listTokens(db(), person.office, person.id);
  const kinds = choosable(person.role).map((kind) => ({ kind, when: mailKinds[kind].when, wanted: !declined.includes(kind) }));
  const main = (
    <>
      <Zone title={person.name} level={1} note={`${person.email}, ${person.role} of ${person.officeName}`}>
        <h2 className="mb-2">Letters by e-mail</h2>
        <ChooseLetters kinds={kinds} />
      </Zone>
      <Zone title="Tokens for scripts" note="sent as a header, they do what you may do, no more">
        {tokens.length > 0 && (
          <TokenList
            tokens={tokens.map(({ id, name, scope, createdAt, expiresAt, usedAt }) => ({
              id,
              name,
              scope,
              made: day(createdAt),
              until: day(expiresAt),
              used: usedAt === null ? 'not yet' : dayTime(usedAt),
            }))}
          />
        )}
        <MakeToken />
      </Zone>
    </>
  );
  return (
    <Sheet>
      <Columns
        main={main}
        side={
          <Zone title="Password" note="changing it ends your other sessions">
            <OwnPassword email={person.email} />
          </Zone>
        }
      />
    </Sheet>
  );
}
