import { useRoute } from 'preact-iso';
import type { ItemView } from '../../server/contract/materials.ts';
import { itemPath } from '../../server/contract/paths.ts';
import { usePageTitle } from '../page-title.ts';
import { ItemActs } from '../parts/item-acts.tsx';
import { ItemEntry } from '../parts/item-entry.tsx';
import { ItemExtras } from '../parts/item-extras.tsx';
import { ItemLedger } from '../parts/item-ledger.tsx';
import { LabelLink } from '../parts/label-link.tsx';
import { LifeLines, LifeMark } from '../parts/life-lines.tsx';
import { Entry, Notebook, PageHead } from '../parts/notebook.tsx';
import { Shown } from '../parts/shown.tsx';
import { When } from '../parts/when.tsx';
import { useRead } from '../use-read.ts';
import { asWritten } from '../words/figures.ts';
import { dueWords, itemPage, placeWords } from '../words/materials.ts';
import { zone } from '../workshop.ts';

/** A roll or kit: where it is, what is left of it, its ledger, and what was made of it. */
export default function RollPage() {
  const { params, path } = useRoute();
  const item = params.item ?? '';
  const reading = useRead<ItemView>(itemPath(item));
  const view = reading.value;
  const isKit = view === null ? path.startsWith('/kits') : view.kind === 'kit';
  const kind = isKit ? 'Kit' : 'Roll';
  usePageTitle(`${kind} ${item}`);
  return (
    <Notebook>
      <PageHead title={`${kind} ${item}`}>
        {view && <About view={view} />}
        {view && <LabelLink kind={view.kind} code={item} />}
      </PageHead>
      <Shown reading={reading} what="Reading the ledger">
        {(found) => <Body key={found.item} view={found} again={reading.again} />}
      </Shown>
    </Notebook>
  );
}

function About({ view }: { view: ItemView }) {
  const { state, material, cutFrom, batch, lengthM, lengthLeftM } = view;
  return (
    <>
      {state ? (
        <div class="row">
          <LifeMark outcome={state.outcome} />
          <span>
            {placeWords(state, zone.value)} {dueWords(state, zone.value)}
          </span>
        </div>
      ) : (
        <p>Every line of it was taken back.</p>
      )}
      <p class="soft">
        {material && (
          <>
            <a href={`/materials/${encodeURIComponent(material.code)}`}>{material.name}</a>, issue {material.issue}
          </>
        )}
        {batch && ` · batch ${batch}`}
        {cutFrom && (
          <>
            {' · cut from '}
            <a href={itemPage({ item: cutFrom, kind: 'roll' })}>{cutFrom}</a>
          </>
        )}
        {lengthM !== null && ` · ${asWritten(lengthLeftM ?? lengthM)} of ${asWritten(lengthM, 'm')} not cut off yet`}
      </p>
    </>
  );
}

function Body({ view, again }: { view: ItemView; again: () => void }) {
  const isGone = view.state === null || view.state.place === 'scrapped';
  return (
    <>
      {view.state && <LifeLines state={view.state} />}
      {!isGone && <ItemActs view={view} onDone={again} />}
      <ItemLedger view={view} onDone={again} />
      <section class="section">
        <h2>Cut from it</h2>
        {view.children.length === 0 ? (
          <p class="soft">No kit yet.</p>
        ) : (
          <ul class="entries">
            {view.children.map((line) => (
              <ItemEntry key={line.item} line={line} />
            ))}
          </ul>
        )}
      </section>
      <section class="section">
        <h2>Laid up from it</h2>
        {view.parts.length === 0 ? (
          <p class="soft">No part on record.</p>
        ) : (
          <ul class="entries">
            {view.parts.map(({ part, plies, laidUpFrom }) => (
              <Entry key={part + laidUpFrom} when={laidUpFrom && <When at={laidUpFrom} />}>
                <div class="head">
                  <a href={`/parts/${encodeURIComponent(part)}`}>{part}</a>
                  <span class="soft">
                    {[plies !== null && `${plies} plies`, laidUpFrom === null && 'when is not on record']
                      .filter(Boolean)
                      .join(' · ')}
                  </span>
                </div>
              </Entry>
            ))}
          </ul>
        )}
      </section>
      {!isGone && <ItemExtras view={view} onDone={again} />}
    </>
  );
}
