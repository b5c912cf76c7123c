import { useEffect, useMemo, useRef, useState } from 'preact/hooks';
import type { RunChart as RunChartDocument } from '../../models/chart/chart.ts';
import type { PartEvaluation } from '../../models/evaluation/evaluation.ts';
import { runChartPath } from '../../server/contract/paths.ts';
import type { RunView } from '../../server/contract/runs.ts';
import type { EstimatesTold } from '../parts/estimates-told.tsx';
import { Problem } from '../parts/problem.tsx';
import { isTyping } from '../parts/scan-box.tsx';
import { Waiting } from '../parts/waiting.tsx';
import { useLatest } from '../use-latest.ts';
import { clock, lasting } from '../words/clock.ts';
import { shownUnits, zone } from '../workshop.ts';
import { ChartTable } from './chart-table.tsx';
import { inUnits } from './in-units.ts';
import { type LiveScans, withScans } from './live-scans.ts';
import { pictureInWords } from './picture-in-words.ts';
import { Readout } from './readout.tsx';
import { RunCanvas } from './run-canvas.tsx';
import { useView } from './use-view.ts';

const HOUR_MS = 3_600_000;

/** The run's one chart, with its zoom, its cursor and its table. */
export function RunChart({
  run,
  part,
  lit,
  onNext,
  onEstimates,
  live,
}: {
  run: RunView;
  part: PartEvaluation | null;
  /** Limit whose stretch is lit. */
  lit: string | null;
  /** Key `f`: on to the next finding. */
  onNext: () => void;
  /** Hears what is estimated over the run, to be told elsewhere on the page. */
  onEstimates?: (told: EstimatesTold) => void;
  /** Of an open run: what came since the chart was drawn. */
  live?: LiveScans;
}) {
  const lastMs = Math.max(Date.parse(run.until), live?.scans.at(-1)?.timeMs ?? 0);
  const whole = useMemo(() => ({ fromMs: Date.parse(run.from), untilMs: lastMs }), [run.from, lastMs]);
  const { view, isWhole, show, zoom, pan, showAll } = useView(whole);
  const [cursorH, setCursorH] = useState<number | null>(null);
  const [isTable, setIsTable] = useState(false);
  const frame = useRef<HTMLElement>(null);
  const query = {
    ...(isWhole ? {} : { from: new Date(view.fromMs).toISOString(), until: new Date(view.untilMs).toISOString() }),
    points: 1200,
    part: part?.part ?? null,
  };
  const latest = useLatest<RunChartDocument>(runChartPath(run.run, query), run);
  const units = shownUnits.value;
  // Only the whole grows: who looks at a stretch of it is left in peace.
  const growing = isWhole ? live : undefined;
  const drawing = useMemo(() => {
    if (!latest.value) return null;
    return inUnits(growing ? withScans(latest.value, run, growing) : latest.value, units);
  }, [latest.value, units, growing?.scans, growing?.channels]);
  const told = latest.value;
  useEffect(() => {
    if (told) onEstimates?.({ part: told.part, sentences: told.estimates });
  }, [told]);
  const stretch = drawing?.stretches.find(({ limit }) => limit === lit) ?? null;

  const table = useMemo(() => (isTable && drawing ? <ChartTable chart={drawing} /> : null), [isTable, drawing]);

  useEffect(() => {
    const press = (event: KeyboardEvent) => {
      if (isTyping(event.target) || event.ctrlKey || event.metaKey || event.altKey) return;
      if (event.key === 'f') onNext();
      else if (event.key === 't') setIsTable((now) => !now);
      else if (event.key === '+' || event.key === '=') zoom(1.6, at(cursorH));
      else if (event.key === '-') zoom(1 / 1.6, at(cursorH));
      else return;
      event.preventDefault();
    };
    addEventListener('keydown', press);
    return () => removeEventListener('keydown', press);
  });
  const at = (hours: number | null) => (hours === null || !drawing ? undefined : drawing.zeroMs + hours * HOUR_MS);

  const moveCursor = (event: KeyboardEvent) => {
    if (!drawing) return;
    const step = (drawing.untilH - drawing.fromH) / 100;
    const by = { ArrowLeft: -step, ArrowRight: step }[event.key];
    if (event.key === 'Escape') setCursorH(null);
    else if (event.key === 'Home') setCursorH(drawing.fromH);
    else if (event.key === 'End') setCursorH(drawing.untilH);
    else if (by !== undefined) {
      const next = (cursorH ?? (drawing.fromH + drawing.untilH) / 2) + by * (event.shiftKey ? 5 : 1);
      if (next < drawing.fromH || next > drawing.untilH) pan(Math.sign(by) / 4);
      setCursorH(Math.min(Math.max(next, drawing.fromH), drawing.untilH));
    } else return;
    event.preventDefault();
  };

  return (
    <figure class="run-chart" ref={frame}>
      {latest.problem && <Problem problem={latest.problem} again={latest.again} />}
      {!drawing && !latest.problem && <Waiting what="Drawing the run" />}
      {drawing && (
        <>
          <fieldset
            class="chart-keys"
            // biome-ignore lint/a11y/noNoninteractiveTabindex: arrows move the cursor of the picture
            tabIndex={0}
            aria-label="Chart of the run; arrows move the cursor"
            onKeyDown={moveCursor}
          >
            <RunCanvas
              drawn={drawing}
              lit={lit}
              stretch={stretch}
              cursorH={cursorH}
              label={pictureInWords(drawing)}
              pointing={{
                onPoint: setCursorH,
                onSelect: (fromH, untilH) =>
                  show({ fromMs: drawing.zeroMs + fromH * HOUR_MS, untilMs: drawing.zeroMs + untilH * HOUR_MS }),
                onWheel: (factor, hours) => zoom(factor, at(hours)),
              }}
            />
            {cursorH !== null && <Readout chart={drawing} atH={cursorH} />}
            <p class="unseen" role="status">
              {latest.isWaiting ? 'Fetching the readings in view.' : ''}
            </p>
          </fieldset>
          <div class="chart-controls no-print">
            <button
              type="button"
              class="quiet"
              aria-label="Zoom in"
              aria-keyshortcuts="+"
              onClick={() => zoom(1.6, at(cursorH))}
            >
              +
            </button>
            <button
              type="button"
              class="quiet"
              aria-label="Zoom out"
              aria-keyshortcuts="-"
              disabled={isWhole}
              onClick={() => zoom(1 / 1.6)}
            >
              −
            </button>
            <button type="button" class="quiet" aria-label="Earlier" disabled={isWhole} onClick={() => pan(-0.5)}>
              ←
            </button>
            <button type="button" class="quiet" aria-label="Later" disabled={isWhole} onClick={() => pan(0.5)}>
              →
            </button>
            <button type="button" class="quiet" disabled={isWhole} onClick={showAll}>
              Whole run
            </button>
            <button
              type="button"
              class="quiet"
              aria-expanded={isTable}
              aria-keyshortcuts="t"
              onClick={() => setIsTable(!isTable)}
            >
              Table
            </button>
            <p class="soft small">
              {clock(view.fromMs, zone.value)} to {clock(view.untilMs, zone.value)},{' '}
              {lasting(view.untilMs - view.fromMs)}. Keys: + and − zoom, arrows move, f next finding, t table.
            </p>
          </div>
          {drawing.notDrawn.map(({ channel, because }) => (
            <p class="soft small" key={channel}>
              {channel} is not drawn: {because}
            </p>
          ))}
          {table}
        </>
      )}
    </figure>
  );
}
