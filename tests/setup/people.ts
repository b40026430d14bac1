/** Two offices, each with a project and a person of every role; all with the same password. */
import { join } from 'node:path';
import { migrate } from '@/db/migrate';
import { openDatabase } from '@/db/open';
import { insertOffice } from '@/db/queries/offices';
import { insertPerson } from '@/db/queries/people';
import { insertProject, updateAssigned } from '@/db/queries/projects';
import { hashPassword } from '@/lib/access/password';
import { personRoles, type PersonRole } from '@/lib/access/may';

export const testPassword = 'for tests and nothing else';
export const officeKeys = ['north', 'south'] as const;
export type OfficeKey = (typeof officeKeys)[number];

export interface TestOffice {
  readonly office: number;
  readonly project: number;
  readonly people: Readonly<Record<PersonRole, number>>;
}
export type TestPeople = Readonly<Record<OfficeKey, TestOffice>>;

export const emailOf = (office: OfficeKey, role: PersonRole): string => `${role}@${office}.example`;

export async function fillOffices(dataDir: string): Promise<TestPeople> {
  const { db, close } = openDatabase(join(dataDir, 'tallyframe.sqlite'));
  try {
    await migrate(db);
    const passwordHash = await hashPassword(testPassword);
    const filled: Partial<Record<OfficeKey, TestOffice>> = {};
    for (const key of officeKeys) {
      const office = await insertOffice(db, `${key} office`);
      const people: Partial<Record<PersonRole, number>> = {};
      for (const role of personRoles) {
        people[role] = await insertPerson(db, office, {
          email: emailOf(key, role),
          name: `${role} of ${key}`,
          role,
          passwordHash,
        });
      }
      const { lead = 0, analyst = 0, checker = 0, client = 0 } = people;
      const project = (await insertProject(db, office, { name: `Sheds ${key}`, number: '2614', person: lead }))!;
      await updateAssigned(db, office, project, [client]);
      filled[key] = { office, project, people: { lead, analyst, checker, client } };
    }
    return { north: filled.north!, south: filled.south! };
  } finally {
    await close();
  }
}
