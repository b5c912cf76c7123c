import { useRoute } from 'preact-iso';
import type { Layup, LayupView } from '../../server/contract/layups.ts';
import { partLayupPath } from '../../server/contract/paths.ts';
import { usePageTitle } from '../page-title.ts';
import { LayupFacts } from '../parts/layup-facts.tsx';
import { LayupFormView } from '../parts/layup-form.tsx';
import { Entry, Notebook, PageHead } from '../parts/notebook.tsx';
import { Shown } from '../parts/shown.tsx';
import { When } from '../parts/when.tsx';
import { useRead } from '../use-read.ts';

/** Writes down how a part was laid up; the part may not be on record yet. */
export default function LayupPage() {
  const { params } = useRoute();
  const serial = params.serial ?? '';
  usePageTitle(`Lay-up of ${serial}`);
  const reading = useRead<LayupView>(partLayupPath(serial));
  return (
    <Notebook>
      <PageHead
        title={
          reading.value?.known === false ? (
            `Lay-up of ${serial}`
          ) : (
            <>
              Lay-up of <a href={`/parts/${encodeURIComponent(serial)}`}>{serial}</a>
            </>
          )
        }
      >
        <p class="soft">
          {reading.value?.known === false
            ? 'This part is not on record yet; keeping its lay-up makes it.'
            : 'Nothing here is required: what is left empty is named as missing on the part’s page.'}
        </p>
      </PageHead>
      <Shown reading={reading} what="Reading the lay-up">
        {(view) => (
          <>
            <LayupFormView key={view.serial} view={view} />
            {view.layup && <Earlier layups={[view.layup, ...view.earlier]} />}
          </>
        )}
      </Shown>
    </Notebook>
  );
}

function Earlier({ layups }: { layups: readonly Layup[] }) {
  return (
    <section class="section">
      <h2>As it was written down</h2>
      <ul class="entries">
        {layups.map((layup) => (
          <Entry key={layup.deed.at} when={<When at={layup.deed.at} />}>
            <p class="soft">
              by {layup.deed.by}
              {layup.reason ? `: ${layup.reason}` : ''}
            </p>
            <LayupFacts layup={layup} />
          </Entry>
        ))}
      </ul>
    </section>
  );
}
