import { useRoute } from 'preact-iso';
import { wordsOfMaterial } from '../../models/material/words-of-material.ts';
import type { MaterialView } from '../../server/contract/materials.ts';
import { materialPath } from '../../server/contract/paths.ts';
import { usePageTitle } from '../page-title.ts';
import { ItemEntry } from '../parts/item-entry.tsx';
import { Entry, Notebook, PageHead } from '../parts/notebook.tsx';
import { Shown } from '../parts/shown.tsx';
import { When } from '../parts/when.tsx';
import { useRead } from '../use-read.ts';

/** A material: its rules in words, its batches, and what is here of it. */
export default function MaterialPage() {
  const { params } = useRoute();
  const code = params.code ?? '';
  usePageTitle(`Material ${code}`);
  const reading = useRead<MaterialView>(materialPath(code));
  const view = reading.value;
  return (
    <Notebook>
      <PageHead title={view?.name ?? code}>
        {view && (
          <p class="soft">
            {[`${view.code} issue ${view.issue}`, view.document.form, view.document.maker].filter(Boolean).join(' · ')}
          </p>
        )}
      </PageHead>
      <Shown reading={reading} what="Reading the material">
        {(found) => <Body view={found} />}
      </Shown>
    </Notebook>
  );
}

function Body({ view }: { view: MaterialView }) {
  const { rules, defaults } = wordsOfMaterial(view.document);
  const { origin } = view.document;
  return (
    <>
      <section>
        <h2>What counts</h2>
        <ul>
          {rules.map((rule) => (
            <li key={rule}>{rule}</li>
          ))}
        </ul>
      </section>
      {defaults.length > 0 && (
        <section class="section">
          <h2>Not written, and taken so</h2>
          <ul>
            {defaults.map((rule) => (
              <li key={rule}>{rule}</li>
            ))}
          </ul>
        </section>
      )}
      <section class="section">
        <h2>Here of it</h2>
        {view.items.length === 0 ? (
          <p class="soft">No roll and no kit.</p>
        ) : (
          <ul class="entries">
            {view.items.map((line) => (
              <ItemEntry key={line.item} line={line} />
            ))}
          </ul>
        )}
      </section>
      <section class="section">
        <h2>Batches</h2>
        {view.batches.length === 0 ? (
          <p class="soft">None on record.</p>
        ) : (
          <ul class="entries">
            {view.batches.map((batch) => (
              <Entry key={batch.batch} when={<When at={batch.recorded.at} />}>
                <div class="head">
                  <h3>{batch.batch}</h3>
                  <span class="soft">issue {batch.material.issue}</span>
                </div>
                <p>
                  {batch.made ? `Made ${batch.made}` : 'Day of manufacture not on record'}
                  {batch.expires ? `; the maker’s last day ${batch.expires}` : ''}
                  {batch.certificate ? `; certificate ${batch.certificate}` : '; no certificate on record'}.
                </p>
                <p class="soft">Rolls: {batch.rolls.join(', ') || 'none'}</p>
              </Entry>
            ))}
          </ul>
        )}
      </section>
      <section class="section">
        <h2>Where it comes from</h2>
        <p>
          {origin
            ? `${origin.document} issue ${origin.issue}${origin.clause ? `, clause ${origin.clause}` : ''}.`
            : 'No governing document is named.'}
        </p>
        <p class="soft small breakable">SHA-256 {view.sha256}</p>
        {view.issues.length > 0 && (
          <p class="soft">Earlier issues: {view.issues.map(({ issue }) => issue).join(', ')}.</p>
        )}
      </section>
    </>
  );
}
