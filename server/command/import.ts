import { basename } from 'node:path';
import { parseLayout } from '../../models/log/parse-layout.ts';
import { fileAtPath } from '../actions/file-at-path.ts';
import { builtInPerson } from './built-in-person.ts';
import { databasePath, defaultDataFolder, makeDataFolder } from './data-folder.ts';
import { readDocumentFile } from './read-document.ts';
import { type Command, EXIT, needed, readWords, wrongUsage } from './usage.ts';

const HELP = `Usage: dwellbook import FILE... (--layout LAYOUT.json | --recorder NAME) [OPTIONS]
       dwellbook import parts FILE.csv [--columns serial,title,...] [--dry-run] [--data FOLDER] [--json]
       dwellbook import rolls FILE.csv [--columns roll,batch,...] [--dry-run] [--data FOLDER] [--json]

Records a recorder's file as a run that awaits its load. Several files are pieces of one run.
Of a table of parts or rolls the good rows are kept, all at once, and the others named by line.

  --layout FILE    how the files are to be read (dwellbook-layout/1)
  --recorder NAME  the recorder they came from: its kept layout is used, or the one given is kept for it
  --vessel NAME    the vessel the run was in; where not given, the recorder's
  --data FOLDER    the workshop's data; default: ${defaultDataFolder()}
  --json           prints {"run": N} instead of a sentence

Exit status: 0 done, 64 wrong usage, 65 the input cannot be read or used (so is a file that is recorded already),
70 a fault of the program itself.
`;

export const importCommand: Command = {
  help: HELP,
  async run(args) {
    const [kind] = args;
    if (kind === 'parts' || kind === 'rolls') {
      const { importRows } = await import('./import-rows.ts');
      return importRows(kind, args.slice(1));
    }
    const { values, positionals } = readWords('import', args, {
      layout: { type: 'string' },
      recorder: { type: 'string' },
      vessel: { type: 'string' },
      data: { type: 'string' },
      json: { type: 'boolean' },
    });
    needed('import', 'FILE', positionals[0]);
    if (values.layout === undefined && values.recorder === undefined) {
      throw wrongUsage('import', 'Either --layout or --recorder is needed');
    }
    const given = values.layout === undefined ? null : await readDocumentFile(values.layout, parseLayout);
    const files = positionals.map((path) => fileAtPath(path, basename(path)));
    const [{ openDatabase }, { recordRun }, { requireKeptLayout }] = await Promise.all([
      import('../store/database.ts'),
      import('../actions/record-run.ts'),
      import('../store/recorders.ts'),
    ]);
    const folder = makeDataFolder(values.data ?? defaultDataFolder());
    const db = openDatabase(databasePath(folder), { at: new Date().toISOString() });
    try {
      const layout = given ?? requireKeptLayout(db, values.recorder ?? '');
      const parts = { db, clock: Date.now, actor: builtInPerson() };
      const run = await recordRun(parts, { files, layout, recorder: values.recorder, vessel: values.vessel });
      process.stdout.write(
        values.json ? `${JSON.stringify({ run })}\n` : `Recorded as run ${run}; it awaits its load.\n`,
      );
      return EXIT.done;
    } finally {
      db.close();
    }
  },
};
