import type { Forecast, Runner } from '../../models/forecast/forecast.ts';
import type { LiveReading } from '../../server/contract/live.ts';
import { clock } from '../words/clock.ts';
import { asWritten } from '../words/figures.ts';
import { clockRoundedUp, minutesLeft, rateWords, temperatureWords } from '../words/live.ts';
import { sentence } from '../words/verdicts.ts';
import { shownUnits, zone } from '../workshop.ts';
import { LiveFigure } from './live-figure.tsx';

/** How old what is told is: by the server's clock, and whether all of it is past. */
export interface Telling {
  readonly readings: readonly LiveReading[];
  readonly nowMs: number;
  readonly isOld: boolean;
}

/** Where the run is heading, large: the stage, the earliest end, who is furthest along and furthest behind. */
export function LiveOutlook({
  forecast,
  heatOn,
  telling,
}: {
  forecast: Forecast;
  /** Null before it. */
  heatOn: string | null;
  telling: Telling;
}) {
  const { stage, leading, lagging } = forecast;
  return (
    <section class={telling.isOld ? 'outlook is-old' : 'outlook'} aria-label="Where the run is heading">
      <p class="stage">{stage === null ? OUTSIDE[heatOn === null ? 'before' : 'after'] : inStage(stage)}</p>
      <Ahead forecast={forecast} />
      <dl class="live-figures">
        <RunnerFigure name="leading" runner={leading} telling={telling} />
        <RunnerFigure name="lagging" runner={lagging} telling={telling} />
      </dl>
    </section>
  );
}

const OUTSIDE = { before: 'Before heat-on', after: 'After the last stage' } as const;

function inStage({ name, since }: NonNullable<Forecast['stage']>): string {
  return `${name}, since ${clock(since, zone.value)}`;
}

/** The one thing that is waited for. */
function Ahead({ forecast: { dwell, entry } }: { forecast: Forecast }) {
  if (dwell !== null) return <DwellAhead dwell={dwell} />;
  if (entry === null) return null;
  return (
    <>
      <p class="ahead">
        {entry.expectedAt === null ? (
          <b class="ahead-words">
            {entry.by} is not coming nearer to {entry.dwell}
          </b>
        ) : (
          <b class="ahead-words">
            {entry.by} expected in {entry.dwell} at {clockRoundedUp(entry.expectedAt, zone.value)}
          </b>
        )}
      </p>
      <p>{sentence(entry.because)}</p>
    </>
  );
}

function DwellAhead({ dwell }: { dwell: NonNullable<Forecast['dwell']> }) {
  const left = minutesLeft(dwell.minutesLeft);
  return (
    <>
      <p class="ahead">
        {dwell.notBefore === null || left <= 0 ? (
          <b class="ahead-words">{left <= 0 ? 'The least time is counted' : 'The end cannot be told'}</b>
        ) : (
          <>
            <b class="ahead-words minutes">{left} min left</b>{' '}
            <b class="ahead-words">
              not before {clockRoundedUp(dwell.notBefore, zone.value)}
              {dwell.by && `, by ${dwell.by}`}
            </b>
          </>
        )}
      </p>
      {dwell.notAfter && (
        <p>
          <b>Not later than {clock(dwell.notAfter, zone.value)}.</b>
        </p>
      )}
      <p>{sentence(dwell.because)}</p>
    </>
  );
}

function RunnerFigure({ name, runner, telling }: { name: string; runner: Runner | null; telling: Telling }) {
  const { temperature } = shownUnits.value;
  if (runner === null) return <LiveFigure large name={name} text="–" ageMs={null} isStale={false} />;
  const reading = telling.readings.find(({ channel }) => channel === runner.channel);
  const at = reading?.at ?? null;
  return (
    <LiveFigure
      large
      name={`${name}, ${runner.channel}`}
      text={temperatureWords(runner.valueC, temperature)}
      ageMs={at === null ? null : telling.nowMs - Date.parse(at)}
      isStale={telling.isOld || reading?.isStale === true}
    >
      <dd class="rate">{rateWords(runner.rateCPerMin, temperature)}</dd>
    </LiveFigure>
  );
}

/** Limits that are nearing, nearest first. */
export function LiveNearing({ forecast }: { forecast: Forecast }) {
  if (forecast.nearing.length === 0) return null;
  return (
    <section class="section">
      <h2>Coming near a limit</h2>
      <ul>
        {forecast.nearing.map((one) => (
          <li key={`${one.limit} ${one.sensor}`}>
            {sentence(one.text)}
            {one.expectedAt &&
              ` At this rate it is broken at ${clock(one.expectedAt, zone.value)}; ${asWritten(Number(one.margin.toPrecision(2)), one.unit)} is left.`}
          </li>
        ))}
      </ul>
    </section>
  );
}

/** What only a person can do, for whatever part, oldest first. */
export function LiveNeeds({ forecasts }: { forecasts: readonly Forecast[] }) {
  const needs = [...new Map(forecasts.flatMap((one) => one.needs).map((need) => [need.text, need])).values()];
  if (needs.length === 0) return null;
  const oldestFirst = needs.toSorted((a, b) => Date.parse(a.since) - Date.parse(b.since));
  return (
    <section class="live-needs" aria-label="Needs a person">
      <h2>Needs a person</h2>
      <ul>
        {oldestFirst.map((need) => (
          <li key={need.text}>
            <time dateTime={need.since}>since {clock(need.since, zone.value)}</time>
            <span>{sentence(need.text)}</span>
          </li>
        ))}
      </ul>
    </section>
  );
}
