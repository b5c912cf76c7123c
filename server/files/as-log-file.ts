import { DomainError } from '../../models/errors.ts';
import type { LogFile } from '../../models/log/log-file.ts';

/** Largest workbook taken, packed: a day of 24 channels at 1 Hz is some 15 MB. */
const MOST_WORKBOOK_BYTES = 64 * 2 ** 20;

/**
 * A file as the log reader takes it: a text as it is, a workbook (.xlsx) as comma-delimited UTF-8 with decimal point.
 *
 * @param chunks  The file's bytes; gone through once more for a workbook.
 * @param bytes   How many there are, where that is known.
 */
export async function asLogFile(name: string, chunks: Iterable<Uint8Array>, bytes?: number): Promise<LogFile> {
  const head = firstBytes(chunks);
  if (isOldWorkbook(head)) {
    throw new DomainError('log-not-text', `${name} is a workbook of the old kind (.xls); save it as .xlsx or CSV`, {
      file: name,
    });
  }
  if (!isZip(head)) return bytes === undefined ? { name, chunks } : { name, chunks, bytes };
  // Loaded for a workbook alone: the library that reads them takes longer to load than a text to read.
  const { delimitedFromXlsx } = await import('./read-xlsx.ts');
  return { name, chunks: [await delimitedFromXlsx(allBytes(name, chunks), name)] };
}

/** What an .xlsx workbook begins with, as every zip archive does. */
function isZip(head: Uint8Array): boolean {
  return head[0] === 0x50 && head[1] === 0x4b && head[2] === 0x03 && head[3] === 0x04;
}

/** The compound files that .xls workbooks are. */
function isOldWorkbook(head: Uint8Array): boolean {
  return head[0] === 0xd0 && head[1] === 0xcf && head[2] === 0x11 && head[3] === 0xe0;
}

function firstBytes(chunks: Iterable<Uint8Array>): Uint8Array {
  for (const chunk of chunks) if (chunk.length > 0) return chunk.slice(0, 8);
  return new Uint8Array(0);
}

function allBytes(name: string, chunks: Iterable<Uint8Array>): Uint8Array {
  const parts: Uint8Array[] = [];
  let length = 0;
  for (const chunk of chunks) {
    length += chunk.length;
    if (length > MOST_WORKBOOK_BYTES) {
      throw new DomainError('too-large', `${name} is larger than a workbook may be (${MOST_WORKBOOK_BYTES} bytes)`, {
        file: name,
        mostBytes: MOST_WORKBOOK_BYTES,
      });
    }
    parts.push(Uint8Array.from(chunk)); // whoever gives the pieces may use their memory again
  }
  return Buffer.concat(parts, length);
}
