import type { LogFile } from '../../models/log/log-file.ts';
import type { IncomingFile } from './incoming-file.ts';

/** A file as the log reader takes it. */
export async function logFileOf({ name, chunks }: IncomingFile): Promise<LogFile> {
  return { name, chunks: chunks() };
}
