import type { LogFile } from '../../models/log/log-file.ts';
import type { IncomingFile } from './incoming-file.ts';

/** A file as the log reader takes it, be it a text or a workbook. */
export async function logFileOf({ name, bytes, chunks }: IncomingFile): Promise<LogFile> {
  if (!mayBeWorkbook(chunks())) return { name, bytes, chunks: chunks() };
  // Loaded for what may be a workbook alone: the reader of workbooks takes longer to load than a text to read.
  const { asLogFile } = await import('../files/as-log-file.ts');
  return asLogFile(name, { [Symbol.iterator]: () => chunks()[Symbol.iterator]() }, bytes);
}

/** Workbooks begin with `P` (.xlsx, a zip archive) or the byte 0xd0 (.xls, a compound file). */
function mayBeWorkbook(chunks: Iterable<Uint8Array>): boolean {
  for (const chunk of chunks) if (chunk.length > 0) return chunk[0] === 0x50 || chunk[0] === 0xd0;
  return false;
}
