import { useRef } from 'preact/hooks';
import type { OverlaidLine } from '../../models/chart/overlay.ts';
import { spreadLabels } from '../../models/chart/spread-labels.ts';
import { hoursWords, roundTicks, timeTicksS } from '../../models/chart/ticks.ts';
import type { OverlayEvent, OverlayStrip } from '../../server/contract/comparison.ts';
import { plain } from '../words/figures.ts';
import { EVENT_WORDS, STRIP_WORDS } from '../words/trace.ts';
import { useWidth } from './use-width.ts';

const LEFT = 50;
const TOP = 30;
const HEIGHT = 260;
const DIFFERENCE_HEIGHT = 110;
const FOOT = 28;
const LETTER = 8;
const LABEL = 16;

type Values = readonly (number | null)[];

/** Failed runs as lines over the band of the sound ones, and below it how far each lies from their middle. */
export function OverlayFigure({ strip, event }: { strip: OverlayStrip; event: OverlayEvent }) {
  const frame = useRef<HTMLDivElement>(null);
  const width = useWidth(frame);
  const { minutes, failed, band, difference } = strip.overlay;
  const title = `${STRIP_WORDS[strip.what]}${strip.unit === '' ? '' : `, ${strip.unit}`}`;
  const right = LETTER * Math.max(6, ...failed.map(({ part }) => Math.min(part.length, 14))) + 12;
  const [first = 0, last = 1] = [minutes[0], minutes.at(-1)];
  const x = (at: number) => LEFT + ((at - first) / (last - first || 1)) * (width - LEFT - right);
  const xTicks = timeTicksS(60 * first, 60 * last, width < 500 ? 4 : 8);
  return (
    <figure class="cycle-picture line-plot overlay">
      <div ref={frame}>
        {width > 0 && (
          <svg width={width} height={HEIGHT + DIFFERENCE_HEIGHT + FOOT} role="img" aria-label={told(strip, event)}>
            <Panel
              title={title}
              top={TOP}
              bottom={HEIGHT}
              x={x}
              end={width - right}
              minutes={minutes}
              lines={failed}
              band={band}
            />
            <Panel
              title="Less the middle of the sound ones"
              top={HEIGHT + 30}
              bottom={HEIGHT + DIFFERENCE_HEIGHT}
              x={x}
              end={width - right}
              minutes={minutes}
              lines={difference}
              band={null}
            />
            <g class="axis">
              {xTicks.map((at) => (
                <text key={at} x={x(at / 60)} y={HEIGHT + DIFFERENCE_HEIGHT + 20} text-anchor="middle">
                  {hoursWords(at)}
                </text>
              ))}
              <line class="event" x1={x(0)} x2={x(0)} y1={TOP} y2={HEIGHT + DIFFERENCE_HEIGHT} />
            </g>
          </svg>
        )}
      </div>
      <figcaption>
        Hours from {EVENT_WORDS[event]}. The band: sound ones, 10th to 90th percentile, their middle dashed.
      </figcaption>
    </figure>
  );
}

interface PanelProps {
  readonly title: string;
  readonly top: number;
  readonly bottom: number;
  readonly x: (minute: number) => number;
  readonly end: number;
  readonly minutes: readonly number[];
  readonly lines: readonly OverlaidLine[];
  readonly band: OverlayStrip['overlay']['band'] | null;
}

function Panel({ title, top, bottom, x, end, minutes, lines, band }: PanelProps) {
  const figures = [...lines.flatMap(({ values }) => values), ...(band ? [...band.low, ...band.high] : [0])].filter(
    (value) => value !== null,
  );
  const [least, most] = [Math.min(...figures), Math.max(...figures)];
  const room = Math.max((most - least) * 0.06, 1e-4);
  const y = (value: number) => bottom - ((value - least + room) / (most - least + 2 * room)) * (bottom - top);
  const ticks = roundTicks(least - room, most + room, bottom - top > 150 ? 5 : 3);
  const digits = Math.max(0, -Math.floor(Math.log10((ticks[1] ?? 1) - (ticks[0] ?? 0)) + 1e-9));
  const names = spreadLabels(
    lines.map(({ values }) => y(values.findLast((value) => value !== null) ?? least)),
    { apart: LABEL, lowest: top, highest: bottom },
  );
  return (
    <>
      <g class="axis">
        <text x={0} y={top - 14}>
          {title}
        </text>
        {ticks.map((tick) => (
          <g key={tick}>
            <line x1={LEFT} x2={end} y1={y(tick)} y2={y(tick)} />
            <text x={LEFT - 8} y={y(tick) + 5} text-anchor="end">
              {plain(tick, digits)}
            </text>
          </g>
        ))}
      </g>
      {band && (
        <g class="sound">
          {stretches(band.low).map(([from, until]) => (
            <path key={from} class="between" d={areaOf(minutes, band, from, until, x, y)} />
          ))}
          <path class="middle" d={pathOf(minutes, band.middle, x, y)} />
        </g>
      )}
      {lines.map(({ part, run, values }, n) => (
        <g key={`${part} ${run}`} class="failed">
          <path d={pathOf(minutes, values, x, y)} />
          {band && (
            <text x={end + 8} y={(names[n] ?? 0) + 5}>
              {part}
            </text>
          )}
        </g>
      ))}
    </>
  );
}

type Scale = (value: number) => number;

function pathOf(minutes: readonly number[], values: Values, x: Scale, y: Scale): string {
  return stretches(values)
    .map(([from, until]) => {
      const points = values.slice(from, until).map((value, i) => point(x(minutes[from + i] ?? 0), y(value ?? 0)));
      return `M${points.join('L')}`;
    })
    .join('');
}

function areaOf(
  minutes: readonly number[],
  { low, high }: OverlayStrip['overlay']['band'],
  from: number,
  until: number,
  x: Scale,
  y: Scale,
): string {
  const places = Array.from({ length: until - from }, (_, i) => from + i);
  const along = (values: Values, order: readonly number[]) =>
    order.map((i) => point(x(minutes[i] ?? 0), y(values[i] ?? 0))).join('L');
  return `M${along(high, places)}L${along(low, places.toReversed())}Z`;
}

/** Where values are present without a break: first and one after the last. */
function stretches(values: Values): [number, number][] {
  const found: [number, number][] = [];
  let from = -1;
  for (let i = 0; i <= values.length; i += 1) {
    const isThere = i < values.length && values[i] !== null;
    if (isThere && from < 0) from = i;
    if (!isThere && from >= 0) {
      found.push([from, i]);
      from = -1;
    }
  }
  return found;
}

function point(x: number, y: number): string {
  return `${x.toFixed(1)} ${y.toFixed(1)}`;
}

/** The picture in words: how far each failed run came to lie from the middle of the sound ones. */
function told({ what, unit, overlay }: OverlayStrip, event: OverlayEvent): string {
  const farthest = overlay.difference.map(({ part, values }) => {
    const [far, at] = values.reduce<[number, number]>(
      (most, value, i) => (value !== null && Math.abs(value) > Math.abs(most[0]) ? [value, i] : most),
      [0, 0],
    );
    const minute = Math.round(overlay.minutes[at] ?? 0);
    return `${part} lies up to ${plain(far, 2)} ${unit} from it, ${minute} min from ${EVENT_WORDS[event]}`;
  });
  return `${STRIP_WORDS[what]}, failed runs over the middle of the sound ones: ${farthest.join('; ')}.`;
}
