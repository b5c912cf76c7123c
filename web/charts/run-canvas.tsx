import { Chart, LinearScale, LineController, LineElement, PointElement } from 'chart.js';
import { useEffect, useRef } from 'preact/hooks';
import type { RunChart, Stretch } from '../../models/chart/chart.ts';
import { followScheme } from '../scheme.ts';
import { zone } from '../workshop.ts';
import { chartConfig, datasetsOf, type Point, scalesOf } from './chart-config.ts';
import type { Scene } from './geometry-plugin.ts';
import { readInk } from './ink.ts';
import { chartHeight } from './strips.ts';
import { useWidth } from './use-width.ts';

Chart.register(LineController, LineElement, PointElement, LinearScale);

export interface CanvasPointing {
  readonly onPoint: (hours: number | null) => void;
  readonly onSelect: (fromH: number, untilH: number) => void;
  readonly onWheel: (factor: number, atH: number) => void;
}

/** The canvas itself: keeps one chart and redraws it when the drawing, the light or what is pointed at changes. */
export function RunCanvas({
  drawn,
  lit,
  stretch,
  cursorH,
  label,
  pointing,
}: {
  drawn: RunChart;
  lit: string | null;
  stretch: Stretch | null;
  cursorH: number | null;
  /** What the picture shows, in words. */
  label: string;
  pointing: CanvasPointing;
}) {
  const frame = useRef<HTMLDivElement>(null);
  const canvas = useRef<HTMLCanvasElement>(null);
  const held = useRef<{ chart: Chart<'line', Point[]>; scene: Scene } | null>(null);
  const drag = useRef<{ fromH: number } | null>(null);
  const width = useWidth(frame);
  const height = chartHeight(drawn, width);

  useEffect(() => {
    if (!canvas.current || width === 0) return;
    const scene: Scene = { chart: drawn, ink: readInk(), lit, stretch, cursorH, selection: null };
    const chart = new Chart(canvas.current, chartConfig(scene, width, zone.value));
    held.current = { chart, scene };
    void document.fonts.ready.then(() => held.current?.chart === chart && chart.draw());
    return () => {
      held.current = null;
      chart.destroy();
    };
  }, [width, height]);

  useEffect(() => {
    const now = held.current;
    if (!now) return;
    now.scene.chart = drawn;
    redress(now, width);
  }, [drawn]);

  useEffect(() => {
    const now = held.current;
    if (!now) return;
    Object.assign(now.scene, { lit, stretch, cursorH });
    now.chart.draw();
  }, [lit, stretch, cursorH]);

  useEffect(
    () =>
      followScheme(() => {
        if (!held.current) return;
        held.current.scene.ink = readInk();
        redress(held.current, width);
      }),
    [width],
  );

  const hoursAt = (event: MouseEvent) => {
    const scale = held.current?.chart.scales.x;
    const box = canvas.current?.getBoundingClientRect();
    if (!scale || !box) return null;
    const x = event.clientX - box.left;
    return x < scale.left - 4 || x > scale.right + 4 ? null : Number(scale.getValueForPixel(x));
  };
  const select = (selection: Scene['selection']) => {
    if (!held.current) return;
    held.current.scene.selection = selection;
    held.current.chart.draw();
  };
  const move = (event: PointerEvent) => {
    const atH = hoursAt(event);
    pointing.onPoint(atH);
    if (drag.current && atH !== null) select([drag.current.fromH, atH]);
  };
  const release = (event: PointerEvent) => {
    const atH = hoursAt(event);
    const fromH = drag.current?.fromH;
    drag.current = null;
    select(null);
    if (fromH === undefined || atH === null || Math.abs(atH - fromH) < (drawn.untilH - drawn.fromH) / 60) return;
    pointing.onSelect(Math.min(fromH, atH), Math.max(fromH, atH));
  };
  return (
    <div class="canvas-frame" ref={frame} style={{ height: `${height}px` }}>
      <canvas
        ref={canvas}
        role="img"
        aria-label={label}
        onPointerMove={move}
        onPointerDown={(event) => {
          const atH = hoursAt(event);
          if (event.pointerType === 'mouse' && event.button === 0 && atH !== null) drag.current = { fromH: atH };
          pointing.onPoint(atH);
        }}
        onPointerUp={release}
        onPointerLeave={() => {
          drag.current = null;
          select(null);
          pointing.onPoint(null);
        }}
        onWheel={(event) => {
          const atH = hoursAt(event);
          const hasFocus = frame.current?.parentElement?.contains(document.activeElement);
          if (atH === null || !(event.ctrlKey || hasFocus)) return;
          event.preventDefault();
          pointing.onWheel(event.deltaY < 0 ? 1.25 : 0.8, atH);
        }}
      />
    </div>
  );
}

function redress(held: { chart: Chart<'line', Point[]>; scene: Scene }, width: number): void {
  const { chart, scene } = held;
  chart.data.datasets = datasetsOf(scene.chart, scene.ink);
  chart.options.scales = scalesOf(scene.chart, scene.ink, width, zone.value);
  chart.update('none');
}
