import { hoursWords, timeTicksS } from '../../models/chart/ticks.ts';
import { temperatureFromCelsius } from '../../models/units.ts';
import type { Thickness, ThicknessCase } from '../../server/contract/thickness.ts';
import { dayAndClock } from '../words/clock.ts';
import { asWritten, figure, plain } from '../words/figures.ts';
import { shownUnits, zone } from '../workshop.ts';
import { LinePlot, type PlotLine } from './line-plot.tsx';

/** Hottest and coldest place of the laminate over time, beside what its surface read. */
export function ThicknessCourse({ answer }: { answer: Thickness }) {
  const unit = shownUnits.value.temperature;
  const shown = (temperatureC: number) => temperatureFromCelsius(temperatureC, unit);
  const minutes = answer.cases[0]?.minutes ?? [];
  const course = (name: string, look: PlotLine['look'], of: (one: ThicknessCase) => readonly number[]): PlotLine => ({
    name,
    look,
    x: minutes,
    ...between(
      answer.cases.map((one) => of(one).map(shown)),
      minutes.length,
    ),
  });
  const measured = answer.measured.map(({ channel, isInside, ...read }): PlotLine => {
    const figures = read.temperatureC.map(shown);
    return {
      name: isInside ? `${channel}, inside` : channel,
      look: isInside ? 'dashed' : 'thin',
      x: read.minutes,
      low: figures,
      high: figures,
    };
  });
  const lines = [
    course('coldest', 'accent', ({ coldestC }) => coldestC),
    course('hottest', 'strong', ({ hottestC }) => hottestC),
    ...measured,
  ];
  const hottest = answer.cases.reduce((a, b) => (b.peak.temperatureC > a.peak.temperatureC ? b : a));
  const mark = {
    x: (Date.parse(hottest.peak.at) - Date.parse(answer.from)) / 60_000,
    y: shown(hottest.peak.temperatureC),
    text: figure(shown(hottest.peak.temperatureC), unit, 0),
  };
  const endS = 60 * (minutes.at(-1) ?? 0);
  const [least, most] = answer.peakC.map((peakC) => plain(shown(peakC), 0));
  return (
    <LinePlot
      lines={lines}
      yTitle={`Temperature, ${unit}`}
      xTicks={timeTicksS(0, endS, 8).map((at) => ({ at: at / 60, text: hoursWords(at) }))}
      mark={mark}
      told={`Temperature over ${hoursWords(endS)}: hottest of the laminate ${least} to ${most} ${unit}.`}
    >
      Hours from {dayAndClock(answer.from, zone.value)}.{' '}
      {answer.cases.length > 1 && 'What is not known about the faces makes a band of a line. '}
      Thin lines are readings.
    </LinePlot>
  );
}

/** Degree of cure and Tg through the laminate at the end of the log. */
export function ThicknessProfile({ answer }: { answer: Thickness }) {
  const unit = shownUnits.value.temperature;
  const depths = answer.cases[0]?.depthMm ?? [];
  const degree = between(
    answer.cases.map((one) => one.degree),
    depths.length,
  );
  const tgs = answer.cases.flatMap((one) => (one.tgC === null ? [] : [one.tgC]));
  const tg = between(
    tgs.map((one) => one.map((tgC) => temperatureFromCelsius(tgC, unit))),
    depths.length,
  );
  const asked = (what: 'degree' | 'tg') => answer.reached.find((one) => one.what === what);
  const [askedDegree, askedTg] = [asked('degree'), asked('tg')];
  const end = depths.at(-1) ?? 0;
  const ends = ['bag side', 'tool side'] as const;
  const xTicks = [0, end / 4, end / 2, (3 * end) / 4, end].map((at) => ({ at, text: `${plain(at, 1)} mm` }));
  const tellAt = (figures: { low: readonly number[]; high: readonly number[] }, digits: number) =>
    (['bag side', 'middle', 'tool side'] as const)
      .map((place, n) => {
        const i = Math.round((n * (depths.length - 1)) / 2);
        return `${place} ${plain(figures.low[i] ?? 0, digits)} to ${plain(figures.high[i] ?? 0, digits)}`;
      })
      .join(', ');
  return (
    <div class="profiles">
      <LinePlot
        lines={[{ name: 'degree', look: 'strong', x: depths, ...degree }]}
        yTitle="Degree of cure at the end"
        xEnds={ends}
        xTicks={xTicks}
        limit={askedDegree ? { at: askedDegree.atLeast, text: `asked ${asWritten(askedDegree.atLeast)}` } : null}
        told={`Degree of cure through the thickness: ${tellAt(degree, 3)}.`}
      >
        Depth from the bag side.
      </LinePlot>
      {tgs.length > 0 && (
        <LinePlot
          lines={[{ name: 'Tg', look: 'accent', x: depths, ...tg }]}
          yTitle={`Tg at the end, ${unit}`}
          xEnds={ends}
          xTicks={xTicks}
          limit={askedTg ? limitOf(askedTg.atLeast, askedTg.unit, unit) : null}
          told={`Glass transition through the thickness in ${unit}: ${tellAt(tg, 0)}.`}
        >
          Depth from the bag side.
        </LinePlot>
      )}
    </div>
  );
}

/** Least and greatest of all cases, place by place. */
function between(cases: readonly (readonly number[])[], length: number) {
  const places = Array.from({ length }, (_, i) => cases.map((one) => one[i] ?? Number.NaN));
  return {
    low: places.map((figures) => Math.min(...figures)),
    high: places.map((figures) => Math.max(...figures)),
  };
}

function limitOf(atLeast: number, written: string, unit: '°C' | '°F') {
  const atLeastC = written === '°F' ? ((atLeast - 32) * 5) / 9 : atLeast;
  return { at: temperatureFromCelsius(atLeastC, unit), text: `asked ${asWritten(atLeast, written)}` };
}
