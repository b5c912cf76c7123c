import { useEffect, useLayoutEffect, useRef } from 'preact/hooks';
import type { RunChart, Stretch } from '../../models/chart/chart.ts';
import { createPainter, type Painter } from './painter.ts';

export interface CanvasPointing {
  readonly onPoint: (hours: number | null) => void;
  readonly onSelect: (fromH: number, untilH: number) => void;
  readonly onWheel: (factor: number, atH: number) => void;
}

/** The picture itself, and what a mouse, a finger or a wheel does on it. */
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
  const painter = useRef<Painter | null>(null);
  const dragFromH = useRef<number | null>(null);

  // Before the browser paints: a scan that just came is then on the picture of this frame.
  useLayoutEffect(() => {
    if (!canvas.current || !frame.current) return;
    const scene = { chart: drawn, lit, stretch, cursorH, selection: null };
    painter.current = createPainter(canvas.current, frame.current, scene);
    return () => painter.current?.destroy();
  }, []);
  useLayoutEffect(() => painter.current?.show({ chart: drawn }), [drawn]);
  useEffect(() => painter.current?.show({ lit, stretch, cursorH }), [lit, stretch, cursorH]);

  const hoursAt = (event: MouseEvent) => painter.current?.hoursAt(event.clientX) ?? null;
  const move = (event: PointerEvent) => {
    const atH = hoursAt(event);
    pointing.onPoint(atH);
    if (dragFromH.current !== null && atH !== null) painter.current?.show({ selection: [dragFromH.current, atH] });
  };
  const endDrag = () => {
    dragFromH.current = null;
    painter.current?.show({ selection: null });
  };
  const release = (event: PointerEvent) => {
    const atH = hoursAt(event);
    const fromH = dragFromH.current;
    endDrag();
    if (fromH === null || atH === null || Math.abs(atH - fromH) < (drawn.untilH - drawn.fromH) / 60) return;
    pointing.onSelect(Math.min(fromH, atH), Math.max(fromH, atH));
  };
  return (
    <div class="canvas-frame" ref={frame}>
      <canvas
        ref={canvas}
        role="img"
        aria-label={label}
        onPointerMove={move}
        onPointerDown={(event) => {
          const atH = hoursAt(event);
          if (event.pointerType === 'mouse' && event.button === 0) dragFromH.current = atH;
          pointing.onPoint(atH);
        }}
        onPointerUp={release}
        onPointerLeave={() => {
          endDrag();
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
