import { join, resolve } from 'node:path';
import { defaultDataFolder, makeDataFolder } from './data-folder.ts';
import { type Command, EXIT, readWords, wholeNumber, wrongUsage } from './usage.ts';

const HELP = `Usage: dwellbook serve [OPTIONS]

Serves a workshop: its pages, its data and a folder watched for finished files. A new data folder is made at the
first start.

  --port N          default 4600; 0 takes any that is free
  --host ADDRESS    default 127.0.0.1: this machine alone
  --data FOLDER     the workshop's data; default: ${defaultDataFolder()}
  --watch FOLDER    folder watched for finished files; default: "watched" in the data folder. A file in a folder named
                    for a recorder is read by that recorder's layout
  --settle SECONDS  a file is finished when it has not grown for so long; default 60

Exit status: 0 ended when told to, 64 wrong usage, 65 the database or the port cannot be used, 70 a fault of the
program itself.
`;

export const serveCommand: Command = {
  help: HELP,
  async run(args) {
    const { values, positionals } = readWords('serve', args, {
      port: { type: 'string', default: '4600' },
      host: { type: 'string', default: '127.0.0.1' },
      data: { type: 'string' },
      watch: { type: 'string' },
      settle: { type: 'string', default: '60' },
    });
    if (positionals.length > 0) throw wrongUsage('serve', `"${positionals[0]}" is not expected`);
    const port = wholeNumber('serve', 'port', values.port, { atLeast: 0, atMost: 65_535 });
    const settleS = wholeNumber('serve', 'settle', values.settle, { atLeast: 1, atMost: 86_400 });
    const folder = makeDataFolder(values.data ?? defaultDataFolder());
    const { serveWorkshop } = await import('./serve-workshop.ts');
    await serveWorkshop({
      folder,
      host: values.host,
      port,
      watchedFolder: values.watch === undefined ? join(folder, 'watched') : resolve(values.watch),
      settleS,
    });
    return EXIT.done;
  },
};
