import { roundTicks } from '../../models/chart/ticks.ts';
import type { RateCurve } from '../../models/cure/rate-curve.ts';
import { celsiusFromKelvin, type TemperatureUnit, temperatureFromCelsius } from '../../models/units.ts';
import { figure, plain } from '../words/figures.ts';
import { powersWithin, powerText, scientific } from '../words/powers.ts';
import type { PlotCourse, PlotMark, PlotStrip, ResinPlot } from './resin-plot.ts';

export type RateAxis = 'logarithmic' | 'linear';

/** Decades drawn below the fastest rate of all; more where a colder curve would lie below them, to 12. */
const DECADES = [5, 12] as const;

/** dα/dt over degree, a curve a temperature; null where no rate is above 0. */
export function rateCurvePlot(curves: readonly RateCurve[], axis: RateAxis, unit: TemperatureUnit): ResinPlot | null {
  const peaks = curves.map(({ ratePerS }) => ratePerS.reduce((a, b) => Math.max(a, b), 0)).filter((peak) => peak > 0);
  if (peaks.length === 0) return null;
  const strip = stripOf(axis, Math.max(...peaks), Math.min(...peaks));
  const drawn = curves.map((curve) => courseOf(curve, strip.low, unit));
  return {
    low: 0,
    high: 1,
    title: 'degree of cure',
    ticks: () => [0, 0.2, 0.4, 0.6, 0.8, 1].map((value) => ({ value, text: String(value) })),
    textAt: (alpha) => plain(alpha, 2),
    strips: [strip],
    courses: drawn,
    marks: curves.flatMap((curve, n) => marksOf(curve, drawn[n], strip.low)),
    rails: [],
    words: `Rate of cure in 1/s. ${curves.map((curve) => inWords(curve, unit)).join(' ')}`,
  };
}

function stripOf(axis: RateAxis, most: number, leastPeak: number): PlotStrip {
  const top = Math.ceil(Math.log10(most) + 1e-9);
  // Two decades of the coldest curve at the least.
  const decades = Math.min(Math.max(DECADES[0], top - Math.floor(Math.log10(leastPeak)) + 2), DECADES[1]);
  const high = axis === 'linear' ? most * 1.08 : 10 ** top;
  const low = axis === 'linear' ? 0 : 10 ** (top - decades);
  return {
    id: 'rate',
    title: 'dα/dt, 1/s',
    height: 300,
    scale: axis,
    low,
    high,
    ticks: axis === 'linear' ? roundTicks(0, most, 5) : powersWithin(low, high),
    tickText: axis === 'linear' ? (value) => scientific(value, 2) : powerText,
  };
}

/** Broken where the rate jumps; a rate that is not above the axis is not drawn. */
function courseOf({ temperatureK, alpha, ratePerS }: RateCurve, low: number, unit: TemperatureUnit): PlotCourse {
  const x: number[] = [];
  const y: number[] = [];
  alpha.forEach((degree, n) => {
    if (n > 0 && degree === alpha[n - 1] && ratePerS[n] !== ratePerS[n - 1]) {
      x.push(degree);
      y.push(Number.NaN);
    }
    const rate = ratePerS[n] ?? Number.NaN;
    x.push(degree);
    y.push(rate >= 0 && rate >= low ? rate : Number.NaN);
  });
  return {
    strip: 'rate',
    weight: 'light',
    name: '',
    longName: temperatureWords(temperatureK, unit),
    x,
    y,
    text: (value) => `${scientific(value)} 1/s`,
  };
}

function marksOf({ jumps, stallsAt }: RateCurve, course: PlotCourse | undefined, low: number): PlotMark[] {
  if (course === undefined) return [];
  const marks: PlotMark[] = [];
  const add = (shape: PlotMark['shape'], x: number, y: number | undefined, text: string) => {
    if (y !== undefined && Number.isFinite(y))
      marks.push({ strip: 'rate', weight: 'light', shape, x, y, text, side: 'right' });
  };
  const [x, y] = [Array.from(course.x), Array.from(course.y)];
  const peak = y.reduce((best, rate, n) => (rate > (y[best] ?? 0) || Number.isNaN(y[best]) ? n : best), 0);
  add('none', x[peak] ?? 0, y[peak], course.longName);
  for (const degree of jumps) {
    add('square', degree, y[x.indexOf(degree)], '');
    add('square', degree, y[x.lastIndexOf(degree)], '');
  }
  if (stallsAt !== null) add('cross', stallsAt, low, '');
  return marks;
}

function inWords({ temperatureK, alpha, ratePerS }: RateCurve, unit: TemperatureUnit): string {
  const peak = ratePerS.reduce((best, rate, n) => (rate > (ratePerS[best] ?? 0) ? n : best), 0);
  const most = scientific(ratePerS[peak] ?? 0);
  return `At ${temperatureWords(temperatureK, unit)}: fastest ${most} at degree ${plain(alpha[peak] ?? 0, 2)}.`;
}

export function temperatureWords(temperatureK: number, unit: TemperatureUnit): string {
  return figure(temperatureFromCelsius(celsiusFromKelvin(temperatureK), unit), unit, 0);
}
