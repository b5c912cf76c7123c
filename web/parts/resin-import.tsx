import { useLocation } from 'preact-iso';
import { RESINS_PATH } from '../../server/contract/paths.ts';
import type { ResinView } from '../../server/contract/resins.ts';
import { postJson } from '../api.ts';
import { ProblemError } from '../problem-error.ts';
import { usePost } from '../use-post.ts';
import { readWorkshop } from '../workshop.ts';
import { FileButton } from './file-button.tsx';
import { Problem } from './problem.tsx';

/** Brings in a resin document from a file; what is wrong in it is named by its key. */
export function ResinImport({ onKept }: { onKept: () => void }) {
  const { route } = useLocation();
  const saving = usePost(async (file: File) => {
    const kept = await postJson<ResinView>(RESINS_PATH, { document: parseJson(await file.text(), file.name) });
    onKept();
    await readWorkshop();
    route(`/resins/${encodeURIComponent(kept.code)}`);
  });
  return (
    <section class="section stack">
      <h2>Bring in a resin set</h2>
      <p>A document of the form dwellbook-resin/1, with the source its figures were read in.</p>
      <FileButton
        label="Choose a document"
        accept=".json,application/json"
        isUnderWay={saving.isUnderWay}
        onFile={async (file) => {
          await saving.post(file);
        }}
      />
      {saving.problem && <Problem problem={saving.problem} />}
    </section>
  );
}

function parseJson(text: string, name: string): unknown {
  try {
    return JSON.parse(text);
  } catch (cause) {
    const detail = `${name}: ${cause instanceof Error ? cause.message : 'it cannot be parsed'}`;
    throw new ProblemError({ code: 'document-not-json', status: 0, title: 'This is not JSON', detail, cause });
  }
}
