import { useState } from 'preact/hooks';
import { useRoute } from 'preact-iso';
import type { Layout } from '../../models/log/layout.ts';
import type { ImportView } from '../../server/contract/imports.ts';
import { importPath } from '../../server/contract/paths.ts';
import { usePageTitle } from '../page-title.ts';
import { FirstLines } from '../parts/first-lines.tsx';
import { ImportDiscard } from '../parts/import-discard.tsx';
import { PreviewProblem, PreviewView } from '../parts/import-preview.tsx';
import { ImportRecord } from '../parts/import-record.tsx';
import { LayoutChannels } from '../parts/layout-channels.tsx';
import { LayoutChoice } from '../parts/layout-choice.tsx';
import { type LayoutEditing, LayoutEditor } from '../parts/layout-editor.tsx';
import { Notebook, PageHead } from '../parts/notebook.tsx';
import { OpenQuestions } from '../parts/open-questions.tsx';
import { Shown } from '../parts/shown.tsx';
import { Waiting } from '../parts/waiting.tsx';
import { When } from '../parts/when.tsx';
import { usePreview } from '../use-preview.ts';
import { useRead } from '../use-read.ts';
import { bytes, count, listed } from '../words/figures.ts';
import { withMissing } from '../words/layout-edits.ts';
import { openQuestions, placeName } from '../words/layouts.ts';

/** One file: how it is read stands beside its first lines, and can be corrected until it is right. */
export default function ImportFilePage() {
  const { params } = useRoute();
  const id = Number(params.id);
  const reading = useRead<ImportView>(importPath(id));
  const view = reading.value;
  usePageTitle(view ? `Read ${view.name}` : 'Read a file');
  return (
    <Notebook
      margin={
        view && (
          <p class="when">
            <When at={view.received.at} />
            <br />
            received, {view.received.by}
          </p>
        )
      }
    >
      <PageHead title={view ? <span class="breakable">{view.name}</span> : 'A file'}>
        {view && (
          <p class="soft breakable">
            {bytes(view.bytes)} · SHA-256 <code>{view.sha256.slice(0, 16)}</code>
          </p>
        )}
      </PageHead>
      <Shown reading={reading} what="Reading the file’s first lines">
        {(file) => <Body key={file.id} view={file} />}
      </Shown>
    </Notebook>
  );
}

function Body({ view }: { view: ImportView }) {
  if (view.state === 'recorded' && view.run !== null) {
    return (
      <p class="notice kept">
        This file is on record as <a href={`/runs/${view.run}`}>run {view.run}</a>.
      </p>
    );
  }
  if (view.state === 'discarded')
    return <p class="notice">This file was set aside. Import it again if it is needed.</p>;
  if (!view.proposal) {
    return (
      <div class="stack">
        <div class="notice grave" role="alert">
          <h2>{view.problem?.title ?? 'This file cannot be read'}</h2>
          <p>{view.problem?.detail ?? 'It holds no table of readings.'}</p>
        </div>
        <FirstLines name={view.name} lines={view.firstLines} layout={null} />
        <ImportDiscard id={view.id} />
      </div>
    );
  }
  return <Reading view={view} proposal={view.proposal} />;
}

function Reading({ view, proposal }: { view: ImportView; proposal: NonNullable<ImportView['proposal']> }) {
  const known = view.knownLayouts.find((one) => one.reads);
  const [source, setSource] = useState<string | null>(known?.recorder ?? null);
  const [layout, setLayout] = useState<Layout>(known?.layout ?? proposal.layout);
  const [answered, setAnswered] = useState<ReadonlySet<string>>(new Set());
  const statements = source === null ? proposal.statements : [];
  const open = openQuestions(layout, statements, answered);
  const { preview, problem, isReading } = usePreview(view.id, open.length === 0 ? layout : null);
  const onChange = (next: Layout, key: string) => {
    setLayout(next);
    setAnswered(new Set([...answered, key]));
  };
  const editing: LayoutEditing = { layout, statements, answered, onChange };
  const take = (recorder: string | null, next: Layout) => {
    setSource(recorder);
    setLayout(next);
    setAnswered(new Set());
  };
  return (
    <>
      <LayoutChoice view={view} source={source} proposed={proposal.layout} onTake={take} />
      <OpenQuestions editing={editing} />
      <div class="import-sheet">
        <FirstLines name={view.name} lines={view.firstLines} layout={layout} />
        <section>
          <h2>How it is read</h2>
          <p class="soft said-of">
            {source === null
              ? 'Proposed from the file itself. Correct whatever is wrong.'
              : `By the layout kept for ${source}. What you correct here is kept only if you say so below.`}
          </p>
          <LayoutEditor {...editing} />
        </section>
      </div>
      <section class="section">
        <h2>Columns</h2>
        <LayoutChannels editing={editing} preview={preview} />
      </section>
      <section class="section" aria-live="polite">
        <h2>What the whole file then says</h2>
        {open.length > 0 && (
          <p class="notice amber">
            {count(open.length, 'question')} must be answered first:{' '}
            {listed(open.map(({ key }) => placeName(key, layout)))}.
          </p>
        )}
        {isReading && <Waiting what={`Reading ${view.name} whole`} />}
        {preview && <PreviewView preview={preview} />}
        {problem && (
          <PreviewProblem problem={problem} onMissing={(cell) => onChange(withMissing(layout, cell), 'missing')} />
        )}
      </section>
      <ImportRecord view={view} layout={layout} source={source} isReady={preview !== null && !isReading} />
      <ImportDiscard id={view.id} />
    </>
  );
}
