import type { Cycle, RateLimit } from '../../models/cycle/cycle.ts';
import { bandWords, lowerOf, rateUnitOf, upperOf } from '../../models/cycle/words-of-figures.ts';
import { asWritten } from '../words/figures.ts';
import type { CycleShape, ShapeStage } from './cycle-shape.ts';

interface Scales {
  readonly x: (minute: number) => number;
  readonly y: (temperature: number) => number;
}

/** Dwell bands between their opening and closing, and rates as wedges over the temperatures they cover. */
export function CycleBands({
  cycle,
  shape,
  lit,
  ...scales
}: { cycle: Cycle; shape: CycleShape; lit: string | null } & Scales) {
  return (
    <g>
      {cycle.ceiling !== undefined && (
        <g class={lit === 'ceiling' ? 'ceiling lit' : 'ceiling'}>
          <line
            x1={scales.x(0)}
            x2={scales.x(shape.lengthMin)}
            y1={scales.y(cycle.ceiling)}
            y2={scales.y(cycle.ceiling)}
          />
          <text x={scales.x(0) + 4} y={scales.y(cycle.ceiling) + 16}>
            ceiling {asWritten(cycle.ceiling, cycle.units.temperature)}
          </text>
        </g>
      )}
      {shape.stages.map((s) => (
        <g key={s.stage.name} class={lit === s.stage.name ? 'stage lit' : 'stage'}>
          {s.stage.kind === 'dwell' ? (
            <DwellBand s={s} {...scales} />
          ) : (
            s.stage.rate && <RateWedge cycle={cycle} s={s} rate={s.stage.rate} {...scales} />
          )}
        </g>
      ))}
    </g>
  );
}

function DwellBand({ s, x, y }: { s: ShapeStage } & Scales) {
  const dwell = s.stage;
  if (dwell.kind !== 'dwell') return null;
  const top = y(upperOf(dwell));
  const middle = (x(s.fromMin) + x(s.untilMin)) / 2;
  const isRoomy = x(s.untilMin) - x(s.fromMin) > 90;
  return (
    <>
      <rect
        class="band"
        x={x(s.fromMin)}
        y={top}
        width={x(s.untilMin) - x(s.fromMin)}
        height={Math.max(3, y(lowerOf(dwell)) - top)}
      />
      <line class="mark" x1={x(s.fromMin)} x2={x(s.fromMin)} y1={top - 6} y2={y(lowerOf(dwell)) + 40} />
      <line class="mark" x1={x(s.untilMin)} x2={x(s.untilMin)} y1={top - 6} y2={y(lowerOf(dwell)) + 40} />
      <text class="name" x={middle} y={y(lowerOf(dwell)) + 18} text-anchor="middle">
        {dwell.name}
      </text>
      {dwell.time && isRoomy && (
        <text x={middle} y={y(lowerOf(dwell)) + 35} text-anchor="middle">
          {bandWords(dwell.time, 'min')}
        </text>
      )}
    </>
  );
}

/** The slowest and the fastest way over the range, from one corner; a rate with one side only opens to it. */
function RateWedge({ cycle, s, rate, x, y }: { cycle: Cycle; s: ShapeStage; rate: RateLimit } & Scales) {
  const [first, last] = rate.over;
  const travel = s.untilTemperature - s.fromTemperature;
  if (travel === 0) return null;
  const perMinute = (value: number) => (cycle.units.rate?.endsWith('/h') ? value / 60 : value);
  const minuteAt = (temperature: number) =>
    s.fromMin + ((temperature - s.fromTemperature) / travel) * (s.untilMin - s.fromMin);
  const corner = minuteAt(first);
  const drawn = Math.abs(last - first) / Math.max(1e-9, minuteAt(last) - corner);
  const fast = rate.atMost === undefined ? drawn * 1.3 : Math.min(perMinute(rate.atMost), drawn * 3);
  const slow = rate.atLeast === undefined ? drawn / 1.3 : Math.max(perMinute(rate.atLeast), drawn / 1.3);
  const reach = (speed: number) => corner + Math.abs(last - first) / speed;
  const heating = last > first;
  return (
    <>
      <path
        class="wedge"
        d={`M${x(corner)},${y(first)} L${x(reach(fast))},${y(last)} L${x(reach(slow))},${y(last)} Z`}
      />
      <text
        class="rate"
        x={heating ? x(corner) + 12 : x(minuteAt(last)) - 12}
        y={y(heating ? first : last) + 4}
        text-anchor={heating ? 'start' : 'end'}
      >
        {bandWords(rate, rateUnitOf(cycle))}
      </text>
    </>
  );
}
