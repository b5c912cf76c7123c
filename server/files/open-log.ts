import { createHash } from 'node:crypto';
import { basename } from 'node:path';
import type { LogFile } from '../../models/log/log-file.ts';
import { asLogFile } from './as-log-file.ts';
import { fileBytes, fileChunks } from './file-chunks.ts';

const CHUNK_BYTES = 1 << 18;

/** A file on the disk as the log reader takes it, and the hash of what was read. */
export interface OpenedLog extends LogFile {
  /** SHA-256 in hex of the bytes as they came. To be asked once the log was read to its end. */
  sha256(): string;
}

/** Opens a recorder's file, text or workbook, which refusals then call `name`; throws `file-unreadable`. */
export async function openLog(path: string, name = basename(path)): Promise<OpenedLog> {
  let hash: string | null = null;
  const hashed: Iterable<Uint8Array> = {
    *[Symbol.iterator]() {
      const sum = createHash('sha256');
      for (const chunk of fileChunks(path, new Uint8Array(CHUNK_BYTES))) {
        sum.update(chunk);
        yield chunk;
      }
      hash = sum.digest('hex');
    },
  };
  const file = await asLogFile(name, hashed, fileBytes(path));
  return {
    ...file,
    sha256() {
      if (hash === null) throw new Error(`${path} was not read to its end`);
      return hash;
    },
  };
}
