import type { Materials } from '../../server/contract/materials.ts';
import { MATERIALS_PATH } from '../../server/contract/paths.ts';
import { usePageTitle } from '../page-title.ts';
import { ItemEntry } from '../parts/item-entry.tsx';
import { MaterialForms } from '../parts/material-forms.tsx';
import { Entry, Notebook, PageHead } from '../parts/notebook.tsx';
import { Shown } from '../parts/shown.tsx';
import { When } from '../parts/when.tsx';
import { useRead } from '../use-read.ts';

/** Rolls and kits in life, what is due first; the materials they are of. */
export default function MaterialsPage() {
  usePageTitle('Materials');
  const reading = useRead<Materials>(MATERIALS_PATH);
  return (
    <Notebook>
      <PageHead title="Materials">
        <p class="soft">
          What is in life and what is due, the soonest first. The margin says when the first of its lives ends if it
          stays where it is.
        </p>
        <p class="no-print">
          <a href="/rolls/import">Rolls from a table</a>
        </p>
      </PageHead>
      <Shown reading={reading} what="Reading the materials">
        {(view) => (
          <>
            <Due view={view} />
            <MaterialForms view={view} onDone={reading.again} />
            <Products view={view} />
          </>
        )}
      </Shown>
    </Notebook>
  );
}

function Due({ view }: { view: Materials }) {
  if (view.items.length === 0) {
    return (
      <div class="empty">
        <h2>No roll is on record yet</h2>
        <p>
          First bring in the material’s document: its lives and what counts against them. Then record the maker’s batch,
          then each roll as it comes in. From there on a tap tells where it is, and each part is judged by its age.
        </p>
      </div>
    );
  }
  return (
    <section>
      <ul class="entries">
        {view.items.map((line) => (
          <ItemEntry key={line.item} line={line} />
        ))}
      </ul>
      {view.done > 0 && (
        <p class="soft small">
          {view.done === 1 ? 'One more is' : `${view.done} more are`} scrapped or laid up; any is found by its code.
        </p>
      )}
    </section>
  );
}

function Products({ view }: { view: Materials }) {
  if (view.materials.length === 0) return null;
  return (
    <section class="section">
      <h2>Materials</h2>
      <ul class="entries">
        {view.materials.map((material) => (
          <Entry key={material.code} when={<When at={material.imported.at} />}>
            <div class="head">
              <a href={`/materials/${encodeURIComponent(material.code)}`}>{material.name}</a>
              <span class="soft">
                {material.code} issue {material.issue}
              </span>
            </div>
          </Entry>
        ))}
      </ul>
    </section>
  );
}
