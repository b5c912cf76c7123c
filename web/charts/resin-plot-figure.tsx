import type { ComponentChildren } from 'preact';
import { useEffect, useMemo, useRef, useState } from 'preact/hooks';
import { Wide } from '../parts/wide.tsx';
import { courseAt, type ResinPlot } from './resin-plot.ts';
import { createPlotPainter, type PlotPainter } from './resin-plot-painter.ts';

const ROWS = 20;

/** A plot with its cursor and its table; arrows move the cursor where the plot has the focus. */
export function ResinPlotFigure({
  plot,
  name,
  children,
}: {
  plot: ResinPlot;
  /** "Cure along the programme": what the picture is of. */
  name: string;
  children?: ComponentChildren;
}) {
  const frame = useRef<HTMLDivElement>(null);
  const canvas = useRef<HTMLCanvasElement>(null);
  const painter = useRef<PlotPainter | null>(null);
  const [cursorX, setCursorX] = useState<number | null>(null);
  const [isTable, setIsTable] = useState(false);

  useEffect(() => {
    if (!canvas.current || !frame.current) return;
    painter.current = createPlotPainter(canvas.current, frame.current, plot);
    return () => painter.current?.destroy();
  }, []);
  useEffect(() => painter.current?.show(plot), [plot]);
  const at = cursorX === null ? null : Math.min(Math.max(cursorX, plot.low), plot.high);
  useEffect(() => painter.current?.point(at), [at]);
  const table = useMemo(() => (isTable ? <PlotTable plot={plot} name={name} /> : null), [isTable, plot]);

  const point = (event: PointerEvent) => setCursorX(painter.current?.xAt(event.clientX) ?? null);
  const press = (event: KeyboardEvent) => {
    const step = ((plot.high - plot.low) / 100) * (event.shiftKey ? 5 : 1);
    const from = at ?? (plot.low + plot.high) / 2;
    if (event.key === 'ArrowLeft') setCursorX(Math.max(plot.low, from - step));
    else if (event.key === 'ArrowRight') setCursorX(Math.min(plot.high, from + step));
    else if (event.key === 'Home') setCursorX(plot.low);
    else if (event.key === 'End') setCursorX(plot.high);
    else if (event.key === 'Escape') setCursorX(null);
    else return;
    event.preventDefault();
  };
  return (
    <figure class="resin-plot">
      <fieldset
        class="chart-keys"
        // biome-ignore lint/a11y/noNoninteractiveTabindex: arrows move the cursor of the picture
        tabIndex={0}
        aria-label={`${name}; arrows move the cursor`}
        onKeyDown={press}
      >
        <div class="canvas-frame" ref={frame}>
          <canvas
            ref={canvas}
            role="img"
            aria-label={plot.words}
            onPointerMove={point}
            onPointerDown={point}
            onPointerLeave={() => setCursorX(null)}
          />
        </div>
        {at !== null && <PlotReadout plot={plot} at={at} />}
      </fieldset>
      {children}
      <div class="chart-controls no-print">
        <button type="button" class="quiet" aria-expanded={isTable} onClick={() => setIsTable(!isTable)}>
          {name}: in rows
        </button>
      </div>
      {table}
    </figure>
  );
}

function PlotReadout({ plot, at }: { plot: ResinPlot; at: number }) {
  return (
    <div class="readout" data-side={at > (plot.low + plot.high) / 2 ? 'left' : 'right'}>
      <p>
        <b>{plot.textAt(at)}</b>
      </p>
      <dl>
        {plot.courses.map((course) => (
          <div key={course.strip + course.longName} class={course.weight === 'first' ? 'strong' : ''}>
            <dt>{course.longName}</dt>
            <dd>{shownAt(course, at)}</dd>
          </div>
        ))}
      </dl>
    </div>
  );
}

function PlotTable({ plot, name }: { plot: ResinPlot; name: string }) {
  const places = Array.from({ length: ROWS + 1 }, (_, n) => plot.low + ((plot.high - plot.low) * n) / ROWS);
  return (
    <Wide label={`${name} in rows`}>
      <table>
        <caption>{name}, at even steps</caption>
        <thead>
          <tr>
            <th scope="col">{plot.title}</th>
            {plot.courses.map((course) => (
              <th scope="col" class="figure-cell" key={course.strip + course.longName}>
                {course.longName}
              </th>
            ))}
          </tr>
        </thead>
        <tbody>
          {places.map((at) => (
            <tr key={at}>
              <th scope="row">{plot.textAt(at)}</th>
              {plot.courses.map((course) => (
                <td class="figure-cell" key={course.strip + course.longName}>
                  {shownAt(course, at)}
                </td>
              ))}
            </tr>
          ))}
        </tbody>
      </table>
    </Wide>
  );
}

function shownAt(course: ResinPlot['courses'][number], at: number): string {
  const value = courseAt(course, at);
  return value === null ? '–' : course.text(value);
}
