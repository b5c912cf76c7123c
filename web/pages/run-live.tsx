import { useEffect, useMemo, useRef, useState } from 'preact/hooks';
import { useLocation } from 'preact-iso';
import type { Evaluation } from '../../models/evaluation/evaluation.ts';
import { withQuery } from '../../server/contract/paths.ts';
import type { RunView } from '../../server/contract/runs.ts';
import { RunChart } from '../charts/run-chart.tsx';
import { Advisory } from '../parts/advisory.tsx';
import { Decisions } from '../parts/decisions.tsx';
import { FindingList, focusNextFinding } from '../parts/finding-list.tsx';
import { isNewsOld, LineState } from '../parts/line-state.tsx';
import { LiveCure } from '../parts/live-cure.tsx';
import { LiveEnd } from '../parts/live-end.tsx';
import { LiveNearing, LiveNeeds, LiveOutlook } from '../parts/live-outlook.tsx';
import { LiveReadings } from '../parts/live-readings.tsx';
import { LiveState } from '../parts/live-state.tsx';
import { PartSwitch } from '../parts/part-switch.tsx';
import { RunHead } from '../parts/run-head.tsx';
import { RunLoad } from '../parts/run-load.tsx';
import { RunMargin } from '../parts/run-margin.tsx';
import { RunNotes } from '../parts/run-notes.tsx';
import { RunSensors } from '../parts/run-sensors.tsx';
import { WarningStrip } from '../parts/warning-strip.tsx';
import { useLiveRun } from '../use-live-run.ts';
import { useNow } from '../use-now.ts';
import { worstPart } from '../words/verdicts.ts';

/** The geometry of the chart is asked for again this often; scans are added to it as they come. */
const REDRAWN_MS = 30_000;

/** A run as it happens: where it is heading first, then what needs a person, the chart, the findings as they stand. */
export function RunLive({ run, again }: { run: RunView; again: () => void }) {
  const heard = useLiveRun(run.run, again);
  const { state } = heard;
  const browserMs = useNow();
  const nowMs = state === null ? browserMs : Date.parse(state.at) + Math.max(0, browserMs - heard.heardMs);
  const isOld = state !== null && isNewsOld(heard.isHeard, heard.heardMs, browserMs);
  const evaluation = state?.evaluation ?? run.evaluation?.document ?? null;
  useRedrawing(evaluation, again);
  const { query, route } = useLocation();
  const [lit, setLit] = useState<string | null>(null);
  const findings = useRef<HTMLDivElement>(null);
  const part = evaluation?.parts.find((one) => one.part === query.part) ?? (evaluation && worstPart(evaluation));
  const forecast = state?.forecasts.find((one) => one.part === (part?.part ?? null)) ?? state?.forecasts[0];
  // The same array while the channels are the same: the chart is not drawn again for nothing.
  const channels = useMemo(() => state?.channels ?? [], [state?.channels.join('\n')]);
  const telling = { readings: state?.readings ?? [], nowMs, isOld };
  return (
    <div class="notebook with-side run-book live">
      <div class="margin">
        <RunMargin run={run} part={part?.part ?? null} />
      </div>
      <div class="leaf">
        <RunHead run={run} />
        <LineState isHeard={heard.isHeard} heardMs={heard.heardMs} nowMs={browserMs} />
        <WarningStrip warnings={(state?.warnings ?? []).filter((one) => one.run === run.run || one.run === null)} />
        <LiveState run={run} state={state} evaluation={evaluation} />
        {forecast && <LiveOutlook forecast={forecast} heatOn={part?.heatOn ?? null} telling={telling} />}
        <Advisory />
        <LiveNeeds forecasts={state?.forecasts ?? []} />
        {evaluation && <Decisions run={run} evaluation={withSuspects(evaluation)} onDecided={again} />}
        {(state?.scans ?? run.scans) < 2 ? (
          <p class="soft">The picture begins with the second scan.</p>
        ) : (
          <RunChart
            run={run}
            part={part}
            lit={lit}
            onNext={() => focusNextFinding(findings.current)}
            live={{ channels, scans: heard.scans }}
          />
        )}
      </div>
      <div class="side" ref={findings}>
        {evaluation && (
          <PartSwitch
            parts={evaluation.parts}
            chosen={part ?? null}
            onChoose={(name) => route(withQuery(`/runs/${run.run}`, { part: name }), true)}
          />
        )}
        {part && <FindingList part={part} run={run} lit={lit} onLight={setLit} />}
      </div>
      <div class="rest">
        {forecast && evaluation && (
          <LiveCure cure={forecast.cure} run={run} evaluation={evaluation} nowMs={nowMs} isOld={isOld} />
        )}
        {forecast && <LiveNearing forecast={forecast} />}
        <LiveReadings telling={telling} />
        <LiveEnd run={run} ended={state?.ended ?? null} again={again} />
        <RunNotes run={run} onAdded={again} />
        <RunLoad run={run} />
        {evaluation && <RunSensors run={run} evaluation={evaluation} />}
      </div>
    </div>
  );
}

/** While all is pending no finding hangs on a suspect yet; it can be decided on all the same. */
function withSuspects(evaluation: Evaluation): Evaluation {
  const asked = new Set(evaluation.decisions.map(({ channel }) => channel));
  const suspects = evaluation.sensors.flatMap(({ channel, state, faults: [fault] }) =>
    state === 'suspect' && fault && !asked.has(channel) ? [{ channel, ...fault, changes: [] }] : [],
  );
  return { ...evaluation, decisions: [...evaluation.decisions, ...suspects] };
}

/** Asks for run and chart again when a stage, a verdict or a sensor's standing changed, and every half minute. */
function useRedrawing(evaluation: Evaluation | null, again: () => void): void {
  const key = evaluation === null ? '' : standingOf(evaluation);
  const before = useRef(key);
  useEffect(() => {
    if (before.current !== '' && before.current !== key) again();
    before.current = key;
  }, [key]);
  useEffect(() => {
    const timer = setInterval(again, REDRAWN_MS);
    return () => clearInterval(timer);
  }, [again]);
}

function standingOf({ verdict, parts, sensors }: Evaluation): string {
  const stages = parts.flatMap(({ stages: all }) => all.map(({ opens, closes }) => `${opens} ${closes}`));
  const outcomes = parts.flatMap(({ findings }) => findings.map(({ outcome }) => outcome));
  return [verdict, ...stages, ...outcomes, ...sensors.map(({ state }) => state)].join('|');
}
