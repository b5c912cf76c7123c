import { useState } from 'preact/hooks';
import type { SourceLine, SourceView } from '../../server/contract/live.ts';
import { sourcePath } from '../../server/contract/paths.ts';
import { useRead } from '../use-read.ts';
import { dayAndClock } from '../words/clock.ts';
import { asWritten, count, figure } from '../words/figures.ts';
import { SOURCE_KIND_WORDS, SOURCE_STATE_WORDS } from '../words/live.ts';
import { formOfSource } from '../words/source-form.ts';
import { sentence } from '../words/verdicts.ts';
import { zone } from '../workshop.ts';
import { GaugeEntry } from './gauge-entry.tsx';
import { OutcomeMark } from './outcome-mark.tsx';
import { Shown } from './shown.tsx';
import { SourceFormView } from './source-form.tsx';
import { SourceRest } from './source-rest.tsx';
import { Wide } from './wide.tsx';

const MARKS = {
  sending: 'pending',
  resting: 'awaits',
  silent: 'cannot-tell',
  'cannot-be-reached': 'not-met',
  'cannot-be-kept': 'not-met',
} as const;

/** A source on one entry: how it does and why; its latest figures and settings on asking. */
export function SourceEntry({ line, onChanged }: { line: SourceLine; onChanged: () => void }) {
  const [isOpen, setIsOpen] = useState(false);
  return (
    <li class="entry">
      <div class="head">
        <h3>{line.name}</h3>
        <span class="soft">{SOURCE_KIND_WORDS[line.kind]}</span>
        <span class={`outcome-line outcome-${MARKS[line.state]}`}>
          <OutcomeMark mark={MARKS[line.state]} />
          {SOURCE_STATE_WORDS[line.state]} since {dayAndClock(line.since, zone.value)}
        </span>
      </div>
      {line.because && <p>{sentence(line.because)}</p>}
      <p class="soft">
        {line.lastScan ? `Last scan ${dayAndClock(line.lastScan, zone.value)}. ` : 'No scan has come yet. '}
        {line.keptFrom && `${count(line.kept, 'scan')} kept since ${dayAndClock(line.keptFrom, zone.value)}.`}
      </p>
      {line.kind === 'gauge' && <GaugeEntry source={line.id} onEntered={onChanged} />}
      <details onToggle={(event) => setIsOpen(event.currentTarget.open)}>
        <summary>Latest figures, settings of {line.name}</summary>
        {isOpen && <Opened line={line} onChanged={onChanged} />}
      </details>
    </li>
  );
}

function Opened({ line, onChanged }: { line: SourceLine; onChanged: () => void }) {
  const reading = useRead<SourceView>(sourcePath(line.id));
  const changed = () => {
    reading.again();
    onChanged();
  };
  return (
    <Shown reading={reading} what="Reading the source">
      {(source) => (
        <div class="stack">
          <Latest source={source} />
          <button type="button" class="quiet" onClick={reading.again}>
            Look again
          </button>
          {source.notes.length > 0 && (
            <ul class="small">
              {source.notes.slice(-8).map((note) => (
                <li key={note.at + note.text}>
                  {dayAndClock(note.at, zone.value)}: {sentence(note.text)}
                </li>
              ))}
            </ul>
          )}
          <section>
            <h3>Settings</h3>
            <p class="soft small">
              Set by {source.set.by}, {dayAndClock(source.set.at, zone.value)} ·{' '}
              <code>{source.sha256.slice(0, 16)}</code>
            </p>
            <SourceFormView
              key={source.sha256}
              vessel={line.vessel}
              start={formOfSource(source.document)}
              path={sourcePath(line.id)}
              onSaved={changed}
            />
          </section>
          <SourceRest line={line} onChanged={changed} />
        </div>
      )}
    </Shown>
  );
}

/** The latest figures: as they came, and scaled. */
function Latest({ source }: { source: SourceView }) {
  return (
    <Wide label={`Latest figures of ${source.name}, raw beside scaled`}>
      <table>
        <thead>
          <tr>
            <th scope="col">Channel</th>
            <th scope="col" class="figure-cell">
              Raw
            </th>
            <th scope="col" class="figure-cell">
              Scaled
            </th>
          </tr>
        </thead>
        <tbody>
          {source.latest.map((one) => (
            <tr key={one.channel}>
              <th scope="row">{one.channel}</th>
              <td class="figure-cell">{one.raw === null ? 'absent' : asWritten(Number(one.raw.toPrecision(8)))}</td>
              <td class="figure-cell">{figure(one.value, one.unit)}</td>
            </tr>
          ))}
        </tbody>
      </table>
    </Wide>
  );
}
