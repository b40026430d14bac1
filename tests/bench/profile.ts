/** Where the time of the whole chain goes: CPU seconds by stage for 1,000 portals, warm. */
import { mkdtempSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { portalWorkbook } from './portals';
import { storedChain, type StageSeconds } from './stored-chain';

export async function profileChain(): Promise<void> {
  const bytes = await portalWorkbook(1000);
  const folder = mkdtempSync(join(tmpdir(), 'tallyframe-profile-'));
  try {
    await storedChain(bytes, folder, false);
    const stages: StageSeconds = {};
    await storedChain(bytes, folder, false, stages);
    const total = Object.values(stages).reduce((sum, each) => sum + each, 0);
    for (const [stage, seconds] of Object.entries(stages)) {
      console.log(`  ${stage.padEnd(32)} ${seconds.toFixed(2)} s  ${((100 * seconds) / total).toFixed(0)} %`);
    }
  } finally {
    rmSync(folder, { recursive: true, force: true });
  }
}
