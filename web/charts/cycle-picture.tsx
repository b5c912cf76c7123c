import { useRef } from 'preact/hooks';
import type { Cycle } from '../../models/cycle/cycle.ts';
import { bandWords, rateUnitOf } from '../../models/cycle/words-of-figures.ts';
import { asWritten } from '../words/figures.ts';
import { CycleBands } from './cycle-bands.tsx';
import { type CycleShape, shapeOfCycle } from './cycle-shape.ts';
import { CycleWindows } from './cycle-windows.tsx';
import { useWidth } from './use-width.ts';

const LEFT = 48;
const TOP = 44;
const COURSE_HEIGHT = 280;
const WINDOW_HEIGHT = 52;

/** The cycle as a sketch: the course between its bands, rates as wedges, windows as brackets below. */
export function CyclePicture({ cycle, lit }: { cycle: Cycle; lit: string | null }) {
  const frame = useRef<HTMLDivElement>(null);
  const width = useWidth(frame);
  const shape = shapeOfCycle(cycle);
  const height = TOP + COURSE_HEIGHT + 28 + shape.windows.length * WINDOW_HEIGHT;
  return (
    <figure class="cycle-picture">
      <div ref={frame}>
        {width > 0 && (
          <svg width={width} height={height} viewBox={`0 0 ${width} ${height}`} role="img" aria-label={inWords(cycle)}>
            <Course cycle={cycle} shape={shape} width={width} lit={lit} />
          </svg>
        )}
      </div>
      <figcaption class="soft small">
        Drawn to be read, not to scale: one course that would keep every limit.
      </figcaption>
    </figure>
  );
}

function Course({ cycle, shape, width, lit }: { cycle: Cycle; shape: CycleShape; width: number; lit: string | null }) {
  const floor = TOP + COURSE_HEIGHT;
  const x = (minute: number) => LEFT + (minute / shape.lengthMin) * (width - LEFT - 8);
  const y = (temperature: number) =>
    floor - ((temperature - shape.lowest) / (shape.highest - shape.lowest)) * (COURSE_HEIGHT - 12);
  const points = shape.stages.map((s) => `${x(s.untilMin)},${y(s.untilTemperature)}`);
  return (
    <>
      <Axis cycle={cycle} shape={shape} y={y} width={width} />
      <CycleBands cycle={cycle} shape={shape} x={x} y={y} lit={lit} />
      <polyline class="course" points={[`${x(0)},${y(shape.lowest)}`, ...points].join(' ')} />
      <CycleWindows cycle={cycle} shape={shape} x={x} top={floor + 28} rowHeight={WINDOW_HEIGHT} lit={lit} />
    </>
  );
}

function Axis({
  cycle,
  shape,
  y,
  width,
}: {
  cycle: Cycle;
  shape: CycleShape;
  y: (t: number) => number;
  width: number;
}) {
  const levels = [...new Set([shape.lowest, ...shape.stages.map((s) => s.untilTemperature)])].sort((a, b) => a - b);
  const apart = levels.filter((level, n) => n === 0 || y(levels[n - 1] ?? 0) - y(level) > 15);
  return (
    <g class="axis">
      <text x={0} y={16}>
        {cycle.units.temperature}
      </text>
      {apart.map((level) => (
        <g key={level}>
          <line x1={LEFT} x2={width} y1={y(level)} y2={y(level)} />
          <text x={LEFT - 8} y={y(level) + 5} text-anchor="end">
            {asWritten(level)}
          </text>
        </g>
      ))}
    </g>
  );
}

function inWords(cycle: Cycle): string {
  const stages = cycle.stages.map((stage) =>
    stage.kind === 'dwell'
      ? `${stage.name} at ${stage.target} ${cycle.units.temperature}${stage.time ? `, ${bandWords(stage.time, 'min')}` : ''}`
      : `${stage.name}${stage.rate ? `, ${bandWords(stage.rate, rateUnitOf(cycle))}` : ''}`,
  );
  return `Sketch of the cycle: ${stages.join('; ')}. Every limit is said in words beside it.`;
}
