import type { ComponentChildren } from 'preact';
import { useRef } from 'preact/hooks';
import { roundTicks } from '../../models/chart/ticks.ts';
import { plain } from '../words/figures.ts';
import { useWidth } from './use-width.ts';

/** One line of a plot; `low` and `high` make it a band between suppositions. */
export interface PlotLine {
  readonly name: string;
  readonly look: 'strong' | 'accent' | 'thin' | 'dashed';
  readonly x: readonly number[];
  readonly low: readonly number[];
  readonly high: readonly number[];
}

interface LinePlotProps {
  readonly lines: readonly PlotLine[];
  /** `Temperature, °C`: stands above the axis. */
  readonly yTitle: string;
  /** What x is, at its ends or below: `bag side` and `tool side`. */
  readonly xEnds?: readonly [string, string];
  readonly xTicks: readonly { readonly at: number; readonly text: string }[];
  readonly limit?: { readonly at: number; readonly text: string } | null;
  /** A point that is named in the picture. */
  readonly mark?: { readonly x: number; readonly y: number; readonly text: string } | null;
  /** The picture in words. */
  readonly told: string;
  readonly children?: ComponentChildren;
}

const HEIGHT = 300;
const TOP = 30;
const LEFT = 50;
const BOTTOM = 44;
const LETTER = 8;
const LINE_HEIGHT = 18;

/** Lines over one axis, named at their ends, drawn at their true size. */
export function LinePlot({ lines, yTitle, xEnds, xTicks, limit, mark, told, children }: LinePlotProps) {
  const frame = useRef<HTMLDivElement>(null);
  const width = useWidth(frame);
  const figures = lines
    .flatMap(({ low, high }) => [...low, ...high])
    .concat(limit ? [limit.at] : [], mark ? [mark.y] : []);
  const [least, most] = [Math.min(...figures), Math.max(...figures)];
  const room = Math.max((most - least) * 0.06, 1e-3);
  const [bottom, top] = [least - room, most + room];
  const xs = lines.flatMap((line) => line.x);
  const [first, last] = [Math.min(...xs), Math.max(...xs)];
  const right = Math.min(width * 0.4, LETTER * Math.max(...lines.map(({ name }) => name.length)) + 12);
  const x = (value: number) => LEFT + ((value - first) / (last - first || 1)) * (width - LEFT - right);
  const y = (value: number) => HEIGHT - BOTTOM - ((value - bottom) / (top - bottom)) * (HEIGHT - BOTTOM - TOP);
  const ticks = roundTicks(bottom, top, 5);
  const digits = Math.max(0, -Math.floor(Math.log10((ticks[1] ?? 1) - (ticks[0] ?? 0)) + 1e-9));
  const ends = apart(lines.map(({ low, high }) => y(((low.at(-1) ?? 0) + (high.at(-1) ?? 0)) / 2)));
  return (
    <figure class="cycle-picture line-plot">
      <div ref={frame}>
        {width > 0 && (
          <svg width={width} height={HEIGHT} role="img" aria-label={told}>
            <g class="axis">
              <text x={0} y={14}>
                {yTitle}
              </text>
              {ticks.map((tick) => (
                <g key={tick}>
                  <line x1={LEFT} x2={width - right} y1={y(tick)} y2={y(tick)} />
                  <text x={LEFT - 8} y={y(tick) + 5} text-anchor="end">
                    {plain(tick, digits)}
                  </text>
                </g>
              ))}
              {spaced(xTicks, (width - LEFT - right) / (7 * LETTER)).map(({ at, text }) => (
                <text key={at} x={x(at)} y={HEIGHT - 24} text-anchor="middle">
                  {text}
                </text>
              ))}
              {xEnds && (
                <>
                  <text x={LEFT} y={HEIGHT - 4}>
                    {xEnds[0]}
                  </text>
                  <text x={width - right} y={HEIGHT - 4} text-anchor="end">
                    {xEnds[1]}
                  </text>
                </>
              )}
            </g>
            {limit && (
              <g class="bracket">
                <path d={`M${LEFT},${y(limit.at)}H${width - right}`} />
                <text x={LEFT + 4} y={y(limit.at) - 5}>
                  {limit.text}
                </text>
              </g>
            )}
            {lines.map((line, n) => (
              <g key={line.name} class={`plot-${line.look}`}>
                {isBand(line) && <polygon class="between" points={around(line, x, y)} />}
                <polyline points={points(line.x, line.high, x, y)} />
                {isBand(line) && <polyline points={points(line.x, line.low, x, y)} />}
                <text class="name" x={width - right + 6} y={(ends[n] ?? 0) + 5}>
                  {line.name}
                </text>
              </g>
            ))}
            {mark && (
              <g>
                <circle cx={x(mark.x)} cy={y(mark.y)} r={4} fill="currentColor" />
                <text x={x(mark.x) + 9} y={y(mark.y) - 3}>
                  {mark.text}
                </text>
              </g>
            )}
          </svg>
        )}
      </div>
      <figcaption class="soft small">{children}</figcaption>
    </figure>
  );
}

function isBand({ low, high }: PlotLine): boolean {
  return low.some((figure, i) => figure !== high[i]);
}

type Place = (value: number) => number;

function points(xs: readonly number[], ys: readonly number[], x: Place, y: Place): string {
  return xs.map((at, i) => `${x(at).toFixed(1)},${y(ys[i] ?? 0).toFixed(1)}`).join(' ');
}

function around({ x: xs, low, high }: PlotLine, x: Place, y: Place): string {
  return `${points(xs, high, x, y)} ${points([...xs].reverse(), [...low].reverse(), x, y)}`;
}

/** Heights of names, moved apart so that none lies on another. */
function apart(heights: readonly number[]): number[] {
  const order = heights.map((_, n) => n).sort((a, b) => (heights[a] ?? 0) - (heights[b] ?? 0));
  const placed = [...heights];
  let below = Number.NEGATIVE_INFINITY;
  for (const n of order) {
    placed[n] = Math.max(placed[n] ?? 0, below + LINE_HEIGHT);
    below = placed[n] ?? 0;
  }
  const over = Math.max(0, below - (HEIGHT - BOTTOM));
  return placed.map((height) => height - over);
}

/** As many ticks as have room. */
function spaced<T>(ticks: readonly T[], most: number): readonly T[] {
  const every = Math.max(1, Math.ceil(ticks.length / Math.max(2, Math.floor(most))));
  return ticks.filter((_, n) => n % every === 0);
}
