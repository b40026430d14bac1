import { createHash } from 'node:crypto';
import { baseName, byName } from '@/lib/intake/files/names';
import type { InputFile, InputIdentity } from '@/lib/intake/intake';

const sha256 = (data: Uint8Array | string): string => createHash('sha256').update(data).digest('hex');

/**
 * What an input is known by: the SHA-256 of its file; of several, that of the lines `sha256 name` sorted by name,
 * parted by line feeds (sheets §7). The same files in another order are the same input.
 */
export function identityOf(files: readonly InputFile[]): InputIdentity {
  const each = files
    .map(({ name, bytes }) => ({ name: baseName(name), sha256: sha256(bytes), size: bytes.byteLength }))
    .sort((a, b) => byName(a.name, b.name));
  const [first] = each;
  if (!first) throw new RangeError('Expected at least one file, got none');
  const whole = each.length === 1 ? first.sha256 : sha256(each.map((f) => `${f.sha256} ${f.name}`).join('\n'));
  return { name: first.name, sha256: whole, files: each };
}
