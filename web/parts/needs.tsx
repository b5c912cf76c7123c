import type { ImportLine } from '../../server/contract/imports.ts';
import type { Need } from '../../server/contract/now.ts';
import { bytes, count, listed } from '../words/figures.ts';
import { DueEntry, keyOfDue } from './due-entry.tsx';
import { Entry } from './notebook.tsx';
import { OutcomeMark } from './outcome-mark.tsx';
import { RunEntry } from './run-entry.tsx';
import { When } from './when.tsx';

const FIRST = 6;

/** What waits for a person, most pressing first, each with the one thing to do. */
export function Needs({ needs }: { needs: readonly Need[] }) {
  const entry = (need: Need) => <NeedEntry key={keyOf(need)} need={need} />;
  return (
    <section>
      <h2>Needs someone</h2>
      {needs.length === 0 ? (
        <p class="soft">Nothing waits for anyone. Every run has its load, every suspect is decided.</p>
      ) : (
        <>
          <ul class="entries">{needs.slice(0, FIRST).map(entry)}</ul>
          {needs.length > FIRST && (
            <details>
              <summary>{count(needs.length - FIRST, 'more thing')} that can wait a little</summary>
              <ul class="entries">{needs.slice(FIRST).map(entry)}</ul>
            </details>
          )}
        </>
      )}
    </section>
  );
}

function NeedEntry({ need }: { need: Need }) {
  switch (need.kind) {
    case 'awaiting-load':
      return (
        <RunEntry line={need.run}>
          <a class="button" href={`/runs/${need.run.run}/load`}>
            Say what was in it
          </a>
        </RunEntry>
      );
    case 'undecided-suspect':
      return (
        <RunEntry line={need.run}>
          <a class="button" href={`/runs/${need.run.run}`}>
            Decide on {listed(need.channels)}
          </a>
        </RunEntry>
      );
    case 'cannot-tell':
      return <RunEntry line={need.run} />;
    case 'unread-file':
      return <UnreadFile file={need.import} />;
    default:
      return <DueEntry need={need} />;
  }
}

/** A file that came in and is no run yet, and why not. */
export function UnreadFile({ file }: { file: ImportLine }) {
  return (
    <Entry when={<When at={file.received.at} />}>
      <div class="head">
        <a class="breakable" href={`/imports/${file.id}`}>
          {file.name}
        </a>
        <span class="outcome-line outcome-awaits">
          <OutcomeMark mark="awaits" />
          Not read yet
        </span>
      </div>
      <p class="soft">{[bytes(file.bytes), file.recorder, ORIGINS[file.origin]].filter(Boolean).join(' · ')}</p>
      <p>{file.problem?.detail ?? 'Its layout waits to be confirmed.'}</p>
    </Entry>
  );
}

const ORIGINS = {
  upload: 'handed in on a page',
  'watched-folder': 'from the watched folder',
  command: 'from the command line',
};

function keyOf(need: Need): string {
  if (need.kind === 'unread-file') return `file ${need.import.id}`;
  return 'run' in need ? `${need.kind} ${need.run.run}` : keyOfDue(need);
}
