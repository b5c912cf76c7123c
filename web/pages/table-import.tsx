import { useState } from 'preact/hooks';
import { useLocation } from 'preact-iso';
import { tablePath } from '../../server/contract/record-paths.ts';
import type { TableImport, TableKind } from '../../server/contract/tables.ts';
import { postTable } from '../api.ts';
import { usePageTitle } from '../page-title.ts';
import { FileButton } from '../parts/file-button.tsx';
import { Notebook, PageHead } from '../parts/notebook.tsx';
import { Problem } from '../parts/problem.tsx';
import { TablePreview } from '../parts/table-preview.tsx';
import { Waiting } from '../parts/waiting.tsx';
import { usePost } from '../use-post.ts';
import { bytes, count } from '../words/figures.ts';
import { TABLE_WORDS } from '../words/tables.ts';

/** Parts or rolls from a table: seen first, then kept. */
export default function TableImportPage() {
  const { path } = useLocation();
  const kind: TableKind = path.startsWith('/rolls') ? 'rolls' : 'parts';
  const { title, needs, page, pageName } = TABLE_WORDS[kind];
  usePageTitle(title);
  const [file, setFile] = useState<File | null>(null);
  const [seen, setSeen] = useState<TableImport | null>(null);
  const [isOver, setIsOver] = useState(false);
  const sending = usePost(async (table: File, query: { columns?: string; commit?: string }) => {
    setSeen(await postTable<TableImport>(tablePath(kind, query), table));
  });
  const take = (chosen: File) => {
    setFile(chosen);
    setSeen(null);
    void sending.post(chosen, {});
  };
  const drop = (event: DragEvent) => {
    event.preventDefault();
    setIsOver(false);
    const dropped = event.dataTransfer?.files[0];
    if (dropped) take(dropped);
  };
  return (
    <Notebook>
      <PageHead title={title}>
        <p class="soft">{needs}</p>
      </PageHead>
      <fieldset
        class="drop"
        aria-label="Bring a table here"
        data-over={isOver ? 'yes' : 'no'}
        onDragOver={(event) => {
          event.preventDefault();
          setIsOver(true);
        }}
        onDragLeave={() => setIsOver(false)}
        onDrop={drop}
      >
        <FileButton
          label="Choose a table"
          primary={seen === null}
          isUnderWay={sending.isUnderWay}
          accept=".csv,.txt,.tsv"
          onFile={take}
        />
        <p class="soft">
          or drop it here: CSV with a heading line. Nothing is kept before you have seen what it makes.
        </p>
        {sending.isUnderWay && file && <Waiting what={`Reading ${file.name}, ${bytes(file.size)}`} />}
      </fieldset>
      {sending.problem && <Problem problem={sending.problem} kept="The table on your device is untouched." />}
      {seen?.kept && (
        <section class="section" role="status">
          <h2>{count(seen.good, kind.slice(0, -1))} on record</h2>
          <p>
            {seen.refused > 0 && `${count(seen.refused, 'row')} stayed behind; they are listed below. `}
            <a href={page}>{pageName}</a>
          </p>
        </section>
      )}
      {seen && file && (
        <TablePreview
          key={seen.sha256}
          table={seen}
          isUnderWay={sending.isUnderWay}
          onColumns={(columns) => void sending.post(file, { columns })}
          onKeep={(columns) => void sending.post(file, { columns, commit: seen.sha256 })}
        />
      )}
    </Notebook>
  );
}
