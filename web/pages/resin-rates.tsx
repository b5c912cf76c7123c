import { useMemo, useState } from 'preact/hooks';
import { type RateCurve, rateCurve } from '../../models/cure/rate-curve.ts';
import type { Resin } from '../../models/cure/resin.ts';
import { celsiusFrom, kelvinFromCelsius } from '../../models/units.ts';
import { type RateAxis, rateCurvePlot, temperatureWords } from '../charts/rate-curve-plot.ts';
import { ResinPlotFigure } from '../charts/resin-plot-figure.tsx';
import { keepInPageQuery, readPageQuery } from '../page-query.ts';
import { TextField } from '../parts/field.tsx';
import { asWritten, plain } from '../words/figures.ts';
import { firstRateTemperatures, readRateTemperatures } from '../words/rate-temperatures.ts';
import { shownUnits } from '../workshop.ts';

/** The rate of cure over degree at temperatures the person chooses, by the integrator's own law. */
export function ResinRates({ resin }: { resin: Resin }) {
  const unit = shownUnits.value.temperature;
  const [typed, setTyped] = useState(() => readPageQuery().get(`rates-${unit.slice(1)}`));
  const [axis, setAxis] = useState<RateAxis>('logarithmic');
  const first = firstRateTemperatures(resin.validC, unit).join(', ');
  const text = typed ?? first;
  const read = readRateTemperatures(text, unit);
  const curves = useMemo(
    () => read.temperatures.map((t) => rateCurve(resin, kelvinFromCelsius(celsiusFrom(t, unit)))),
    [resin, text, unit],
  );
  const plot = useMemo(() => rateCurvePlot(curves, axis, unit), [curves, axis, unit]);
  const type = (next: string) => {
    setTyped(next);
    const isWrong = readRateTemperatures(next, unit).wrong !== null;
    if (!isWrong) keepInPageQuery({ [`rates-${unit.slice(1)}`]: next === first ? null : next });
  };
  return (
    <section class="section stack">
      <h2>Rate of cure over degree</h2>
      <div class="rate-choice no-print">
        <TextField
          label={`At temperatures, ${unit}`}
          value={text}
          wrong={read.wrong}
          hint={resin.validC ? 'Up to six, one after another.' : 'The set writes no range: these are chosen here.'}
          onValue={type}
        />
        <fieldset class="row">
          <legend>Axis</legend>
          <button
            type="button"
            class="quiet"
            aria-pressed={axis === 'logarithmic'}
            onClick={() => setAxis('logarithmic')}
          >
            Logarithmic
          </button>
          <button type="button" class="quiet" aria-pressed={axis === 'linear'} onClick={() => setAxis('linear')}>
            Linear
          </button>
        </fieldset>
      </div>
      {plot ? (
        <ResinPlotFigure plot={plot} name="Rates">
          <RateWords resin={resin} curves={curves} />
        </ResinPlotFigure>
      ) : (
        read.wrong === null && <p>By this set nothing reacts at these temperatures.</p>
      )}
    </section>
  );
}

/** What the law does that a picture alone would hide. */
function RateWords({ resin, curves }: { resin: Resin; curves: readonly RateCurve[] }) {
  const unit = shownUnits.value.temperature;
  const jump = curves.flatMap(({ jumps }) => jumps)[0];
  const { validC } = resin;
  const beyond = curves.filter(
    ({ temperatureK: k }) => validC && (k < kelvinFromCelsius(validC[0]) || k > kelvinFromCelsius(validC[1])),
  );
  return (
    <figcaption class="soft small stack">
      <p>Degree of cure along. By the set’s own law, as every estimate with it is worked out.</p>
      {jump !== undefined && (
        <p>
          Squares: at degree {asWritten(jump)} the law passes from one form to the other and the rate jumps; a cure is
          stopped exactly there and goes on by the other form.
        </p>
      )}
      {resin.kinetics.law === 'isoconversional' && (
        <p>
          Known from degree {asWritten(resin.kinetics.degree[0] ?? 0)} to {asWritten(resin.kinetics.degree.at(-1) ?? 1)}
          ; beyond, nothing is said to react.
        </p>
      )}
      {curves.map(
        ({ temperatureK, stallsAt, negative }) =>
          (stallsAt !== null || negative !== null) && (
            <p class="stands-still" key={temperatureK}>
              At {temperatureWords(temperatureK, unit)} the set stands still
              {stallsAt !== null && ` at degree ${plain(stallsAt, 4)}`}
              {negative !== null && `; its rate is below 0 from there to degree ${plain(negative[1], 3)}`}. Nothing is
              drawn there, and a cure that comes there is refused.
            </p>
          ),
      )}
      {beyond.length > 0 && validC && (
        <p>
          Outside the range it was fitted in, {asWritten(validC[0])} to {asWritten(validC[1], '°C')}:{' '}
          {beyond.map(({ temperatureK }) => temperatureWords(temperatureK, unit)).join(', ')}.
        </p>
      )}
    </figcaption>
  );
}
