import { mkdirSync } from 'node:fs';
import { basename, dirname, relative, sep } from 'node:path';
import { watch } from 'chokidar';
import { DomainError } from '../../models/errors.ts';
import type { ActionParts } from '../actions/action-parts.ts';
import { bringInFile } from '../actions/bring-in-file.ts';
import { fileAtPath } from '../actions/file-at-path.ts';

export interface WatchedFolderParts extends ActionParts {
  readonly folder: string;
  /** A file is finished when it has not grown for so long, ms. */
  readonly settleMs: number;
  /** Most bytes a file may have to be kept. */
  readonly mostBytes: number;
  readonly log: { info(facts: object, message: string): void; error(facts: object, message: string): void };
}

export interface WatchedFolder {
  /** Ends the watch, once what was begun is done. */
  close(): Promise<void>;
}

/**
 * Makes a run of every finished file in a folder. A file in a folder of its own, named for a recorder, is read by that
 * recorder's layout; one beside them by the one kept layout that reads it. Files are left where they lie.
 */
export async function watchFolder(parts: WatchedFolderParts): Promise<WatchedFolder> {
  const { folder, settleMs } = parts;
  mkdirSync(folder, { recursive: true });
  const watcher = watch(folder, {
    depth: 1,
    ignored: (path) => path !== folder && basename(path).startsWith('.'),
    awaitWriteFinish: { stabilityThreshold: settleMs, pollInterval: Math.max(20, Math.min(500, settleMs / 4)) },
  });
  // One file at a time: two files of one run would otherwise be read side by side.
  let queue: Promise<void> = Promise.resolve();
  const take = (path: string) => {
    queue = queue.then(() => takeFile(parts, path));
  };
  watcher.on('add', take).on('change', take);
  watcher.on('error', (error) => parts.log.error({ err: error, folder }, 'the watched folder cannot be watched'));
  await new Promise<void>((resolve) => watcher.once('ready', resolve));
  return {
    async close() {
      await watcher.close();
      await queue;
    },
  };
}

async function takeFile(parts: WatchedFolderParts, path: string): Promise<void> {
  const { folder, log, mostBytes } = parts;
  const inside = relative(folder, dirname(path));
  const recorder = inside === '' ? null : (inside.split(sep)[0] ?? null);
  try {
    const file = fileAtPath(path, basename(path));
    const arrival = await bringInFile(parts, { file, origin: 'watched-folder', recorder, mostBytes });
    if ('run' in arrival) log.info({ path, run: arrival.run }, 'recorded');
    else log.info({ path, import: arrival.importId, because: arrival.refusal.message }, 'waits for someone');
  } catch (error) {
    // The next file must still be taken; this one stays where it lies and is taken again at the next start.
    if (error instanceof DomainError && error.code === 'already-recorded') log.info({ path }, error.message);
    else log.error({ path, err: error }, 'cannot be taken');
  }
}
