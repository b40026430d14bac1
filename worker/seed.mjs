/** Fills the database of DATA_DIR with an invented office, once, and says how its people sign in. */
import { join } from 'node:path';
import { fileURLToPath } from 'node:url';
import { buildWorker } from './build.mjs';
import { serverEnvironment } from './server-environment.mjs';

const root = fileURLToPath(new URL('..', import.meta.url));
await buildWorker();
const { seed, seedOffice, seedPeople } = await import('../dist-worker/seed.mjs');
const { DATA_DIR, NEXTAUTH_URL } = serverEnvironment();
const seeded = await seed({
  file: join(DATA_DIR, 'tallyframe.sqlite'),
  samples: join(root, 'samples'),
  bundles: join(root, 'dist-worker'),
  say: (line) => console.log(`  ${line}`),
});
console.log(seeded ? `\nFilled the office ${seedOffice}.` : `\nThe data of ${DATA_DIR} is kept as it is.`);
console.log(`\nSign in at ${NEXTAUTH_URL}\n`);
for (const { role, name, email, password } of seedPeople)
  console.log(`  ${role.padEnd(8)} ${name.padEnd(20)} ${email.padEnd(36)} ${password}`);
console.log('');
