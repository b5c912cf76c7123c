import { temperatureDifferenceFromCelsius } from '../../models/units.ts';
import type { Thickness } from '../../server/contract/thickness.ts';
import { clock } from '../words/clock.ts';
import { asWritten, figure } from '../words/figures.ts';
import {
  CEILING_MARKS,
  ceilingWords,
  depthWords,
  REACHED_MARKS,
  rangeWords,
  reachedWords,
  temperatureRange,
} from '../words/thickness.ts';
import { shownUnits, zone } from '../workshop.ts';
import { OutcomeMark } from './outcome-mark.tsx';
import { ResinStatusTag } from './resin-status-tag.tsx';

/** The answer in figures and sentences: first how hot, then how far cured, then what it rests on. */
export function ThicknessWords({ answer }: { answer: Thickness }) {
  const unit = shownUnits.value.temperature;
  const hottest = answer.cases.reduce((a, b) => (b.peak.temperatureC > a.peak.temperatureC ? b : a));
  const least = answer.cases.reduce((a, b) => (b.least.degree < a.least.degree ? b : a));
  const thicknessMm = hottest.depthMm.at(-1) ?? 0;
  const difference = (of: (one: Thickness['cases'][number]) => number) => {
    const figures = answer.cases.map((one) => temperatureDifferenceFromCelsius(of(one), unit));
    return rangeWords([Math.min(...figures), Math.max(...figures)], unit, 0);
  };
  const tg = (rangeC: readonly [number, number] | null) =>
    rangeC === null ? '' : `, Tg ${temperatureRange(rangeC, unit)}`;
  return (
    <div class="stack">
      <dl class="facts answer">
        <dt>Hottest inside</dt>
        <dd>
          <b class="lead">{temperatureRange(answer.peakC, unit)}</b>, {depthWords(hottest.peak.depthMm, thicknessMm)} at{' '}
          {clock(hottest.peak.at, zone.value)}; at most {difference(({ overshootC }) => overshootC)} hotter than its
          faces
        </dd>
        <dt>Coldest inside</dt>
        <dd>at most {difference(({ lagC }) => lagC)} behind its faces</dd>
        <dt>Its middle at the end</dt>
        <dd>
          <b class="lead">degree of cure {rangeWords(answer.middleDegree, '', 3)}</b>
          {tg(answer.middleTgC)}
        </dd>
        <dt>Least cured place</dt>
        <dd>
          degree of cure {rangeWords(answer.leastDegree, '', 3)}
          {tg(answer.leastTgC)}, {depthWords(least.least.depthMm, thicknessMm)}
        </dd>
      </dl>
      {answer.ceiling && (
        <p class="finding-line">
          <OutcomeMark mark={CEILING_MARKS[answer.ceiling.stayed]} alone />
          <span>{ceilingWords(answer.ceiling, unit)}</span>
        </p>
      )}
      {answer.reached.map((one) => (
        <p key={one.what} class="finding-line">
          <OutcomeMark mark={REACHED_MARKS[one.throughout]} alone />
          <span>{reachedWords(one, unit)}</span>
        </p>
      ))}
      <p>
        An estimate, not a measurement and by itself no verdict: resin set{' '}
        <a href={`/resins/${encodeURIComponent(answer.resin.code)}`}>{answer.resin.code}</a>{' '}
        <ResinStatusTag status={answer.resin.status} />
        {answer.resin.isCycles ? ', the cycle’s own' : ', chosen here, not named by the cycle'}. Source:{' '}
        {answer.resin.citation}.
      </p>
      <details>
        <summary>What it takes for granted</summary>
        <ul>
          {answer.cases.length > 1 && (
            <li>Worked out for each of these: {answer.cases.map(({ name }) => name).join('; ')}.</li>
          )}
          {answer.cases.length === 1 && <li>Faces: {answer.cases[0]?.name}.</li>}
          {answer.assumptions.map((sentence) => (
            <li key={sentence}>{sentence}</li>
          ))}
          {answer.layers.map((layer) => (
            <li key={layer.name}>
              {layer.name}: {asWritten(layer.thicknessMm, 'mm')}, {figure(layer.densityKgM3, 'kg/m³', 0)},{' '}
              {figure(layer.specificHeatJKgK, 'J/(kg K)', 0)}, {figure(layer.conductivityWMK, 'W/(m K)', 3)}. Source:{' '}
              {layer.source}.
            </li>
          ))}
        </ul>
      </details>
    </div>
  );
}
