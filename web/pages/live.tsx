import type { LiveVessels } from '../../server/contract/live.ts';
import { usePageTitle } from '../page-title.ts';
import { Advisory } from '../parts/advisory.tsx';
import { isNewsOld, LineState } from '../parts/line-state.tsx';
import { PageHead } from '../parts/notebook.tsx';
import { Problem } from '../parts/problem.tsx';
import { VesselBlock } from '../parts/vessel-block.tsx';
import { Waiting } from '../parts/waiting.tsx';
import { type Heard, useLiveVessels } from '../use-live-vessels.ts';
import { useNow } from '../use-now.ts';
import { clockWithSeconds } from '../words/clock.ts';
import { zone } from '../workshop.ts';

/** All vessels at once, to be read from across the shop. */
export default function LivePage() {
  usePageTitle('All vessels');
  const heard = useLiveVessels();
  return (
    <div class="live">
      <PageHead title="All vessels">
        <Advisory />
      </PageHead>
      {heard.problem && !heard.value && <Problem problem={heard.problem} />}
      {!heard.value && !heard.problem && <Waiting what="Reading the vessels" />}
      {heard.value && <Vessels heard={heard} live={heard.value} />}
    </div>
  );
}

function Vessels({ heard, live }: { heard: Heard<LiveVessels>; live: LiveVessels }) {
  const browserMs = useNow();
  const { isHeard, heardMs } = heard;
  // The server's clock, told on by the browser's: ages must not hang on the tablet's own time.
  const nowMs = Date.parse(live.at) + Math.max(0, browserMs - heardMs);
  const isOld = isNewsOld(isHeard, heardMs, browserMs);
  if (live.vessels.length === 0) {
    return (
      <div class="empty">
        <h2>No vessel is on record yet</h2>
        <p>Add the ovens and autoclaves of the shop; then say what sends their readings.</p>
        <a class="button" href="/workshop">
          Add a vessel
        </a>
      </div>
    );
  }
  return (
    <>
      <LineState isHeard={isHeard} heardMs={heardMs} nowMs={browserMs} />
      <p class="soft" aria-hidden="true">
        {clockWithSeconds(nowMs, zone.value)}
      </p>
      <ul class="vessel-blocks">
        {openFirst(live).map((vessel) => (
          <VesselBlock key={vessel.vessel} vessel={vessel} nowMs={nowMs} isOld={isOld} />
        ))}
      </ul>
    </>
  );
}

function openFirst({ vessels }: LiveVessels): LiveVessels['vessels'] {
  return vessels.toSorted((a, b) => Number(b.run !== null) - Number(a.run !== null));
}
