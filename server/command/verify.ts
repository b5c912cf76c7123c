import { defaultDataFolder, requireDatabase } from './data-folder.ts';
import { type Command, EXIT, readWords, wrongUsage } from './usage.ts';

const HELP = `Usage: dwellbook verify [--data FOLDER]

Recomputes every hash there is: the audit trail line by line, the readings of every run, the files as they came,
documents and evaluations.

  --data FOLDER  the workshop's data; default: ${defaultDataFolder()}

Exit status: 0 all hold, 1 one does not, 64 wrong usage, 65 there is no workshop, 70 a fault of the program itself.
`;

export const verifyCommand: Command = {
  help: HELP,
  async run(args) {
    const { values, positionals } = readWords('verify', args, { data: { type: 'string' } });
    if (positionals.length > 0) throw wrongUsage('verify', `"${positionals[0]}" is not expected`);
    const path = requireDatabase(values.data ?? defaultDataFolder());
    const [{ openDatabase }, { verifyChains }] = await Promise.all([
      import('../store/database.ts'),
      import('../actions/verify-chains.ts'),
    ]);
    const db = openDatabase(path, { at: new Date().toISOString(), readonly: true });
    try {
      const { holds, lines, sources, firstBroken } = verifyChains(db);
      process.stdout.write(
        holds
          ? `All hold: ${lines} lines of the audit trail, the readings of ${sources} sources, their files and documents.\n`
          : `Does not hold: ${firstBroken}.\n`,
      );
      return holds ? EXIT.done : 1;
    } finally {
      db.close();
    }
  },
};
