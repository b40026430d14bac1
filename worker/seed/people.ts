/** The invented office that `npm run demo` fills: people, their roles, and how each signs in. */
import type { OfficeRole } from '@/db/schema';

export interface SeedPerson {
  readonly key: 'lead' | 'analyst' | 'secondAnalyst' | 'checker' | 'client' | 'secondClient';
  readonly name: string;
  readonly email: string;
  readonly role: OfficeRole;
  readonly password: string;
}

export const seedOffice = 'Marrow & Quill Structures';

export const seedPeople: readonly SeedPerson[] = [
  { key: 'lead', name: 'Orla Fenwhistle', email: 'lead@marrowquill.example', role: 'lead', password: 'purlin-cloud-41' },
  { key: 'analyst', name: 'Ivo Tarrabrook', email: 'analyst@marrowquill.example', role: 'analyst', password: 'girder-plum-72' },
  { key: 'secondAnalyst', name: 'Sunniva Oakhaddon', email: 'second.analyst@marrowquill.example', role: 'analyst', password: 'rafter-moss-15' },
  { key: 'checker', name: 'Bram Kettlesedge', email: 'checker@marrowquill.example', role: 'checker', password: 'gusset-fern-38' },
  { key: 'client', name: 'Pia Lindmarrish', email: 'client@harrowfold.example', role: 'client', password: 'haunch-tide-26' },
  { key: 'secondClient', name: 'Tobin Askelwright', email: 'client@saltmere.example', role: 'client', password: 'cleat-amber-63' },
]; // prettier-ignore
