import { crc32 } from 'node:zlib';
import { type Entry, fromBufferPromise, type ZipFile } from 'yauzl';
import { limits } from '@/lib/intake/files/limits';
import { type Meter, unpackedTooLarge } from '@/lib/intake/files/meter';
import { Refusal, tooLarge, unreadable } from '@/lib/intake/files/refusal';

/** A file within a zip. Names keep their folders, with `/`. */
export interface ZipEntry {
  readonly name: string;
  readonly size: number;
  /** Unpacks it piece by piece, counted by the meter. Throws Refusal for damaged data. */
  chunks(meter: Meter): AsyncGenerator<Uint8Array>;
}

const damaged = 'The file is damaged or was cut short on its way. Save it again and send it again.';

/**
 * Opens a zip held in memory by its central directory (the order of its parts does not matter).
 * Sizes it declares are judged here, before anything is unpacked; what it then really unpacks to is held to them.
 */
export async function openZip(bytes: Uint8Array): Promise<readonly ZipEntry[]> {
  const buffer = Buffer.from(bytes.buffer, bytes.byteOffset, bytes.byteLength);
  let zip: ZipFile;
  const entries: ZipEntry[] = [];
  try {
    zip = await fromBufferPromise(buffer, { lazyEntries: true, decodeStrings: false, validateEntrySizes: true });
  } catch {
    throw unreadable(damaged);
  }
  if (zip.entryCount > limits.files) throw tooLarge(`The zip holds more than ${limits.files} files, the most that is read.`);
  let declared = 0;
  try {
    for await (const entry of zip.eachEntry()) {
      const name = nameOf(entry);
      declared += entry.uncompressedSize;
      if (declared > limits.unpackedBytes) throw unpackedTooLarge();
      if (!name.endsWith('/')) {
        entries.push({ name, size: entry.uncompressedSize, chunks: (meter) => unpack(zip, entry, meter) });
      }
    }
  } catch (error) {
    throw error instanceof Refusal ? error : unreadable(damaged);
  }
  return entries;
}

async function* unpack(zip: ZipFile, entry: Entry, meter: Meter): AsyncGenerator<Uint8Array> {
  if (entry.isEncrypted()) throw unreadable('The file is locked with a password. Save it without one and send it again.');
  if (!entry.canDecodeFileData()) throw unreadable('The zip is packed in a way that cannot be read. Pack it as a plain zip.');
  const stream = await openStream(zip, entry);
  let sum = 0;
  try {
    for await (const chunk of stream) {
      const piece = chunk as Uint8Array;
      meter.chunk(piece.byteLength);
      sum = crc32(piece, sum);
      yield piece;
    }
  } catch (error) {
    throw error instanceof Refusal ? error : unreadable(damaged);
  } finally {
    stream.destroy();
  }
  // a number changed on its way would be read without this
  if (sum !== entry.crc32) throw unreadable(damaged);
}

async function openStream(zip: ZipFile, entry: Entry): Promise<Awaited<ReturnType<ZipFile['openReadStreamPromise']>>> {
  try {
    return await zip.openReadStreamPromise(entry);
  } catch {
    throw unreadable(damaged);
  }
}

/** Names are UTF-8 where the zip says so or they read so, else Windows-1252 (all that matters is telling them apart). */
function nameOf(entry: Entry): string {
  const raw = entry.fileNameRaw;
  const utf8 = new TextDecoder('utf-8').decode(raw);
  const name = utf8.includes('\ufffd') ? new TextDecoder('windows-1252').decode(raw) : utf8;
  return name.replaceAll('\\', '/');
}
