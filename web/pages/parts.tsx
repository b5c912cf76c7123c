import { useState } from 'preact/hooks';
import { useLocation } from 'preact-iso';
import type { PartLine, Parts } from '../../server/contract/parts.ts';
import { partsPath, withQuery } from '../../server/contract/paths.ts';
import { usePageTitle } from '../page-title.ts';
import { TextField } from '../parts/field.tsx';
import { Entry, Notebook, PageHead } from '../parts/notebook.tsx';
import { OutcomeMark, VerdictLine } from '../parts/outcome-mark.tsx';
import { Shown } from '../parts/shown.tsx';
import { When } from '../parts/when.tsx';
import { useRead } from '../use-read.ts';
import { count } from '../words/figures.ts';

/** Parts on record, found by serial, title or drawing. */
export function PartsPage() {
  usePageTitle('Parts');
  const { query, route } = useLocation();
  const q = query.q ?? '';
  const [typed, setTyped] = useState(q);
  const reading = useRead<Parts>(partsPath({ q }));
  const look = (event: Event) => {
    event.preventDefault();
    route(withQuery('/parts', { q: typed.trim() }), true);
  };
  return (
    <Notebook>
      <PageHead title="Parts">
        <p class="soft">{reading.value ? `${count(reading.value.total, 'part')}${q ? ` like “${q}”` : ''}` : ''}</p>
        <p>
          <a href="/tools">Tools they are made on</a> · <a href="/parts/import">Parts from a table</a>
        </p>
      </PageHead>
      <form class="row filters" onSubmit={look}>
        <TextField label="Serial, title or drawing" type="search" value={typed} onValue={setTyped} />
        <button type="submit">Look</button>
      </form>
      <Shown reading={reading} what="Reading the parts">
        {(parts) =>
          parts.parts.length === 0 ? (
            <NoParts q={q} />
          ) : (
            <section class="section" aria-label="Parts">
              <ul class="entries">
                {parts.parts.map((part) => (
                  <PartEntry key={part.serial} part={part} />
                ))}
              </ul>
              {parts.parts.length < parts.total && (
                <p class="section soft">
                  The first {parts.parts.length} of {parts.total} are shown. Type more of the serial to see the others.
                </p>
              )}
            </section>
          )
        }
      </Shown>
    </Notebook>
  );
}

function PartEntry({ part }: { part: PartLine }) {
  return (
    <Entry when={part.lastRunAt && <When at={part.lastRunAt} />}>
      <div class="head">
        <a href={`/parts/${encodeURIComponent(part.serial)}`}>{part.serial}</a>
        {part.verdict ? <VerdictLine verdict={part.verdict} /> : <span class="soft">not judged yet</span>}
        {part.failedTest && (
          <span class="outcome-line outcome-not-met">
            <OutcomeMark mark="not-met" />
            Failed a test
          </span>
        )}
      </div>
      <p class="soft">
        {[
          part.title,
          part.drawing,
          part.quantity > 1 ? `${part.quantity} pieces` : '',
          part.runs.length === 0
            ? 'no run on record'
            : `${part.runs.length === 1 ? 'run' : 'runs'} ${part.runs.join(', ')}`,
        ]
          .filter(Boolean)
          .join(' · ')}
      </p>
    </Entry>
  );
}

function NoParts({ q }: { q: string }) {
  return q ? (
    <div class="empty">
      <p>No part on record carries “{q}” in its serial, title or drawing.</p>
      <p>
        <a href="/parts">Show all parts</a>
      </p>
    </div>
  ) : (
    <div class="empty">
      <h2>No part is on record yet</h2>
      <p>
        A part comes on record when the load of a run names it, or when its lay-up is written down. Import a log, then
        say what was in the vessel.
      </p>
      <a class="button" href="/import">
        Import a log
      </a>
    </div>
  );
}
