import { hoursWords, roundTicks, timeTicksS } from '../../models/chart/ticks.ts';
import { celsiusFromKelvin, type TemperatureUnit, temperatureFromCelsius } from '../../models/units.ts';
import { figure, plain } from '../words/figures.ts';
import { powersWithin, powerText } from '../words/powers.ts';
import type { Trial } from '../words/trial.ts';
import { minutesWords, trialInWords } from '../words/trial-words.ts';
import type { PlotCourse, PlotMark, PlotRail, PlotStrip, ResinPlot, Weight } from './resin-plot.ts';

const WEIGHTS: readonly Weight[] = ['first', 'second'];
/** Decades of viscosity drawn above the least. */
const DECADES = 6;

/** One or two sets along one programme: temperature with Tg, degree of cure, and viscosity where a set has it. */
export function programmePlot(trials: readonly Trial[], unit: TemperatureUnit): ResinPlot {
  const shown = (temperatureK: number) => temperatureFromCelsius(celsiusFromKelvin(temperatureK), unit);
  const longest = trials.reduce((a, b) => (b.cure.timeS.length > a.cure.timeS.length ? b : a)).cure;
  const high = Math.max(...trials.map(({ cure }) => cure.timeS.at(-1) ?? 0)) / 3600;
  const temperature: PlotCourse = {
    strip: 'temperature',
    weight: 'given',
    name: 'T',
    longName: 'Temperature',
    x: longest.timeS.map((s) => s / 3600),
    y: longest.temperatureK.map(shown),
    text: (value) => figure(value, unit),
  };
  const drawn = trials.map((trial, n) => drawTrial(trial, n, trials.length > 1, unit, shown));
  const courses = [temperature, ...drawn.flatMap((one) => one.courses)];
  return {
    low: 0,
    high,
    title: 'hours',
    ticks: (most) => timeTicksS(0, high * 3600, most).map((s) => ({ value: s / 3600, text: hoursWords(s) })),
    textAt: (hours) => hoursWords(Math.round(hours * 60) * 60),
    strips: [temperatureStrip(courses, unit), DEGREE_STRIP, ...viscosityStrip(courses)],
    courses,
    marks: sided(drawn.flatMap((one) => one.marks)),
    rails: drawn.flatMap((one) => one.rails),
    words: trials.map((trial) => trialInWords(trial, unit)).join(' '),
  };
}

function drawTrial(
  { resin, cure }: Trial,
  n: number,
  isOneOfTwo: boolean,
  unit: TemperatureUnit,
  shown: (temperatureK: number) => number,
): { courses: PlotCourse[]; marks: PlotMark[]; rails: PlotRail[] } {
  const weight = WEIGHTS[n] ?? 'second';
  const letter = isOneOfTwo ? ('AB'[n] ?? '') : '';
  const x = cure.timeS.map((s) => s / 3600);
  const course = (strip: string, name: string, longName: string, y: Float64Array, text: PlotCourse['text']) => ({
    strip,
    weight,
    name: `${name} ${letter}`.trim(),
    longName: `${longName} ${letter}`.trim(),
    x,
    y,
    text,
  });
  const courses = [course('degree', '', 'Degree of cure', cure.alpha, (value) => plain(value, 3))];
  if (cure.tgK) courses.push(course('temperature', 'Tg', 'Tg', cure.tgK.map(shown), (value) => figure(value, unit)));
  if (cure.viscosity) {
    const y = cure.viscosity.viscosityPaS;
    courses.push(course('viscosity', '', 'Viscosity', y, (value) => `${Number(value.toPrecision(3))} Pa s`));
  }
  const rails = (cure.outside ?? []).map(({ fromS, untilS }) => ({
    strip: 'temperature',
    row: n,
    fromX: fromS / 3600,
    untilX: untilS / 3600,
  }));
  return { courses, marks: marksOf(resin, cure, weight, shown), rails };
}

function marksOf(
  { gel, kinetics }: Trial['resin'],
  cure: Trial['cure'],
  weight: Weight,
  shown: (temperatureK: number) => number,
): PlotMark[] {
  const marks: PlotMark[] = [];
  const add = (shape: PlotMark['shape'], strip: string, timeS: number, y: number, text: string) =>
    // The switch comes shortly before gel, whose words stand on the right.
    marks.push({ strip, weight, shape, x: timeS / 3600, y, text, side: shape === 'square' ? 'left' : 'right' });
  if (cure.gelS !== null && gel) add('dot', 'degree', cure.gelS, gel.degree, `gels ${minutesWords(cure.gelS)}`);
  if (cure.switchesS !== null && kinetics.law === 'lee-loos-springer') {
    add('square', 'degree', cure.switchesS, kinetics.switchDegree, 'law switches');
  }
  if (cure.stopped !== null) add('cross', 'degree', cure.stopped.timeS, cure.alpha.at(-1) ?? 0, 'cannot go on');
  if (cure.vitrifiesS !== null && cure.tgK) {
    const tgK = cure.tgK[cure.timeS.findIndex((s) => s >= (cure.vitrifiesS ?? 0))] ?? Number.NaN;
    add('diamond', 'temperature', cure.vitrifiesS, shown(tgK), `vitrifies ${minutesWords(cure.vitrifiesS)}`);
  }
  const least = cure.viscosity?.least;
  if (least && Number.isFinite(least.viscosityPaS)) {
    add('triangle', 'viscosity', least.timeS, least.viscosityPaS, `least ${minutesWords(least.timeS)}`);
  }
  return marks;
}

/** Of two sets' marks of a kind the earlier has its words on the left, so that they do not run into each other. */
function sided(marks: readonly PlotMark[]): PlotMark[] {
  return marks.map((mark) => {
    const twin = marks.find(({ shape, weight }) => shape === mark.shape && weight !== mark.weight);
    const isEarlier = twin !== undefined && (mark.x < twin.x || (mark.x === twin.x && mark.weight === 'second'));
    return isEarlier ? { ...mark, side: 'left' } : mark;
  });
}

const DEGREE_STRIP: PlotStrip = {
  id: 'degree',
  title: 'Degree of cure',
  height: 170,
  scale: 'linear',
  low: 0,
  high: 1,
  ticks: [0, 0.25, 0.5, 0.75, 1],
  tickText: String,
};

function temperatureStrip(courses: readonly PlotCourse[], unit: TemperatureUnit): PlotStrip {
  const values = courses.filter(({ strip }) => strip === 'temperature').flatMap(({ y }) => Array.from(y));
  const [least, most] = [values.reduce((a, b) => Math.min(a, b)), values.reduce((a, b) => Math.max(a, b))];
  const span = most - least || 1;
  return {
    id: 'temperature',
    title: `Temperature and Tg, ${unit}`,
    height: 260,
    scale: 'linear',
    // Room at the foot for the rails of both sets.
    low: least - span * 0.12,
    high: most + span * 0.05,
    ticks: roundTicks(least, most, 6),
    tickText: (value) => plain(value, 0),
  };
}

function viscosityStrip(courses: readonly PlotCourse[]): PlotStrip[] {
  const values = courses
    .filter(({ strip }) => strip === 'viscosity')
    .flatMap(({ y }) => Array.from(y))
    .filter((value) => Number.isFinite(value));
  if (values.length === 0) return [];
  const low = 10 ** Math.floor(Math.log10(values.reduce((a, b) => Math.min(a, b))));
  const most = 10 ** Math.ceil(Math.log10(values.reduce((a, b) => Math.max(a, b))));
  const high = Math.max(10 * low, Math.min(most, low * 10 ** DECADES));
  return [
    {
      id: 'viscosity',
      title: 'Viscosity, Pa s',
      height: 150,
      scale: 'logarithmic',
      low,
      high,
      ticks: powersWithin(low, high),
      tickText: powerText,
    },
  ];
}
