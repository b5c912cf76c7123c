import { randomUUID } from 'node:crypto';
import { createWriteStream } from 'node:fs';
import { rm } from 'node:fs/promises';
import { join } from 'node:path';
import type { Readable } from 'node:stream';
import { pipeline } from 'node:stream/promises';
import { DomainError } from '../../models/errors.ts';
import type { AppParts } from './app-parts.ts';

/** Writes a body to a file as it arrives, never holding it whole; returns the file's path. */
export async function saveUpload(
  { incomingFolder, mostUploadBytes }: Pick<AppParts, 'incomingFolder' | 'mostUploadBytes'>,
  body: Readable,
): Promise<string> {
  const path = join(incomingFolder, randomUUID());
  try {
    await pipeline(body, upTo(mostUploadBytes), createWriteStream(path, { flags: 'wx' }));
    return path;
  } catch (error) {
    await rm(path, { force: true });
    if (error instanceof Error && 'code' in error && error.code === 'ERR_STREAM_PREMATURE_CLOSE') {
      throw new DomainError('file-unreadable', 'The upload was broken off; nothing was kept', {}, { cause: error });
    }
    throw error;
  }
}

function upTo(mostBytes: number) {
  return async function* (body: AsyncIterable<Uint8Array>) {
    let bytes = 0;
    for await (const chunk of body) {
      bytes += chunk.length;
      if (bytes > mostBytes) {
        throw new DomainError('too-large', `A file may have at most ${mostBytes} bytes`, { mostBytes });
      }
      yield chunk;
    }
  };
}
