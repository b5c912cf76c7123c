import { useState } from 'preact/hooks';
import { useLocation, useRoute } from 'preact-iso';
import type { Layout } from '../../models/log/layout.ts';
import { runPath, runSourceLayoutPath } from '../../server/contract/paths.ts';
import type { ReadAgainRequest, RunSource, RunView } from '../../server/contract/runs.ts';
import { postJson } from '../api.ts';
import { usePageTitle } from '../page-title.ts';
import { TextField } from '../parts/field.tsx';
import { PreviewProblem } from '../parts/import-preview.tsx';
import { LayoutChannels } from '../parts/layout-channels.tsx';
import { type LayoutEditing, LayoutEditor } from '../parts/layout-editor.tsx';
import { Notebook, PageHead } from '../parts/notebook.tsx';
import { Shown } from '../parts/shown.tsx';
import { usePost } from '../use-post.ts';
import { useRead } from '../use-read.ts';
import { listed } from '../words/figures.ts';
import { withMissing } from '../words/layout-edits.ts';

/** Reads the kept files of a run again by a layout put right; what was read and judged before stays on record. */
export default function ReadAgainPage() {
  const { params } = useRoute();
  const run = Number(params.run);
  const n = Number(params.source);
  usePageTitle(`Read run ${run} again`);
  const reading = useRead<RunView>(runPath(run));
  return (
    <Notebook>
      <PageHead
        title={
          <>
            Read the files of <a href={`/runs/${run}`}>run {run}</a> again
          </>
        }
      >
        <p class="soft">
          The bytes are kept as they came. What was read from them first, and every judgement made of it, stays on
          record.
        </p>
      </PageHead>
      <Shown reading={reading} what="Reading the run">
        {(view) => {
          const source = view.sources.find((one) => one.n === n);
          if (source === undefined) return <p>This run has no source {n} that counts now.</p>;
          const { layout, files } = source;
          return layout.format === 'dwellbook-source/1' ? (
            <p>{layout.name} was logged as it happened; there is no file to read again.</p>
          ) : (
            <Form run={run} n={n} kept={layout} files={files} />
          );
        }}
      </Shown>
    </Notebook>
  );
}

function Form({ run, n, kept, files }: { run: number; n: number; kept: Layout; files: RunSource['files'] }) {
  const { route } = useLocation();
  const [layout, setLayout] = useState<Layout>(kept);
  const [answered, setAnswered] = useState<ReadonlySet<string>>(new Set());
  const [reason, setReason] = useState('');
  const onChange = (next: Layout, key: string) => {
    setLayout(next);
    setAnswered(new Set([...answered, key]));
  };
  const editing: LayoutEditing = { layout, statements: [], answered, onChange };
  const reading = usePost(async () => {
    await postJson<RunView>(runSourceLayoutPath(run, n), { layout, reason } satisfies ReadAgainRequest);
    route(`/runs/${run}`);
  });
  const readAgain = (event: Event) => {
    event.preventDefault();
    void reading.post();
  };
  return (
    <form onSubmit={readAgain}>
      <p class="said-of">Files: {listed(files.map(({ name }) => name))}.</p>
      <LayoutEditor {...editing} />
      <section class="section">
        <h2>Columns</h2>
        <LayoutChannels editing={editing} preview={null} />
      </section>
      <section class="section stack">
        <TextField label="Reason" required maxLength={2000} value={reason} onValue={setReason} />
        {reading.problem && (
          <PreviewProblem
            problem={reading.problem}
            onMissing={(cell) => {
              reading.forget();
              onChange(withMissing(layout, cell), 'missing');
            }}
          />
        )}
        <button type="submit" class="primary" disabled={reading.isUnderWay || answered.size === 0}>
          {reading.isUnderWay ? 'Reading and judging …' : 'Read again and judge'}
        </button>
      </section>
    </form>
  );
}
