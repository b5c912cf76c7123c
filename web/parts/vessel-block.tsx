import type { Verdict } from '../../models/evaluation/evaluation.ts';
import { celsiusFrom, isTemperatureUnit } from '../../models/units.ts';
import type { LiveReading, LiveVessel } from '../../server/contract/live.ts';
import { clock } from '../words/clock.ts';
import { listed } from '../words/figures.ts';
import { SOURCE_STATE_WORDS, temperatureWords } from '../words/live.ts';
import { shownUnits, zone } from '../workshop.ts';
import { LiveFigure } from './live-figure.tsx';
import { VerdictLine } from './outcome-mark.tsx';
import { WarningMark } from './warning-mark.tsx';
import { WARNING_WORDS } from './warning-strip.tsx';

/** One vessel as it is read across the shop. */
export function VesselBlock({ vessel, nowMs, isOld }: { vessel: LiveVessel; nowMs: number; isOld: boolean }) {
  const { run } = vessel;
  const [hottest, coldest] = extremesOf(vessel);
  const open = vessel.warnings.filter(({ acknowledged }) => acknowledged === null);
  const quiet = vessel.sources.filter(({ state }) => state !== 'sending' && state !== 'resting');
  return (
    <li class="vessel-block" data-open={run ? 'yes' : 'no'}>
      <div class="head">
        <h2>
          <a href={run ? `/runs/${run.run}` : `/vessels/${encodeURIComponent(vessel.vessel)}`}>{vessel.vessel}</a>
        </h2>
        {run && (
          <p class="state">
            {run.verdict === null ? 'Not judged yet' : <VerdictLine verdict={run.verdict as Verdict} />}
          </p>
        )}
      </div>
      <p class="says">{run ? run.says : 'No run is open'}</p>
      {vessel.sources.length === 0 ? (
        <p class="soft">Nothing sends readings of it yet.</p>
      ) : (
        <dl class="live-figures">
          <Extreme name="hottest" reading={hottest} nowMs={nowMs} isOld={isOld} />
          <Extreme name="coldest" reading={coldest} nowMs={nowMs} isOld={isOld} />
        </dl>
      )}
      {quiet.map((source) => (
        <p class="quiet-source" key={source.id}>
          {source.name}: {SOURCE_STATE_WORDS[source.state]} since {clock(source.since, zone.value)}
        </p>
      ))}
      {open.slice(0, 2).map((warning) => (
        <p class="warned" key={warning.id}>
          <span class="warned-mark">
            <WarningMark kind={warning.kind} />
          </span>
          <span>
            <b>{WARNING_WORDS[warning.kind]}</b> {warning.subject}
          </span>
        </p>
      ))}
      {open.length > 2 && <p class="soft">and {open.length - 2} more warnings</p>}
      {run && (
        <p class="soft small">
          Run {run.run}
          {run.cycle && ` · ${run.cycle.code} issue ${run.cycle.issue}`}
          {run.parts.length > 0 && ` · ${listed(run.parts.slice(0, 3))}${run.parts.length > 3 ? ' …' : ''}`}
          {run.state === 'ended' && ' · ended, not closed yet'}
        </p>
      )}
    </li>
  );
}

interface Extreme {
  readonly channel: string;
  readonly valueC: number;
  readonly reading: LiveReading | null;
}

function Extreme({
  name,
  reading: extreme,
  nowMs,
  isOld,
}: {
  name: string;
  reading: Extreme | null;
  nowMs: number;
  isOld: boolean;
}) {
  const at = extreme?.reading?.at ?? null;
  return (
    <LiveFigure
      large
      name={extreme ? `${name}, ${extreme.channel}` : name}
      text={extreme ? temperatureWords(extreme.valueC, shownUnits.value.temperature) : '–'}
      ageMs={at === null ? null : nowMs - Date.parse(at)}
      isStale={extreme !== null && (isOld || extreme.reading?.isStale === true)}
    />
  );
}

/** Hottest and coldest: of the run as it is judged, else of every thermocouple that is read. */
function extremesOf({ run, readings }: LiveVessel): readonly [Extreme | null, Extreme | null] {
  const readingOf = (channel: string) => readings.find((one) => one.channel === channel) ?? null;
  if (run?.hottest && run.coldest) {
    return [
      { ...run.hottest, reading: readingOf(run.hottest.channel) },
      { ...run.coldest, reading: readingOf(run.coldest.channel) },
    ];
  }
  const read = readings.flatMap((reading): Extreme[] => {
    const { channel, role, unit, value } = reading;
    if (value === null || !isTemperatureUnit(unit) || role === 'setpoint' || role === 'other') return [];
    return [{ channel, valueC: celsiusFrom(value, unit), reading }];
  });
  // One that fell silent says nothing of now, so long as another is still read.
  const fresh = read.filter(({ reading }) => !reading?.isStale);
  const known = (fresh.length > 0 ? fresh : read).toSorted((a, b) => b.valueC - a.valueC);
  return [known[0] ?? null, known.at(-1) ?? null];
}
