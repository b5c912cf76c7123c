import type { RunChart, SensorRow } from '../../models/chart/chart.ts';
import { Wide } from '../parts/wide.tsx';
import { clock } from '../words/clock.ts';
import { digitsOf, figure, plain } from '../words/figures.ts';
import { zone } from '../workshop.ts';
import { valueAt } from './value-at.ts';

const ROWS = 24;

/** The run in rows: what happened when, each sensor's extremes and dwells, and readings at even steps. */
export function ChartTable({ chart }: { chart: RunChart }) {
  return (
    <div class="stack section">
      <Instants chart={chart} />
      <Sensors rows={chart.table.sensors} />
      <Courses chart={chart} />
    </div>
  );
}

function Instants({ chart }: { chart: RunChart }) {
  if (chart.table.instants.length === 0) return null;
  return (
    <Wide label="What happened when">
      <table>
        <caption>What happened when</caption>
        <thead>
          <tr>
            <th scope="col">Clock</th>
            <th scope="col" class="figure-cell">
              Hours
            </th>
            <th scope="col">What</th>
          </tr>
        </thead>
        <tbody>
          {chart.table.instants.map((one) => (
            <tr key={one.atH + one.what}>
              <th scope="row">{one.clock}</th>
              <td class="figure-cell">{plain(one.atH, 2)}</td>
              <td>{one.what}</td>
            </tr>
          ))}
        </tbody>
      </table>
    </Wide>
  );
}

function Sensors({ rows }: { rows: readonly SensorRow[] }) {
  const stages = [...new Set(rows.flatMap(({ dwells }) => dwells.map(({ stage }) => stage)))];
  return (
    <Wide label="Each sensor over the run">
      <table>
        <caption>Each sensor over the run</caption>
        <thead>
          <tr>
            <th scope="col">Sensor</th>
            <th scope="col" class="figure-cell">
              Highest
            </th>
            <th scope="col" class="figure-cell">
              Lowest
            </th>
            {stages.map((stage) => (
              <th scope="col" key={stage}>
                In {stage}
              </th>
            ))}
          </tr>
        </thead>
        <tbody>
          {rows.map((row) => (
            <tr key={row.channel}>
              <th scope="row">{row.channel}</th>
              <td class="figure-cell">
                {row.highest ? `${figure(row.highest.value, row.unit)}, ${row.highest.clock}` : 'none'}
              </td>
              <td class="figure-cell">
                {row.lowest ? `${figure(row.lowest.value, row.unit)}, ${row.lowest.clock}` : 'none'}
              </td>
              {stages.map((stage) => (
                <td key={stage}>{dwellOf(row, stage)}</td>
              ))}
            </tr>
          ))}
        </tbody>
      </table>
    </Wide>
  );
}

function dwellOf(row: SensorRow, stage: string): string {
  const dwell = row.dwells.find((one) => one.stage === stage);
  if (!dwell) return '–';
  return dwell.entered === null ? 'did not enter' : `${dwell.entered} to ${dwell.left ?? 'the end'}`;
}

function Courses({ chart }: { chart: RunChart }) {
  const lines = chart.strips.flatMap((axis) =>
    chart.lines.filter(({ strip }) => strip === axis.strip).map((line) => ({ line, unit: axis.unit })),
  );
  const hours = Array.from({ length: ROWS + 1 }, (_, n) => chart.fromH + ((chart.untilH - chart.fromH) * n) / ROWS);
  return (
    <Wide label="Readings in view">
      <table>
        <caption>Readings in view, nearest to each clock time</caption>
        <thead>
          <tr>
            <th scope="col">Clock</th>
            {lines.map(({ line, unit }) => (
              <th scope="col" class="figure-cell" key={line.strip + line.channel}>
                {line.channel}
                <br />
                {line.strip === 'cure' ? 'degree' : unit}
              </th>
            ))}
          </tr>
        </thead>
        <tbody>
          {hours.map((atH) => (
            <tr key={atH}>
              <th scope="row">{clock(chart.zeroMs + atH * 3_600_000, zone.value)}</th>
              {lines.map(({ line, unit }) => (
                <td class="figure-cell" key={line.strip + line.channel}>
                  {cell(valueAt(line, atH), unit)}
                </td>
              ))}
            </tr>
          ))}
        </tbody>
      </table>
    </Wide>
  );
}

function cell(value: number | null, unit: string): string {
  return value === null ? 'none' : plain(value, digitsOf(unit));
}
