import type { FileHead } from '../../models/log/proposal/read-head.ts';
import type { IncomingFile } from './incoming-file.ts';
import { logFileOf } from './log-file-of.ts';

/** Enough for some days of a slow log, in which alone the order of a date can be proved. */
const HEAD_BYTES = 1 << 20;

/** The beginning of a file as text bytes; of a workbook, that of its first sheet. */
export async function headOf(file: IncomingFile): Promise<FileHead> {
  const { name, chunks } = await logFileOf(file);
  const parts: Uint8Array[] = [];
  let bytes = 0;
  for (const chunk of chunks) {
    parts.push(chunk);
    bytes += chunk.length;
    if (bytes > HEAD_BYTES) break;
  }
  const all = Buffer.concat(parts);
  return { name, head: all.subarray(0, HEAD_BYTES), isWhole: all.length <= HEAD_BYTES };
}
