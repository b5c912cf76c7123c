import { useState } from 'preact/hooks';
import type { EnterRequest, Pushed, SourceView } from '../../server/contract/live.ts';
import { sourcePath, sourceReadingsPath } from '../../server/contract/paths.ts';
import { postJson } from '../api.ts';
import { usePost } from '../use-post.ts';
import { useRead } from '../use-read.ts';
import { asWritten } from '../words/figures.ts';
import { FIGURE_PATTERN, instantIn, numberIn } from '../words/typed.ts';
import { zone } from '../workshop.ts';
import { TextField } from './field.tsx';
import { Problem } from './problem.tsx';

/** What a person read off gauges, with how well it can be told. */
export function GaugeEntry({ source, onEntered }: { source: number; onEntered: () => void }) {
  const document = useRead<SourceView>(sourcePath(source)).value?.document;
  const [typed, setTyped] = useState<Readonly<Record<string, string>>>({});
  const [at, setAt] = useState('');
  const [said, setSaid] = useState('');
  const entering = usePost(async () => {
    setSaid('');
    const instant = instantIn(at, zone.value);
    const values = Object.fromEntries(
      Object.entries(typed).flatMap(([column, text]) => (text.trim() === '' ? [] : [[column, numberIn(text)]])),
    );
    const request: EnterRequest = { ...(instant === null ? {} : { at: instant }), values };
    const { kept, refused } = await postJson<Pushed>(sourceReadingsPath(source), request);
    setSaid(kept > 0 ? 'Written down.' : (refused[0]?.because ?? 'It was on record already.'));
    if (kept > 0) setTyped({});
    onEntered();
  });
  if (document === undefined || document.reads.kind !== 'gauge') return null;
  const { readingError } = document.reads;
  return (
    <form
      class="stack gauge"
      onSubmit={(event) => {
        event.preventDefault();
        void entering.post();
      }}
    >
      <div class="fields">
        {document.channels.map(({ name, column, unit }) => (
          <TextField
            key={name}
            label={`${name}, ${unit}`}
            hint={`to within ${asWritten(readingError[name] ?? 0, unit)}`}
            inputMode="decimal"
            pattern={FIGURE_PATTERN}
            value={typed[column] ?? ''}
            onValue={(text) => setTyped({ ...typed, [column]: text })}
          />
        ))}
        <TextField label="Read at" hint="Left empty: now" type="datetime-local" step={1} value={at} onValue={setAt} />
      </div>
      {entering.problem && <Problem problem={entering.problem} kept="What you typed is kept on this page." />}
      <div class="row">
        <button
          type="submit"
          disabled={entering.isUnderWay || Object.values(typed).every((text) => text.trim() === '')}
        >
          Write the reading down
        </button>
        <span role="status">{said}</span>
      </div>
    </form>
  );
}
