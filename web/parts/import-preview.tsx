import type { Preview } from '../../server/contract/imports.ts';
import type { ProblemError } from '../problem-error.ts';
import { clockWithSeconds, dayAndClock, stretch } from '../words/clock.ts';
import { count, figure, plain } from '../words/figures.ts';
import { passedOverWords, repairWords } from '../words/repairs.ts';
import { zone } from '../workshop.ts';
import { Problem } from './problem.tsx';
import { Wide } from './wide.tsx';

/** What the whole file says when it is read by this layout. */
export function PreviewView({ preview }: { preview: Preview }) {
  const every =
    preview.intervalS === null ? '' : `, one every ${plain(preview.intervalS, preview.intervalS % 1 ? 1 : 0)} s`;
  return (
    <div class="stack">
      <p class="lead">
        {preview.scans} scans, {dayAndClock(preview.from, zone.value)};{' '}
        {stretch(preview.from, preview.until, zone.value)}
        {every}.
      </p>
      {preview.repairs.length > 0 && (
        <ul>
          {preview.repairs.map((repair) => (
            <li key={repair.kind + repair.lines.join()}>{repairWords(repair)}</li>
          ))}
        </ul>
      )}
      {preview.passedOver.length > 0 && <p class="soft">{passedOverWords(preview.passedOver)}</p>}
      <Wide label="First scans as read">
        <table>
          <caption class="unseen">First scans as read</caption>
          <thead>
            <tr>
              <th scope="col">Clock</th>
              {preview.channels.map((channel) => (
                <th scope="col" class="figure-cell" key={channel.name}>
                  {channel.name}
                </th>
              ))}
            </tr>
          </thead>
          <tbody>
            {preview.first.slice(0, 5).map((scan) => (
              <tr key={scan.at}>
                <th scope="row">{clockWithSeconds(scan.at, zone.value)}</th>
                {scan.values.map((value, n) => (
                  <td class="figure-cell" key={n}>
                    {value === null ? 'absent' : figure(value, preview.channels[n]?.unit ?? '')}
                  </td>
                ))}
              </tr>
            ))}
          </tbody>
        </table>
      </Wide>
      <p class="soft">{count(preview.channels.length, 'channel')} will be kept.</p>
    </div>
  );
}

/** A refusal that names its line and column, and the one cell that could be taken as no reading. */
export function PreviewProblem({ problem, onMissing }: { problem: ProblemError; onMissing: (cell: string) => void }) {
  const cell = problem.facts.cell;
  const isCell = problem.code === 'log-cell-unreadable' && typeof cell === 'string';
  return (
    <div class="stack">
      <Problem problem={problem} />
      {isCell && (
        <button type="button" onClick={() => onMissing(cell)}>
          Take “{cell}” as no reading, wherever it stands
        </button>
      )}
    </div>
  );
}
