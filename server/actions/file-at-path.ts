import { createHash } from 'node:crypto';
import { fileChunks } from '../files/file-chunks.ts';
import type { IncomingFile } from './incoming-file.ts';

/** A file on the disk, hashed once; its bytes are read anew each time they are gone through. */
export function fileAtPath(path: string, name = path): IncomingFile {
  const hash = createHash('sha256');
  let bytes = 0;
  for (const chunk of fileChunks(path)) {
    hash.update(chunk);
    bytes += chunk.length;
  }
  return { name, sha256: hash.digest('hex'), bytes, chunks: () => fileChunks(path) };
}
