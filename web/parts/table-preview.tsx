import type { TableImport } from '../../server/contract/tables.ts';
import { count, listed } from '../words/figures.ts';
import { TABLE_WORDS } from '../words/tables.ts';
import { ChoiceField } from './field.tsx';

/** What a table would make: its columns, its first rows, and every row that is refused. */
export function TablePreview({
  table,
  isUnderWay,
  onColumns,
  onKeep,
}: {
  table: TableImport;
  isUnderWay: boolean;
  onColumns: (columns: string) => void;
  onKeep: (columns: string) => void;
}) {
  const { fields } = TABLE_WORDS[table.kind];
  const thing = table.kind.slice(0, -1);
  const columns = table.columns.map(({ field }) => field ?? '').join(',');
  const choose = (at: number, field: string) =>
    onColumns(
      table.columns
        .map((column, n) => (n === at ? field : column.field === field ? '' : (column.field ?? '')))
        .join(','),
    );
  return (
    <>
      {!table.kept && (
        <section class="section">
          <h2>Columns</h2>
          <div class="fields">
            {table.columns.map(({ heading, field }, n) => (
              <ChoiceField
                key={n}
                label={heading || `column ${n + 1}`}
                choices={[
                  { value: '', text: 'passed over' },
                  ...Object.entries(fields).map(([value, text]) => ({ value, text })),
                ]}
                value={field ?? ''}
                onValue={(value) => choose(n, value)}
              />
            ))}
          </div>
          {table.missing.length > 0 && (
            <p class="notice" role="alert">
              Say which column holds {listed(table.missing.map((field) => fields[field] ?? field))}.
            </p>
          )}
        </section>
      )}
      {!table.kept && table.missing.length === 0 && (
        <section class="section">
          <h2>
            {count(table.good, thing)} of {count(table.rows, 'row')}
          </h2>
          <p class="soft">
            Read as {table.encoding === 'utf-8' ? 'UTF-8' : 'Windows-1252'}, cells parted by{' '}
            {DELIMITERS[table.delimiter] ?? table.delimiter}.
          </p>
          <FirstRows table={table} />
          <div class="row section">
            <button
              type="button"
              class="primary"
              disabled={isUnderWay || table.good === 0}
              onClick={() => onKeep(columns)}
            >
              Keep {count(table.good, thing)}
            </button>
          </div>
        </section>
      )}
      {table.refused > 0 && <Refused table={table} />}
    </>
  );
}

const DELIMITERS: Readonly<Record<string, string>> = { ',': 'commas', ';': 'semicolons', '\t': 'tabs' };

function FirstRows({ table }: { table: TableImport }) {
  const { fields } = TABLE_WORDS[table.kind];
  const used = Object.keys(fields).filter((field) => table.columns.some((column) => column.field === field));
  return (
    <div class="table-scroll">
      <table>
        <caption class="soft">The first as they would be made</caption>
        <thead>
          <tr>
            <th scope="col">line</th>
            {used.map((field) => (
              <th key={field} scope="col">
                {fields[field]}
              </th>
            ))}
          </tr>
        </thead>
        <tbody>
          {table.first.map(({ line, cells }) => (
            <tr key={line}>
              <td>{line}</td>
              {used.map((field) => (
                <td key={field}>{cells[field] ?? '–'}</td>
              ))}
            </tr>
          ))}
        </tbody>
      </table>
    </div>
  );
}

function Refused({ table: { refusals, refused } }: { table: TableImport }) {
  return (
    <section class="section">
      <h2>{count(refused, 'row')} refused</h2>
      <ul class="entries">
        {refusals.map(({ line, column, value, because }) => (
          <li class="entry" key={line}>
            <p>
              Line {line}
              {column !== null && `, ${column}`}: {value !== '' && <code class="breakable">{value}</code>} {because}
            </p>
          </li>
        ))}
      </ul>
      {refused > refusals.length && <p class="soft">The first {refusals.length} are listed.</p>}
    </section>
  );
}
