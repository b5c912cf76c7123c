import { open, readdir, stat } from 'node:fs/promises';
import { join } from 'node:path';
import { setImmediate as nextTurn } from 'node:timers/promises';
import { watch } from 'chokidar';
import { DomainError } from '../../../models/errors.ts';
import type { SourceReads } from '../../../models/log/live-source.ts';
import { type GrownFile, isSameFile, type Look, lookAt, unreadFile } from './grown-file.ts';
import type { OneScan, ReadOnceParts, RunningSource, SourceDriver, SourceParts } from './source.ts';

/** Files that another program writes into a folder, read as they grow. Nothing is ever written there. */
export const growingFiles: SourceDriver = { start, readOnce };

/** Where nothing is kept yet, so far back is read, ms; and where something is, this much before its last scan. */
const FIRST_BACK_MS = 24 * 3_600_000;
const BACK_MS = 10 * 60_000;
/** The folder is looked through so often at least, ms: not every file system says what happens in it. */
const SHORTEST_LOOK_MS = 1000;
const SCANS_AT_ONCE = 1000;

interface Found {
  readonly name: string;
  readonly path: string;
  /** Stays with a file that is renamed. */
  readonly key: string;
  readonly size: number;
  readonly changedMs: number;
}

interface Followed extends GrownFile {
  name: string;
  seenSize: number;
  seenChangedMs: number;
  wrong: string | null;
}

function start(parts: SourceParts): RunningSource {
  const { document, kept, now, tell, note, fault } = parts;
  const { folder } = placeOf(document);
  const fromMs = kept === null ? now() - FIRST_BACK_MS : kept.lastMs - BACK_MS;
  const files = new Map<string, Followed>();
  let isOver = false;
  let looking: Promise<void> | null = null;
  let again = false;

  const look = (): Promise<void> => {
    if (looking !== null) {
      again = true;
      return looking;
    }
    looking = lookThrough()
      .catch(fault)
      .finally(() => {
        looking = null;
        if (again && !isOver) {
          again = false;
          void look();
        }
      });
    return looking;
  };
  const lookThrough = async () => {
    let found: Found[];
    try {
      found = await filesIn(folder);
    } catch (error) {
      tell('cannot-be-reached', (error as Error).message);
      return;
    }
    const there = new Set(found.map(({ key }) => key));
    for (const key of files.keys()) if (!there.has(key)) files.delete(key);
    for (const one of found) {
      if (isOver) return;
      const file = files.get(one.key) ?? {
        ...unreadFile(),
        name: one.name,
        seenSize: -1,
        seenChangedMs: 0,
        wrong: null,
      };
      files.set(one.key, file);
      file.name = one.name;
      if (one.changedMs < fromMs || (file.seenSize === one.size && file.seenChangedMs === one.changedMs)) continue;
      try {
        await follow(parts, file, one, fromMs, () => isOver);
      } catch (error) {
        const why = (error as Error).message;
        if (file.wrong !== why) note(why);
        file.wrong = why;
        // What is wrong with the file is so until it changes; anything else is tried again.
        if (!(error instanceof DomainError && error.code.startsWith('log-'))) continue;
      }
      file.seenSize = one.size;
      file.seenChangedMs = one.changedMs;
    }
    tell('reached', [...files.values()].find(({ wrong }) => wrong !== null)?.wrong ?? null);
  };

  const watcher = watch(folder, { depth: 0, ignored: (path) => path !== folder && isPassedOver(path) });
  watcher.on('all', () => void look());
  watcher.on('error', (error) => note(`${folder}: ${(error as Error).message}`));
  const timer = setInterval(() => void look(), Math.max(SHORTEST_LOOK_MS, document.intervalS * 1000));
  void look();
  return {
    async close() {
      isOver = true;
      clearInterval(timer);
      await watcher.close();
      await looking;
    },
  };
}

/** Reads a file as far as it goes. Lines count as read once their scans are on the disk. */
async function follow(
  { document, take, note }: SourceParts,
  file: Followed,
  { name, path, size }: Found,
  fromMs: number,
  isOver: () => boolean,
): Promise<void> {
  const { layout } = placeOf(document);
  const handle = await open(path, 'r');
  try {
    if (!(await isSameFile(file, handle, size))) {
      note(`${name} was begun anew`);
      Object.assign(file, unreadFile());
    }
    for (;;) {
      const look = await lookAt(file, handle, { name, size, layout });
      if (look === null || isOver()) return;
      await takeAll(look, take, fromMs);
      look.done();
      file.wrong = look.wrong;
      for (const sentence of look.notes) note(sentence);
      if (!look.isMore) return;
      await nextTurn();
    }
  } finally {
    await handle.close();
  }
}

async function takeAll(look: Look, take: SourceParts['take'], fromMs: number) {
  const wanted = look.scans.filter(({ timeMs }) => timeMs >= fromMs).map((scan) => ({ ...scan, sequence: null }));
  for (let at = 0; at < wanted.length; at += SCANS_AT_ONCE) {
    await take(wanted.slice(at, at + SCANS_AT_ONCE));
  }
}

/** Files as they lie there, the one that changed last at the end. */
async function filesIn(folder: string): Promise<Found[]> {
  const names = (await readdir(folder)).filter((name) => !isPassedOver(name));
  const found = await Promise.all(
    names.map(async (name): Promise<Found | null> => {
      const path = join(folder, name);
      // One that has gone since it was listed is simply not there.
      const about = await stat(path).catch(() => null);
      if (about === null || !about.isFile()) return null;
      return { name, path, key: `${about.dev}:${about.ino}`, size: about.size, changedMs: about.mtimeMs };
    }),
  );
  return found.filter((one) => one !== null).sort((a, b) => a.changedMs - b.changedMs || (a.name < b.name ? -1 : 1));
}

function isPassedOver(path: string): boolean {
  return /(?:^|[/\\])[.~][^/\\]*$/.test(path);
}

function placeOf({ reads }: SourceParts['document']) {
  return reads as Extract<SourceReads, { readonly kind: 'growing-files' }>;
}

/** The last scan of the file that changed last. */
async function readOnce({ document }: ReadOnceParts): Promise<OneScan> {
  const { folder, layout } = placeOf(document);
  const newest = (await filesIn(folder)).at(-1);
  const nothing = (why: string): OneScan => ({
    figures: new Float64Array(document.channels.length).fill(NaN),
    because: document.channels.map(() => why),
  });
  if (newest === undefined) return nothing(`there is no file in ${folder}`);
  const handle = await open(newest.path, 'r');
  try {
    const file = unreadFile();
    let figures: Float64Array | null = null;
    for (;;) {
      const look = await lookAt(file, handle, { name: newest.name, size: newest.size, layout });
      figures = look?.scans.at(-1)?.figures ?? figures;
      look?.done();
      if (look === null || !look.isMore) break;
    }
    if (figures === null) return nothing(`${newest.name} holds no whole line of readings yet`);
    return {
      figures,
      because: [...figures].map((figure) => (Number.isNaN(figure) ? `absent in ${newest.name}` : null)),
    };
  } finally {
    await handle.close();
  }
}
