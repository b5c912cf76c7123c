import type { LogFile } from '../../models/log/log-file.ts';
import { asLogFile } from '../files/as-log-file.ts';
import type { IncomingFile } from './incoming-file.ts';

/** A file as the log reader takes it, be it a text or a workbook. */
export function logFileOf({ name, bytes, chunks }: IncomingFile): Promise<LogFile> {
  return asLogFile(name, { [Symbol.iterator]: () => chunks()[Symbol.iterator]() }, bytes);
}
