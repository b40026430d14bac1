import type { Db } from '@/db/open';
import type { MailKind } from '@/lib/mail/message';

/** Kinds of letters that a person has declined. */
export async function listDeclined(db: Db, office: number, person: number): Promise<MailKind[]> {
  const rows = await db
    .selectFrom('mail_choice')
    .select('kind')
    .where('office', '=', office)
    .where('person', '=', person)
    .where('wanted', '=', 0)
    .execute();
  return rows.map((row) => row.kind as MailKind);
}

/** What a person wants of each of these kinds, in place of what they said before. */
export async function updateMailChoices(
  db: Db,
  office: number,
  person: number,
  choices: Readonly<Partial<Record<MailKind, boolean>>>,
): Promise<void> {
  const rows = Object.entries(choices).map(([kind, wanted]) => ({ office, person, kind, wanted: wanted ? 1 : 0 }));
  if (rows.length === 0) return;
  await db
    .insertInto('mail_choice')
    .values(rows)
    .onConflict((conflict) =>
      conflict.columns(['office', 'person', 'kind']).doUpdateSet((eb) => ({ wanted: eb.ref('excluded.wanted') })),
    )
    .execute();
}
