import { RESINS_PATH } from '../../server/contract/paths.ts';
import type { Resins } from '../../server/contract/resins.ts';
import { usePageTitle } from '../page-title.ts';
import { Entry, Notebook, PageHead } from '../parts/notebook.tsx';
import { ResinImport } from '../parts/resin-import.tsx';
import { ResinStanding } from '../parts/resin-status-tag.tsx';
import { Shown } from '../parts/shown.tsx';
import { When } from '../parts/when.tsx';
import { useRead } from '../use-read.ts';
import { listed } from '../words/figures.ts';

/** Resin sets: the models that degree of cure and Tg are estimated with. */
export function ResinsPage() {
  usePageTitle('Resins');
  const reading = useRead<Resins>(RESINS_PATH);
  return (
    <Notebook>
      <PageHead title="Resins">
        <p class="soft">
          One set is one study’s parameters, never mixed with another’s. What is worked out with a set is an estimate,
          and every page says so.
        </p>
      </PageHead>
      <Shown reading={reading} what="Reading the resins">
        {({ resins }) =>
          resins.length === 0 ? (
            <div class="empty">
              <h2>No resin set is on record yet</h2>
              <p>Runs are judged without one; only degree of cure and Tg are then not estimated.</p>
            </div>
          ) : (
            <ul class="entries">
              {resins.map((resin) => (
                <Entry key={resin.code} when={<When at={resin.imported.at} />}>
                  <div class="head">
                    <a href={`/resins/${encodeURIComponent(resin.code)}`}>{resin.code}</a>
                  </div>
                  <p>{resin.name}</p>
                  <ResinStanding status={resin.status} />
                  <p class="soft">
                    {resin.citation}
                    {resin.cycles.length > 0 &&
                      ` · used by ${listed(resin.cycles.map((c) => `${c.code} issue ${c.issue}`))}`}
                  </p>
                </Entry>
              ))}
            </ul>
          )
        }
      </Shown>
      <ResinImport onKept={reading.again} />
    </Notebook>
  );
}
