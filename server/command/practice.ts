import { existsSync, renameSync, rmSync } from 'node:fs';
import { join } from 'node:path';
import { databasePath, defaultDataFolder, makeDataFolder } from './data-folder.ts';
import { type Command, EXIT, readWords, wholeNumber, wrongUsage } from './usage.ts';

const DEFAULT_FOLDER = join(defaultDataFolder(), 'practice');

const HELP = `Usage: dwellbook practice [OPTIONS]

Serves Skerry Row, an invented workshop to practise on. Its year of runs is simulated at the first start and kept
from then on, so that what you do there stays. It has a database of its own: a real workshop is never touched.

  --port N        default 4600; 0 takes any that is free
  --host ADDRESS  default 127.0.0.1: this machine alone
  --data FOLDER   default: ${DEFAULT_FOLDER}
  --fresh         writes the practice workshop anew, losing what was done in it

Exit status: 0 ended when told to, 64 wrong usage, 65 the database or the port cannot be used, 70 a fault of the
program itself.
`;

export const practiceCommand: Command = {
  help: HELP,
  async run(args) {
    const { values, positionals } = readWords('practice', args, {
      port: { type: 'string', default: '4600' },
      host: { type: 'string', default: '127.0.0.1' },
      data: { type: 'string', default: DEFAULT_FOLDER },
      fresh: { type: 'boolean', default: false },
    });
    if (positionals.length > 0) throw wrongUsage('practice', `"${positionals[0]}" is not expected`);
    const port = wholeNumber('practice', 'port', values.port, { atLeast: 0, atMost: 65_535 });
    const folder = makeDataFolder(values.data);
    const path = databasePath(folder);
    if (values.fresh || !existsSync(path)) await writeAnew(folder, path);
    await refuseRealWorkshop(path);
    const { serveWorkshop } = await import('./serve-workshop.ts');
    await serveWorkshop({ folder, host: values.host, port, watchedFolder: join(folder, 'watched'), settleS: 60 });
    return EXIT.done;
  },
};

/** Written beside and put in place when whole: one that was broken off is never taken for the workshop. */
async function writeAnew(folder: string, path: string): Promise<void> {
  if (existsSync(path)) await refuseRealWorkshop(path);
  const [{ openDatabase }, { createLongWork }, { writePracticeWorkshop }] = await Promise.all([
    import('../store/database.ts'),
    import('../actions/long-work.ts'),
    import('../practice/write-workshop.ts'),
  ]);
  const unfinished = join(folder, 'unfinished.sqlite');
  removeDatabase(unfinished);
  process.stdout.write('Writing the practice workshop, a year of simulated runs …\n');
  const db = openDatabase(unfinished, { at: new Date().toISOString() });
  const longWork = createLongWork();
  try {
    await writePracticeWorkshop({
      db,
      evaluate: longWork.evaluate,
      say: (sentence) => process.stdout.write(`  ${sentence}\n`),
    });
  } finally {
    await longWork.close();
    db.close();
  }
  removeDatabase(path);
  renameSync(unfinished, path);
}

function removeDatabase(path: string): void {
  for (const end of ['', '-wal', '-shm']) rmSync(`${path}${end}`, { force: true });
}

async function refuseRealWorkshop(path: string): Promise<void> {
  const [{ openDatabase }, { findWorkshop }] = await Promise.all([
    import('../store/database.ts'),
    import('../store/workshop.ts'),
  ]);
  const db = openDatabase(path, { at: new Date().toISOString() });
  const isPractice = findWorkshop(db)?.practice != null;
  db.close();
  if (!isPractice) throw wrongUsage('practice', `${path} is a real workshop; give another --data folder`);
}
