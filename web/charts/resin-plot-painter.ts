import { Chart, LinearScale, LineController, LineElement, LogarithmicScale, PointElement } from 'chart.js';
import { followScheme } from '../scheme.ts';
import { type Ink, inkOnPaper, readInk } from './ink.ts';
import type { ResinPlot } from './resin-plot.ts';
import { datasetsOfPlot, type PlotPoint, plotHeight, resinPlotConfig, scalesOfPlot } from './resin-plot-config.ts';
import type { PlotScene } from './resin-plot-scene.ts';
import { rightRoom } from './strips.ts';

Chart.register(LineController, LineElement, PointElement, LinearScale, LogarithmicScale);

/** Width a plot has on A4 beside the margin of the book, px. */
const PAPER_WIDTH = 560;

/** Keeps one plot on a canvas: at the width of its frame, in the light of the page, black on white on paper. */
export interface PlotPainter {
  readonly show: (plot: ResinPlot) => void;
  readonly point: (atX: number | null) => void;
  /** Place along the axis under a point of the window; null outside the strips. */
  readonly xAt: (clientX: number) => number | null;
  readonly destroy: () => void;
}

export function createPlotPainter(canvas: HTMLCanvasElement, frame: HTMLElement, plot: ResinPlot): PlotPainter {
  const scene: PlotScene = { plot, cursorX: null, ink: readInk() };
  let width = frame.clientWidth;
  frame.style.height = `${plotHeight(plot)}px`;
  const chart = new Chart<'line', PlotPoint[]>(canvas, resinPlotConfig(scene, width));

  const dress = (ink: Ink, nextWidth: number) => {
    scene.ink = ink;
    width = nextWidth;
    const height = plotHeight(scene.plot);
    frame.style.height = `${height}px`;
    chart.data.datasets = datasetsOfPlot(scene.plot, ink);
    chart.options.scales = scalesOfPlot(scene.plot, ink, width);
    chart.options.layout = { padding: { right: rightRoom(width) } };
    chart.resize(width, height);
    chart.update('none');
  };
  const paper = matchMedia('print');
  const toPaper = () => dress(inkOnPaper(), PAPER_WIDTH);
  const turn = () => (paper.matches ? toPaper() : dress(readInk(), frame.clientWidth));

  const watch = new ResizeObserver(() => {
    if (!paper.matches && frame.clientWidth !== width && frame.clientWidth > 0) turn();
  });
  watch.observe(frame);
  paper.addEventListener('change', turn);
  addEventListener('beforeprint', toPaper);
  addEventListener('afterprint', turn);
  const stopFollowing = followScheme(turn);
  let isGone = false;
  void document.fonts.ready.then(() => isGone || chart.draw());

  return {
    show(next) {
      if (next === scene.plot) return;
      scene.plot = next;
      dress(scene.ink, width);
    },
    point(atX) {
      if (atX === scene.cursorX) return;
      scene.cursorX = atX;
      chart.draw();
    },
    xAt(clientX) {
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
