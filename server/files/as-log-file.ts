import { DomainError } from '../../models/errors.ts';
import type { LogFile } from '../../models/log/log-file.ts';
import { delimitedFromXlsx, isOldWorkbook, isZip, MOST_WORKBOOK_BYTES } from './read-xlsx.ts';

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
  return { name, chunks: [await delimitedFromXlsx(allBytes(name, chunks), name)] };
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
