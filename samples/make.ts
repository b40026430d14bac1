/** Which samples there are. Invented projects of an invented office. */
import { readFileSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';
import { bracedBents } from './braced-bents';
import { brackets } from './brackets';
import { canopiesUs } from './canopies-us';
import { codeHalls, codeSheds } from './design-codes';
import { directAnalysis } from './direct-analysis';
import { familySamples } from './families';
import { messy, mended, messyOnes } from './messy';
import { portalSheds, slenderSheds } from './portal-sheds';
import { racks } from './racks';
import { walkways } from './walkways';
import { writeSemicolonCsv, writeWorkbook } from './write';

/** @param folder where the files go: the folder of this script */
export async function makeSamples(folder: string): Promise<void> {
  await writeWorkbook(folder, 'portal-sheds-240.xlsx', portalSheds(12));
  await writeWorkbook(folder, 'portal-sheds-1000.xlsx', portalSheds(50));
  await writeWorkbook(folder, 'brackets-150.xlsx', brackets());
  await writeWorkbook(folder, 'pipe-rack-24.xlsx', racks(24));
  await writeWorkbook(folder, 'pipe-rack-12.xlsx', racks(12));
  await writeWorkbook(folder, 'canopies-us-36.xlsx', canopiesUs());
  await writeWorkbook(folder, 'slender-sheds-24.xlsx', slenderSheds());
  await writeWorkbook(folder, 'braced-bents-12.xlsx', bracedBents());
  await writeWorkbook(folder, 'direct-analysis-us-9.xlsx', directAnalysis());
  await writeWorkbook(folder, 'code-sheds-24.xlsx', codeSheds());
  await writeWorkbook(folder, 'code-halls-us-9.xlsx', codeHalls());
  writeSemicolonCsv(join(folder, 'walkways-csv'), walkways());
  await writeWorkbook(folder, 'messy.xlsx', messy());
  await writeWorkbook(folder, 'messy-mended.xlsx', mended());
  for (const [name, sheets] of messyOnes()) await writeWorkbook(join(folder, 'problems'), `${name}.xlsx`, sheets);
  for (const [name, sheets] of familySamples()) await writeWorkbook(join(folder, 'families'), `${name}.xlsx`, sheets);
  const whole = readFileSync(join(folder, 'messy-mended.xlsx'));
  writeFileSync(join(folder, 'problems', 'unreadable.xlsx'), whole.subarray(0, Math.floor(whole.length / 2)));
}
