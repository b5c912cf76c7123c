import { closeSync, openSync, readSync, statSync } from 'node:fs';
import { DomainError } from '../../models/errors.ts';

const CHUNK_BYTES = 1 << 16;

/**
 * A file's bytes from its start, read as they are asked for; throws `file-unreadable`.
 *
 * @param shared  Read into again and again where given, so that a piece is good only until the next is asked for.
 */
export function* fileChunks(path: string, shared?: Uint8Array): Generator<Uint8Array, void> {
  const file = orUnreadable(path, () => openSync(path, 'r'));
  try {
    for (;;) {
      const chunk = shared ?? Buffer.allocUnsafeSlow(CHUNK_BYTES);
      const length = orUnreadable(path, () => readSync(file, chunk, 0, chunk.length, null));
      if (length === 0) return;
      yield chunk.subarray(0, length);
    }
  } finally {
    closeSync(file);
  }
}

/** How long a file is. */
export function fileBytes(path: string): number {
  return orUnreadable(path, () => statSync(path)).size;
}

const REASON_BY_CODE: Readonly<Record<string, string>> = {
  ENOENT: 'there is no such file',
  ENOTDIR: 'there is no such file',
  EISDIR: 'it is a folder',
  EACCES: 'permission is denied',
  EPERM: 'permission is denied',
};

function orUnreadable<T>(path: string, read: () => T): T {
  try {
    return read();
  } catch (cause) {
    const code = (cause as NodeJS.ErrnoException).code ?? '';
    const reason = REASON_BY_CODE[code] ?? (cause as Error).message;
    throw new DomainError('file-unreadable', `${path} cannot be read: ${reason}`, { file: path, code }, { cause });
  }
}
