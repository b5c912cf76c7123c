import { useState } from 'preact/hooks';
import { useLocation } from 'preact-iso';
import type { Cycle } from '../../models/cycle/cycle.ts';
import { parseCycle } from '../../models/cycle/parse-cycle.ts';
import { DomainError } from '../../models/errors.ts';
import type { CycleView } from '../../server/contract/cycles.ts';
import { CYCLES_PATH } from '../../server/contract/paths.ts';
import { postJson } from '../api.ts';
import { CyclePicture } from '../charts/cycle-picture.tsx';
import { useKeptForm } from '../kept-form.ts';
import { usePageTitle } from '../page-title.ts';
import { CycleWordsView } from '../parts/cycle-words.tsx';
import { AreaField } from '../parts/field.tsx';
import { FileButton } from '../parts/file-button.tsx';
import { Notebook, PageHead } from '../parts/notebook.tsx';
import { Problem } from '../parts/problem.tsx';
import { usePost } from '../use-post.ts';
import { readWorkshop } from '../workshop.ts';

/** Brings in a cycle document; its picture and its words stand below it before anything is kept. */
export default function CycleImportPage() {
  usePageTitle('Bring in a cycle');
  const { route } = useLocation();
  const [text, setText, { clear }] = useKeptForm('cycle-document', '');
  const [lit, setLit] = useState<string | null>(null);
  const read = readCycle(text);
  const saving = usePost(async (document: Cycle) => {
    const kept = await postJson<CycleView>(CYCLES_PATH, { document });
    clear();
    await readWorkshop();
    route(`/cycles/${encodeURIComponent(kept.code)}/${encodeURIComponent(kept.issue)}`);
  });
  const change = (next: string) => {
    saving.forget();
    setText(next);
  };
  return (
    <Notebook>
      <PageHead title="Bring in a cycle">
        <p class="soft">
          A document of the form dwellbook-cycle/1. It is read as you type; nothing is kept until you say so, and it is
          a draft until it is released.
        </p>
      </PageHead>
      <form
        class="stack"
        onSubmit={(event) => {
          event.preventDefault();
          if (read.cycle) void saving.post(read.cycle);
        }}
      >
        <FileButton
          label="Choose a document"
          accept=".json,application/json"
          onFile={async (file) => change(await file.text())}
        />
        <AreaField
          label="Cycle document"
          class="document-text"
          rows={14}
          value={text}
          wrong={text.trim() === '' ? null : read.refusal}
          onValue={change}
        />
        {saving.problem && <Problem problem={saving.problem} kept="The document is kept on this page." />}
        <button type="submit" class="primary" disabled={!read.cycle || saving.isUnderWay}>
          {read.cycle ? `Keep ${read.cycle.code} issue ${read.cycle.issue} as a draft` : 'Keep as a draft'}
        </button>
      </form>
      {read.cycle && (
        <section class="section" aria-label="The cycle as it was read">
          <h2>{read.cycle.title}</h2>
          <div class="cycle-sheet">
            <div class="drawn">
              <CyclePicture cycle={read.cycle} lit={lit} />
            </div>
            <CycleWordsView cycle={read.cycle} onLight={setLit} />
          </div>
        </section>
      )}
    </Notebook>
  );
}

function readCycle(text: string): { cycle: Cycle | null; refusal: string | null } {
  try {
    return { cycle: parseCycle(JSON.parse(text)), refusal: null };
  } catch (error) {
    if (error instanceof DomainError) return { cycle: null, refusal: error.message };
    if (error instanceof SyntaxError) return { cycle: null, refusal: `This is not JSON yet: ${error.message}` };
    throw error;
  }
}
