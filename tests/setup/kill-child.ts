/** The part of the server that works, as a process of its own that a test can kill: takes up what is unfinished, then ends. */
import { openDatabase } from '@/db/open';
import { findRevisionById } from '@/db/queries/revisions';
import { askForRun } from '@/worker/ask';
import { createPools } from '@/worker/pools';
import { WorkQueue } from '@/worker/queue';

const [file = '', bundles = '', ...revisions] = process.argv.slice(2);
const say = (word: string): void => void process.stdout.write(`${word}\n`);

const database = openDatabase(file);
const pools = createPools(bundles);
const log = (message: string, facts: Readonly<Record<string, unknown>>): void => {
  process.stderr.write(`${message} ${String(facts['error'])}\n`);
};
const queue = new WorkQueue({ database, file, pools, log, onChunk: () => say('chunk') });
queue.events.on('progress', (revision) => {
  if (queue.progress(revision).done > 0) say('solved');
});
await queue.start();
say('started');
await queue.idle();
for (const each of revisions) {
  const [office = 0, revision = 0, person = 0] = each.split(',').map(Number);
  const found = await findRevisionById(database.db, office, revision);
  if (found?.state === 'read') await askForRun(queue, database, { office, revision, person });
}
await queue.idle();
say('done');
await queue.close();
await pools.close();
await database.close();
