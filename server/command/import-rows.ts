import { basename } from 'node:path';
import { fileAtPath } from '../actions/file-at-path.ts';
import type { TableKind } from '../contract/tables.ts';
import { builtInPerson } from './built-in-person.ts';
import { databasePath, defaultDataFolder, makeDataFolder } from './data-folder.ts';
import { EXIT, needed, readWords } from './usage.ts';

/** Brings in a table of parts or rolls: the good rows are kept, the others named on the error output. */
export async function importRows(kind: TableKind, args: readonly string[]): Promise<number> {
  const { values, positionals } = readWords('import', args, {
    columns: { type: 'string' },
    'dry-run': { type: 'boolean' },
    data: { type: 'string' },
    json: { type: 'boolean' },
  });
  const path = needed('import', 'FILE', positionals[0]);
  const file = fileAtPath(path, basename(path));
  const [{ openDatabase }, { importTable }] = await Promise.all([
    import('../store/database.ts'),
    import('../actions/import-table.ts'),
  ]);
  const folder = makeDataFolder(values.data ?? defaultDataFolder());
  const db = openDatabase(databasePath(folder), { at: new Date().toISOString() });
  try {
    const commit = values['dry-run'] ? undefined : file.sha256;
    const parts = { db, clock: Date.now, actor: builtInPerson() };
    const table = await importTable(parts, { kind, file, columns: values.columns, commit });
    for (const { line, column, value, because } of table.refusals) {
      const where = column === null ? '' : `, column "${column}"`;
      process.stderr.write(`${file.name}, line ${line}${where}: "${value}": ${because}\n`);
    }
    const missing = table.missing.length === 0 ? '' : ` No column holds ${table.missing.join(', ')}.`;
    const said = `${table.good} ${kind} ${table.kept ? 'kept' : 'would be kept'}, ${table.refused} rows refused.${missing}\n`;
    process.stdout.write(values.json ? `${JSON.stringify(table)}\n` : said);
    return EXIT.done;
  } finally {
    db.close();
  }
}
