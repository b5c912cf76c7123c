import type { Now } from '../../server/contract/now.ts';
import { NOW_PATH } from '../../server/contract/paths.ts';
import { usePageTitle } from '../page-title.ts';
import { FirstSteps } from '../parts/first-steps.tsx';
import { Needs } from '../parts/needs.tsx';
import { Notebook, PageHead } from '../parts/notebook.tsx';
import { RunEntry } from '../parts/run-entry.tsx';
import { Shown } from '../parts/shown.tsx';
import { VesselLines } from '../parts/vessel-lines.tsx';
import { useRead } from '../use-read.ts';
import { day, weekday } from '../words/clock.ts';
import { workshop, zone } from '../workshop.ts';

/** The first page of the day: what needs someone, what each vessel did last, the last runs. */
export function NowPage() {
  usePageTitle('Now in the shop');
  const reading = useRead<Now>(NOW_PATH);
  const today = Date.now();
  return (
    <Notebook
      side={reading.value && reading.value.vessels.length > 0 && <VesselLines vessels={reading.value.vessels} />}
      margin={
        <p class="when">
          <b>{day(today, zone.value)}</b> {weekday(today, zone.value)}
        </p>
      }
    >
      <PageHead title="Now in the shop">
        <div class="row">
          <p class="soft">{workshop.value?.name}</p>
          <a class="button primary" href="/import">
            Import a log
          </a>
        </div>
      </PageHead>
      <Shown reading={reading} what="Reading what is in the shop">
        {(now) => <NowBody now={now} />}
      </Shown>
    </Notebook>
  );
}

function NowBody({ now }: { now: Now }) {
  if (now.lastRuns.length === 0 && now.needs.length === 0) return <FirstSteps />;
  return (
    <>
      <OpenRuns lines={now.lastRuns.filter(({ live }) => live !== null)} />
      <Needs needs={now.needs} />
      <section class="section">
        <h2>Last runs</h2>
        <ul class="entries">
          {now.lastRuns
            .filter(({ live }) => live === null)
            .map((line) => (
              <RunEntry key={line.run} line={line} />
            ))}
        </ul>
        <p class="section">
          <a href="/runs">All runs</a>
        </p>
      </section>
    </>
  );
}

/** Runs that are being logged stand before everything else. */
function OpenRuns({ lines }: { lines: Now['lastRuns'] }) {
  if (lines.length === 0) return null;
  return (
    <section>
      <h2>Running now</h2>
      <ul class="entries">
        {lines.map((line) => (
          <RunEntry key={line.run} line={line}>
            <a class="button" href={`/runs/${line.run}`}>
              {line.live === 'ended' ? 'Close its record' : 'Watch it'}
            </a>
          </RunEntry>
        ))}
      </ul>
      <p class="section">
        <a href="/live">All vessels as they are now</a>
      </p>
    </section>
  );
}
