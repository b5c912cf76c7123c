import { useState } from 'preact/hooks';
import { useRoute } from 'preact-iso';
import type { LiveVessel, Sources } from '../../server/contract/live.ts';
import { vesselSourcesPath } from '../../server/contract/paths.ts';
import { usePageTitle } from '../page-title.ts';
import { Advisory } from '../parts/advisory.tsx';
import { isNewsOld, LineState } from '../parts/line-state.tsx';
import { LiveReadings } from '../parts/live-readings.tsx';
import { PageHead } from '../parts/notebook.tsx';
import { SenderKeys } from '../parts/sender-keys.tsx';
import { Shown } from '../parts/shown.tsx';
import { SourceEntry } from '../parts/source-entry.tsx';
import { SourceFormView } from '../parts/source-form.tsx';
import { VesselSurveys } from '../parts/vessel-surveys.tsx';
import { WarningStrip } from '../parts/warning-strip.tsx';
import { useLiveVessels } from '../use-live-vessels.ts';
import { useNow } from '../use-now.ts';
import { useRead } from '../use-read.ts';
import { NEW_SOURCE } from '../words/source-form.ts';

/** A vessel: what it does now, what sends its readings and how that is set up, and whose keys may push. */
export default function VesselPage() {
  const { params } = useRoute();
  const name = params.vessel ?? '';
  usePageTitle(name);
  const heard = useLiveVessels();
  const browserMs = useNow();
  const vessel = heard.value?.vessels.find((one) => one.vessel === name);
  const nowMs = heard.value ? Date.parse(heard.value.at) + Math.max(0, browserMs - heard.heardMs) : browserMs;
  const readings = {
    readings: vessel?.readings ?? [],
    nowMs,
    isOld: isNewsOld(heard.isHeard, heard.heardMs, browserMs),
  };
  return (
    <div class="live vessel-page">
      <PageHead title={name}>
        <div class="row">
          <p class="soft">{vessel?.kind.replaceAll('-', ' ')}</p>
          {vessel && <Door vessel={vessel} />}
        </div>
        <Advisory />
      </PageHead>
      <LineState isHeard={heard.isHeard} heardMs={heard.heardMs} nowMs={browserMs} />
      {vessel && <WarningStrip warnings={vessel.warnings} />}
      {vessel && vessel.readings.length > 0 && <LiveReadings telling={readings} />}
      <SourcesOfVessel key={name} vessel={name} />
      <VesselSurveys key={`surveys ${name}`} vessel={name} />
      <SenderKeys key={`keys ${name}`} vessel={name} />
    </div>
  );
}

/** The one thing to do at the door: watch the open run, or begin one. */
function Door({ vessel }: { vessel: LiveVessel }) {
  if (vessel.run) {
    return (
      <a class="button primary" href={`/runs/${vessel.run.run}`}>
        To run {vessel.run.run}: {vessel.run.says}
      </a>
    );
  }
  return (
    <a class="button primary" href={`/vessels/${encodeURIComponent(vessel.vessel)}/begin`}>
      Begin a run
    </a>
  );
}

function SourcesOfVessel({ vessel }: { vessel: string }) {
  const reading = useRead<Sources>(vesselSourcesPath(vessel));
  const [isAdding, setIsAdding] = useState(false);
  return (
    <section class="section">
      <h2>What sends its readings</h2>
      <Shown reading={reading} what="Reading the sources">
        {({ sources }) => (
          <>
            {sources.length === 0 && (
              <p>
                Nothing yet. A source is listened to from the moment it is saved, and what it sends is kept for days,
                whether a run is open or not.
              </p>
            )}
            <ul class="entries section">
              {sources.map((line) => (
                <SourceEntry key={line.id} line={line} onChanged={reading.again} />
              ))}
            </ul>
          </>
        )}
      </Shown>
      <div class="section">
        {isAdding ? (
          <SourceFormView
            vessel={vessel}
            start={NEW_SOURCE}
            path={vesselSourcesPath(vessel)}
            onSaved={() => {
              setIsAdding(false);
              reading.again();
            }}
          />
        ) : (
          <button type="button" onClick={() => setIsAdding(true)}>
            Add a source
          </button>
        )}
      </div>
    </section>
  );
}
