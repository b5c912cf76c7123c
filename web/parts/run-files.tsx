import { runFilePath } from '../../server/contract/paths.ts';
import type { RunSource, RunView } from '../../server/contract/runs.ts';
import { dayAndClock, stretch } from '../words/clock.ts';
import { asWritten, bytes } from '../words/figures.ts';
import { passedOverWords, repairWords } from '../words/repairs.ts';
import { zone } from '../workshop.ts';
import { LayoutWords } from './layout-words.tsx';

/** The files a run was read from: their bytes, what was mended in their time and what was passed over. */
export function RunFiles({ run }: { run: RunView }) {
  return (
    <section class="section">
      <h2>Where the readings come from</h2>
      {run.sources.map((source) => (
        <Source key={source.n} run={run.run} source={source} />
      ))}
    </section>
  );
}

function Source({ run, source }: { run: number; source: RunSource }) {
  return (
    <div class="stack source">
      <ul class="plain-list">
        {source.files.map((file) => (
          <li key={file.n} class="breakable">
            <a href={runFilePath(run, file.n)} download={file.name}>
              {file.name}
            </a>{' '}
            {bytes(file.bytes)} · SHA-256 <code class="soft">{file.sha256}</code>
          </li>
        ))}
      </ul>
      <p>
        {source.layout.format === 'dwellbook-source/1' ? `Logged as it happened, from ${source.layout.name}. ` : ''}
        {source.recorder ? `Recorder ${source.recorder}. ` : ''}
        {source.scans} scans, {stretch(source.from, source.until, zone.value)}. Taken in by {source.recorded.by},{' '}
        {dayAndClock(source.recorded.at, zone.value)}.
      </p>
      {source.joined && (
        <p>
          Joined to the sources before it: it speaks where they did not read
          {source.joined.shiftS === 0 ? '' : `, ${asWritten(source.joined.shiftS, 's')} added to its clock`}. The reason
          given: {source.joined.because}
        </p>
      )}
      {source.repairs.length > 0 ? (
        <div>
          <h3>Mended in its time</h3>
          <ul>
            {source.repairs.map((repair) => (
              <li key={repair.kind + repair.lines.join()}>{repairWords(repair)}</li>
            ))}
          </ul>
        </div>
      ) : (
        <p>Nothing had to be mended in its time.</p>
      )}
      {source.passedOver.length > 0 && <p>{passedOverWords(source.passedOver)}</p>}
      <p class="soft small breakable">
        Chain of its scans <code>{source.chainSha256}</code>
      </p>
      {source.layout.format === 'dwellbook-layout/1' && (
        <details class="no-print">
          <summary>The layout it was read by</summary>
          <LayoutWords layout={source.layout} />
          <p>
            <a href={`/runs/${run}/sources/${source.n}`}>Read these files again by a layout put right</a>
          </p>
        </details>
      )}
    </div>
  );
}
