/**
 * ping.busy.idle, ping.busy2.idle, rss.20000.MB: the served application while it reads, runs and writes 20,000 frames.
 * Each busy stretch is set against the idle one measured just before it, in the same process.
 */
import { loadavg } from 'node:os';
import type { OfficeKey } from '@/tests/setup/people';
import { revisionAddress } from '@/tests/setup/bring';
import { signedIn } from '@/tests/setup/visitor';
import { p95, pings, told } from './pings';
import { MemoryWatch, serveApp, type ServedApp } from './served-app';
import { shedWorkbook } from './twenty-thousand';

const idle_s = 10;
/** Two offices' runs go on beside one another for this long, then they are stopped. */
const together_s = 40;

interface Progress {
  readonly run: {
    readonly revisionState: string;
    readonly done: number;
    readonly total: number;
    readonly message: string | null;
  };
}

const seconds = (s: number): Promise<void> => new Promise((resolve) => setTimeout(resolve, 1000 * s));

/** What an analyst of an office does with the workbook; a batch of its own at every reading. */
async function desk(app: ServedApp, office: OfficeKey, bytes: Uint8Array) {
  const visitor = await signedIn(app.url, office, 'analyst');
  let address = '';
  /** Asks for the progress once a second, as the page of a run does, until the revision is in another state. */
  const past = async (state: string): Promise<Progress['run']> => {
    for (;;) {
      const { run } = await visitor.json<Progress>(`${address}/progress`);
      if (run.revisionState === 'failed') throw new Error(`The revision failed: ${run.message}`);
      if (run.revisionState !== state) return run;
      await seconds(1);
    }
  };
  const take = async (what: string): Promise<void> => {
    const answer = await visitor.fetch(`${address}/${what}`);
    if (!answer.ok || !answer.body) throw new Error(`Expected a file, got ${answer.status}: ${await answer.text()}`);
    let size = 0;
    for await (const piece of answer.body as unknown as AsyncIterable<Uint8Array>) size += piece.byteLength;
    console.log(`    ${what}: ${(size / 1e6).toFixed(0)} MB`);
  };
  return {
    past,
    read: async () => {
      const form = new FormData();
      form.append('files', new Blob([new Uint8Array(bytes)]), 'sheds.xlsx');
      const to = `/api/projects/${app.people[office].project}/batches`;
      const answer = await visitor.json<{ batch: { id: number }; revision: string }>(to, { method: 'POST', body: form });
      address = revisionAddress({ batch: answer.batch.id, revision: answer.revision });
      return past('reading');
    },
    start: () => visitor.json(`${address}/run`, { method: 'POST' }),
    stop: () => visitor.fetch(`${address}/run`, { method: 'DELETE' }),
    download: () => take('workbook'),
    export: () => take('tables/members/export?format=csv'),
  };
}

/** One stretch of work with small requests going on beside it. */
async function stretch(app: ServedApp, watch: MemoryWatch, name: string, work: () => Promise<unknown>) {
  watch.most();
  const began = performance.now();
  const going = work();
  const took = await pings(app.url, going);
  await going;
  const most = watch.most();
  const s = (performance.now() - began) / 1000;
  console.log(`  ${name}: ${s.toFixed(0)} s, ${told(took)}, memory ${most.toFixed(0)} MB, load ${loadavg()[0]?.toFixed(1)}`);
  return { p95: p95(took), most };
}

/** @param frames 20,000, the most a batch may hold; fewer only to try this out */
export async function serverUnderLoad(frames: number): Promise<Record<string, number>> {
  const began = performance.now();
  console.log(`  serves .next as it is built; some six minutes for ${frames} frames on two idle cores`);
  const bytes = await shedWorkbook(frames);
  const app = await serveApp();
  const watch = new MemoryWatch(app.pid);
  try {
    const north = await desk(app, 'north', bytes);
    const south = await desk(app, 'south', bytes);
    await seconds(2);
    await stretch(app, watch, 'warm-up', () => seconds(3));
    const rest = await stretch(app, watch, 'idle', () => seconds(idle_s));
    await stretch(app, watch, 'reading the workbook', () => north.read());
    const busy = await stretch(app, watch, 'one run', async () => {
      await north.start();
      const { revisionState: state, done, total } = await north.past('running');
      if (state !== 'run' || total !== frames)
        throw new Error(`Expected ${frames} frames run, got ${done} of ${total}, ${state}`);
    });
    const taken = await stretch(app, watch, 'downloading its result workbook', () => north.download());
    const rows = await stretch(app, watch, 'exporting its members as CSV', () => north.export());
    await stretch(app, watch, 'reading for two offices', () => Promise.all([north.read(), south.read()]));
    await seconds(2);
    const rest2 = await stretch(app, watch, 'idle', () => seconds(idle_s));
    const busy2 = await stretch(app, watch, 'two offices’ runs', async () => {
      await Promise.all([north.start(), south.start()]);
      await Promise.race([seconds(together_s), north.past('running'), south.past('running')]);
    });
    await Promise.all([north.stop(), south.stop()]);
    console.log(`  measured in ${((performance.now() - began) / 60_000).toFixed(1)} minutes`);
    return {
      'ping.busy.idle': busy.p95 / rest.p95,
      'ping.busy2.idle': busy2.p95 / rest2.p95,
      'rss.20000.MB': Math.max(busy.most, taken.most, rows.most),
    };
  } finally {
    watch.close();
    await app.close();
  }
}
