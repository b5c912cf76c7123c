import { useEffect } from 'preact/hooks';
import { useLocation } from 'preact-iso';
import type { Found } from '../../server/contract/find.ts';
import { findPath } from '../../server/contract/paths.ts';
import { usePageTitle } from '../page-title.ts';
import { Entry, Notebook, PageHead } from '../parts/notebook.tsx';
import { Shown } from '../parts/shown.tsx';
import { useRead } from '../use-read.ts';

/** Where a scanned or typed code leads; one exact hit is gone to at once. */
export function FindPage() {
  const { query, route } = useLocation();
  const code = query.code?.trim() ?? '';
  const reading = useRead<Found>(code === '' ? null : findPath(code));
  usePageTitle(`Find ${code}`);
  const exact = reading.value?.hits.filter((hit) => hit.exact) ?? [];
  const only = exact.length === 1 ? exact[0] : undefined;
  useEffect(() => {
    if (only) route(only.page, true);
  }, [only]);
  return (
    <Notebook>
      <PageHead title={code === '' ? 'Find' : `Found for “${code}”`} />
      {code === '' ? (
        <p>Scan or type a code in the box above: a run’s number, a part, a work order, a cycle, a file’s name.</p>
      ) : (
        <Shown reading={reading} what={`Looking for ${code}`}>
          {(found) => <Hits found={found} />}
        </Shown>
      )}
    </Notebook>
  );
}

function Hits({ found }: { found: Found }) {
  if (found.hits.length === 0) {
    return (
      <div class="empty">
        <p>Nothing on record carries this code or contains it.</p>
        <p>
          Look through <a href="/runs">runs</a>, <a href="/parts">parts</a> or <a href="/cycles">cycles</a>, or check
          the code: 0 and O, 1 and l are easily mistaken.
        </p>
      </div>
    );
  }
  return (
    <ul class="entries">
      {found.hits.map((hit) => (
        <Entry key={hit.page + hit.kind} when={hit.kind.replace('-', ' ')}>
          <div class="head">
            <a href={hit.page}>{hit.title}</a>
            {hit.exact && <span class="soft">exactly this code</span>}
          </div>
        </Entry>
      ))}
    </ul>
  );
}
