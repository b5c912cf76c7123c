import type { LoadPart } from '../../models/run/load.ts';
import type { RunView } from '../../server/contract/runs.ts';
import { dayAndClock } from '../words/clock.ts';
import { asWritten, listed } from '../words/figures.ts';
import { zone } from '../workshop.ts';

/** Who was where in the run, as it was said. */
export function RunLoad({ run }: { run: RunView }) {
  if (!run.load) return null;
  const { load } = run;
  const sensorsOf = (part: string) => load.sensors.filter((sensor) => sensor.parts?.includes(part));
  const cycle = run.cycleIssue;
  return (
    <section class="section">
      <h2>Load</h2>
      <p>
        {[
          load.workOrder && `Work order ${load.workOrder}`,
          run.vessel,
          load.barometer ? `barometer ${load.barometer}` : 'no barometer reading',
        ]
          .filter(Boolean)
          .join(' · ')}
        {cycle && (
          <>
            {' · cured to '}
            <a href={`/cycles/${encodeURIComponent(cycle.code)}/${encodeURIComponent(cycle.issue)}`}>
              {cycle.code} issue {cycle.issue}
            </a>
          </>
        )}
      </p>
      <ul class="entries section">
        {load.parts.map((part) => (
          <li class="entry" key={part.part}>
            <div class="head">
              <a href={`/parts/${encodeURIComponent(part.part)}`}>{part.part}</a>
              <span class="soft">{aboutPart(part)}</span>
            </div>
            <p>
              {sensorsOf(part.part).length > 0
                ? `On it: ${listed(sensorsOf(part.part).map(({ channel, place }) => (place ? `${channel} (${place})` : channel)))}.`
                : 'No thermocouple of its own.'}
            </p>
          </li>
        ))}
      </ul>
      <p class="section small soft">
        {run.loadSet && `Set by ${run.loadSet.by}, ${dayAndClock(run.loadSet.at, zone.value)}. `}
        <a class="no-print" href={`/runs/${run.run}/load`}>
          Set the load again
        </a>
      </p>
    </section>
  );
}

function aboutPart(part: LoadPart): string {
  const leak = part.leakTest;
  return [
    part.quantity && part.quantity > 1 && `${part.quantity} pieces`,
    part.bagLine && `bag line ${part.bagLine}`,
    part.startDegree !== undefined && `degree of cure at the start ${asWritten(part.startDegree)}`,
    part.humidity !== undefined && `laid up at ${asWritten(part.humidity, '%')} relative humidity`,
    leak && `leak test ${asWritten(leak.start)} to ${asWritten(leak.end)} in ${asWritten(leak.minutes, 'min')}`,
  ]
    .filter(Boolean)
    .join(' · ');
}
