import { useRef } from 'preact/hooks';
import { roundTicks } from '../../models/chart/ticks.ts';
import { glassTransitionK } from '../../models/cure/glass-transition.ts';
import type { GlassTransition } from '../../models/cure/resin.ts';
import { celsiusFromKelvin, temperatureFromCelsius } from '../../models/units.ts';
import { plain } from '../words/figures.ts';
import { shownUnits } from '../workshop.ts';
import { useWidth } from './use-width.ts';

const HEIGHT = 280;
const TOP = 34;
const LEFT = 52;
const BOTTOM = 34;

/** Tg over degree of cure by the set's own law. */
export function TgCurve({
  glassTransition,
  gelDegree,
}: {
  glassTransition: GlassTransition;
  gelDegree: number | null;
}) {
  const frame = useRef<HTMLDivElement>(null);
  const width = useWidth(frame);
  const unit = shownUnits.value.temperature;
  const tgAt = (alpha: number) =>
    temperatureFromCelsius(celsiusFromKelvin(glassTransitionK(alpha, glassTransition)), unit);
  const [low, high] = [tgAt(0), tgAt(1)];
  const x = (alpha: number) => LEFT + alpha * (width - LEFT - 12);
  const y = (tg: number) => HEIGHT - BOTTOM - ((tg - low) / (high - low)) * (HEIGHT - BOTTOM - TOP);
  const points = Array.from({ length: 61 }, (_, n) => `${x(n / 60)},${y(tgAt(n / 60))}`).join(' ');
  const told = [0, 0.25, 0.5, 0.75, 1].map((alpha) => `${alpha}: ${plain(tgAt(alpha), 0)}`).join('; ');
  return (
    <figure class="cycle-picture curve">
      <div ref={frame}>
        {width > 0 && (
          <svg width={width} height={HEIGHT} role="img" aria-label={`Tg in ${unit} at degree of cure ${told}.`}>
            <g class="axis">
              <text x={0} y={14}>
                Tg, {unit}
              </text>
              {roundTicks(low, high, 5).map((tg) => (
                <g key={tg}>
                  <line x1={LEFT} x2={width - 12} y1={y(tg)} y2={y(tg)} />
                  <text x={LEFT - 8} y={y(tg) + 5} text-anchor="end">
                    {plain(tg, 0)}
                  </text>
                </g>
              ))}
              {[0, 0.25, 0.5, 0.75, 1].map((alpha) => (
                <text key={alpha} x={x(alpha)} y={HEIGHT - 10} text-anchor={alpha === 1 ? 'end' : 'middle'}>
                  {alpha}
                </text>
              ))}
            </g>
            <polyline class="course" points={points} />
            {gelDegree !== null && (
              <g>
                <circle cx={x(gelDegree)} cy={y(tgAt(gelDegree))} r={4.5} fill="currentColor" />
                <text x={x(gelDegree) + 10} y={y(tgAt(gelDegree)) + 16}>
                  gels at {gelDegree}, Tg {plain(tgAt(gelDegree), 0)} {unit}
                </text>
              </g>
            )}
          </svg>
        )}
      </div>
      <figcaption class="soft small">Degree of cure along, Tg upwards. An estimate by the set’s own law.</figcaption>
    </figure>
  );
}
