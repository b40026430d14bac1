import { describe, expect, it } from 'vitest';
import { readFiles } from '@/lib/intake/files/read-files';
import { readOwnFiles } from '@/lib/intake/own/read-own-records';
import { ownTemplate } from '@/lib/reports/template/own-template';

describe('a template of the office’s own', () => {
  it.each(['section', 'material'] as const)('reads without an error in either unit system and form: %s', async (kind) => {
    for (const units of ['metric', 'us'] as const)
      for (const format of ['csv', 'xlsx'] as const) {
        const { sheets } = await readFiles([{ name: `own.${format}`, bytes: ownTemplate(kind, units, format) }]);
        const read = readOwnFiles(kind, sheets, units);
        expect(read?.problems.filter(({ severity }) => severity !== 'note')).toEqual([]);
        expect(read?.records.length).toBeGreaterThan(0);
      }
  });
});
