import type { Now } from '../../server/contract/now.ts';
import { clock, shortDay } from '../words/clock.ts';
import { zone } from '../workshop.ts';
import { RunState } from './run-entry.tsx';

/** Each vessel's last run in one line, and how its last thirty days went. */
export function VesselLines({ vessels }: { vessels: Now['vessels'] }) {
  if (vessels.length === 0) return null;
  return (
    <section>
      <h2>Vessels</h2>
      <ul class="vessels">
        {vessels.map((vessel) => (
          <li key={vessel.name ?? ''}>
            <h3>{vessel.name ?? 'No vessel named'}</h3>
            {vessel.lastRun ? (
              <>
                <p>
                  <RunState line={vessel.lastRun} />
                </p>
                <p>
                  <a href={`/runs/${vessel.lastRun.run}`}>Run {vessel.lastRun.run}</a>, ended{' '}
                  {shortDay(vessel.lastRun.until, zone.value)}, {clock(vessel.lastRun.until, zone.value)}
                </p>
                <p class="soft small">
                  {vessel.recentRuns === 0
                    ? 'No run in the 30 days up to the last run of the shop.'
                    : `${vessel.recentConforming} of ${vessel.recentRuns} conform in the 30 days up to the last run of the shop.`}
                </p>
              </>
            ) : (
              <p class="soft">No run logged yet.</p>
            )}
          </li>
        ))}
      </ul>
    </section>
  );
}
