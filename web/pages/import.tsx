import { useState } from 'preact/hooks';
import { useLocation } from 'preact-iso';
import type { Imports, ImportView } from '../../server/contract/imports.ts';
import { IMPORTS_PATH, uploadPath } from '../../server/contract/paths.ts';
import { postBytes } from '../api.ts';
import { usePageTitle } from '../page-title.ts';
import { FileButton } from '../parts/file-button.tsx';
import { UnreadFile } from '../parts/needs.tsx';
import { Notebook, PageHead } from '../parts/notebook.tsx';
import { Problem } from '../parts/problem.tsx';
import { Shown } from '../parts/shown.tsx';
import { Waiting } from '../parts/waiting.tsx';
import { usePost } from '../use-post.ts';
import { useRead } from '../use-read.ts';
import { bytes } from '../words/figures.ts';
import { workshop } from '../workshop.ts';

/** Takes a recorder's file in, as it was written; the next page reads it. */
export function ImportPage() {
  usePageTitle('Import a log');
  const { route } = useLocation();
  const [file, setFile] = useState<File | null>(null);
  const [isOver, setIsOver] = useState(false);
  const waiting = useRead<Imports>(IMPORTS_PATH);
  const sending = usePost(async (chosen: File) => {
    const view = await postBytes<ImportView>(uploadPath(chosen.name), chosen);
    route(`/imports/${view.id}`);
  });
  const take = async (chosen: File) => {
    setFile(chosen);
    await sending.post(chosen);
  };
  const drop = (event: DragEvent) => {
    event.preventDefault();
    setIsOver(false);
    const dropped = event.dataTransfer?.files[0];
    if (dropped) void take(dropped);
  };
  return (
    <Notebook>
      <PageHead title="Import a log">
        <p class="soft">
          The file as the recorder wrote it: text with commas, semicolons or tabs, or .xlsx. Its bytes are kept
          unchanged, with their SHA-256.
        </p>
      </PageHead>
      <fieldset
        class="drop"
        aria-label="Bring a file here"
        data-over={isOver ? 'yes' : 'no'}
        onDragOver={(event) => {
          event.preventDefault();
          setIsOver(true);
        }}
        onDragLeave={() => setIsOver(false)}
        onDrop={drop}
      >
        <FileButton
          label="Choose a file"
          primary
          isUnderWay={sending.isUnderWay}
          accept=".csv,.txt,.tsv,.log,.dat,.asc,.xlsx"
          onFile={take}
        />
        <p class="soft">or drop it here. Nothing becomes a run before you have seen how it is read.</p>
        {sending.isUnderWay && file && <Waiting what={`Sending ${file.name}, ${bytes(file.size)}`} />}
      </fieldset>
      {sending.problem && (
        <Problem
          problem={sending.problem}
          kept="The file on your device is untouched."
          {...(file ? { again: () => void take(file) } : {})}
        />
      )}
      <section class="section">
        <h2>Files that wait to be read</h2>
        <Shown reading={waiting} what="Reading what waits">
          {({ imports }) => {
            const open = imports.filter((line) => line.state === 'waiting');
            return open.length === 0 ? (
              <p class="soft">
                None.{' '}
                {workshop.value?.watchedFolder &&
                  `Files put into ${workshop.value.watchedFolder} come in by themselves, and wait here when their layout is not known.`}
              </p>
            ) : (
              <ul class="entries">
                {open.map((line) => (
                  <UnreadFile key={line.id} file={line} />
                ))}
              </ul>
            );
          }}
        </Shown>
      </section>
    </Notebook>
  );
}
