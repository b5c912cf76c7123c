import { useState } from 'preact/hooks';
import { useLocation } from 'preact-iso';
import { type Query, RUNS_PATH, runsPath, VESSELS_PATH, withQuery } from '../../server/contract/paths.ts';
import type { Runs } from '../../server/contract/runs.ts';
import type { Vessels } from '../../server/contract/workshop.ts';
import { readJson } from '../api.ts';
import { usePageTitle } from '../page-title.ts';
import { ChoiceField, TextField } from '../parts/field.tsx';
import { Notebook, PageHead } from '../parts/notebook.tsx';
import { Problem } from '../parts/problem.tsx';
import { RunEntry } from '../parts/run-entry.tsx';
import { Shown } from '../parts/shown.tsx';
import { usePost } from '../use-post.ts';
import { useRead } from '../use-read.ts';
import { count } from '../words/figures.ts';

const WHICH = [
  { value: '', text: 'any outcome' },
  { value: 'verdict=does-not-conform', text: 'does not conform' },
  { value: 'verdict=cannot-tell', text: 'cannot tell' },
  { value: 'verdict=conforms', text: 'conforms' },
  { value: 'state=awaiting-load', text: 'awaits its load' },
  { value: 'state=awaiting-cycle', text: 'awaits its cycle' },
];

/** All runs, latest first; what is looked for stands in the address. */
export function RunsPage() {
  usePageTitle('Runs');
  const { query, route } = useLocation();
  const reading = useRead<Runs>(runsPath(query));
  const vessels = useRead<Vessels>(VESSELS_PATH).value?.vessels ?? [];
  const change = (next: Query) => route(withQuery('/runs', { ...query, ...next }), true);
  const which = query.verdict ? `verdict=${query.verdict}` : query.state ? `state=${query.state}` : '';
  return (
    <Notebook>
      <PageHead title="Runs">
        <div class="row">
          <p class="soft">{reading.value ? count(reading.value.total, 'run') : ''}</p>
          <a class="button primary" href="/import">
            Import a log
          </a>
        </div>
      </PageHead>
      <form class="fields filters" onSubmit={(event) => event.preventDefault()}>
        <ChoiceField
          label="Outcome"
          choices={WHICH}
          value={which}
          onValue={(value) => {
            const [key = '', word = ''] = value.split('=');
            change({ verdict: null, state: null, ...(key ? { [key]: word } : {}) });
          }}
        />
        <ChoiceField
          label="Vessel"
          choices={[{ value: '', text: 'any vessel' }, ...vessels.map(({ name }) => ({ value: name, text: name }))]}
          value={query.vessel ?? ''}
          onValue={(vessel) => change({ vessel })}
        />
        <TextField label="Cycle" value={query.cycle ?? ''} onLeave={(cycle) => change({ cycle: cycle.trim() })} />
        <TextField label="Part" value={query.part ?? ''} onLeave={(part) => change({ part: part.trim() })} />
      </form>
      <Shown reading={reading} what="Reading the runs">
        {(runs) =>
          runs.total === 0 ? (
            <NoRuns isFiltered={Object.keys(query).length > 0} />
          ) : (
            <Lines first={runs} query={query} />
          )
        }
      </Shown>
    </Notebook>
  );
}

function Lines({ first, query }: { first: Runs; query: Query }) {
  const [more, setMore] = useState<{ first: Runs; runs: Runs['runs']; next: number | null } | null>(null);
  const current = more?.first === first ? more : { first, runs: first.runs, next: first.next };
  const adding = usePost(async () => {
    const answer = await readJson<Runs>(withQuery(RUNS_PATH, { ...query, after: current.next }));
    setMore({ first, runs: [...current.runs, ...answer.runs], next: answer.next });
  });
  return (
    <section class="section" aria-label="Runs, latest first">
      <ul class="entries">
        {current.runs.map((line) => (
          <RunEntry key={line.run} line={line} />
        ))}
      </ul>
      {adding.problem && <Problem problem={adding.problem} />}
      {current.next !== null && (
        <p class="section">
          <button type="button" disabled={adding.isUnderWay} onClick={() => void adding.post()}>
            Earlier runs
          </button>
        </p>
      )}
    </section>
  );
}

function NoRuns({ isFiltered }: { isFiltered: boolean }) {
  return isFiltered ? (
    <div class="empty">
      <p>No run on record is like this.</p>
      <p>
        <a href="/runs">Show all runs</a>
      </p>
    </div>
  ) : (
    <div class="empty">
      <h2>No run has been logged yet</h2>
      <p>A run begins with the file its recorder wrote. Import one, say what was in the vessel, and it is judged.</p>
      <a class="button" href="/import">
        Import a log
      </a>
    </div>
  );
}
