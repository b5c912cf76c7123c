import { Chart, LinearScale, LineController, LineElement, LogarithmicScale, PointElement } from 'chart.js';
import { followScheme } from '../scheme.ts';
import { zone } from '../workshop.ts';
import { chartConfig, datasetsOf, type Point, scalesOf } from './chart-config.ts';
import type { Scene } from './geometry-plugin.ts';
import { type Ink, inkOnPaper, readInk } from './ink.ts';
import { chartHeight, rightRoom } from './strips.ts';

Chart.register(LineController, LineElement, PointElement, LinearScale, LogarithmicScale);

/** Width a run's chart has on A4 beside the margin of the book, px. */
const PAPER_WIDTH = 560;

/** Keeps one chart on a canvas: at the width of its frame, in the light of the page, black on white on paper. */
export interface Painter {
  /** Shows what changed of the scene; another chart is drawn anew, anything else over the courses as they are. */
  readonly show: (change: Partial<Omit<Scene, 'ink'>>) => void;
  /** Hour under a point of the window; null outside the strips. */
  readonly hoursAt: (clientX: number) => number | null;
  readonly destroy: () => void;
}

export function createPainter(canvas: HTMLCanvasElement, frame: HTMLElement, first: Omit<Scene, 'ink'>): Painter {
  const scene: Scene = { ...first, ink: readInk() };
  let width = frame.clientWidth;
  frame.style.height = `${chartHeight(scene.chart, width)}px`;
  const chart = new Chart<'line', Point[]>(canvas, chartConfig(scene, width, zone.value));

  const dress = (ink: Ink, nextWidth: number) => {
    scene.ink = ink;
    width = nextWidth;
    const height = chartHeight(scene.chart, width);
    frame.style.height = `${height}px`;
    chart.data.datasets = datasetsOf(scene.chart, ink);
    chart.options.scales = scalesOf(scene.chart, ink, width, zone.value);
    chart.options.layout = { padding: { right: rightRoom(width) } };
    chart.resize(width, height);
    chart.update('none');
  };
  const dressForScreen = () => dress(readInk(), frame.clientWidth);
  const paper = matchMedia('print');
  const turn = () => (paper.matches ? dress(inkOnPaper(), PAPER_WIDTH) : dressForScreen());
  const toPaper = () => dress(inkOnPaper(), PAPER_WIDTH);

  const watch = new ResizeObserver(() => {
    if (!paper.matches && frame.clientWidth !== width && frame.clientWidth > 0) dressForScreen();
  });
  watch.observe(frame);
  paper.addEventListener('change', turn);
  addEventListener('beforeprint', toPaper);
  addEventListener('afterprint', turn);
  const stopFollowing = followScheme(turn);
  let isGone = false;
  void document.fonts.ready.then(() => isGone || chart.draw());

  return {
    show(change) {
      const isOther = change.chart !== undefined && change.chart !== scene.chart;
      Object.assign(scene, change);
      if (isOther) dress(scene.ink, width);
      else chart.draw();
    },
    hoursAt(clientX) {
      const scale = chart.scales.x;
      if (!scale) return null;
      const x = clientX - canvas.getBoundingClientRect().left;
      return x < scale.left - 4 || x > scale.right + 4 ? null : Number(scale.getValueForPixel(x));
    },
    destroy() {
      isGone = true;
      watch.disconnect();
      paper.removeEventListener('change', turn);
      removeEventListener('beforeprint', toPaper);
      removeEventListener('afterprint', turn);
      stopFollowing();
      chart.destroy();
    },
  };
}
