import { useState } from 'preact/hooks';
import { useLocation } from 'preact-iso';
import { withQuery } from '../../server/contract/paths.ts';
import type { FailedParts, Holds, HoldView, KinKind, MakeHoldRequest } from '../../server/contract/trace.ts';
import { FAILED_PARTS_PATH, HOLDS_PATH } from '../../server/contract/trace-paths.ts';
import { postJson } from '../api.ts';
import { usePageTitle } from '../page-title.ts';
import { FailedChoice } from '../parts/failed-choice.tsx';
import { AreaField, TextField } from '../parts/field.tsx';
import { Entry, Notebook, PageHead } from '../parts/notebook.tsx';
import { Problem } from '../parts/problem.tsx';
import { Shown } from '../parts/shown.tsx';
import { When } from '../parts/when.tsx';
import { usePost } from '../use-post.ts';
import { useRead } from '../use-read.ts';
import { instantOfWallClock } from '../words/clock.ts';
import { count } from '../words/figures.ts';
import { CLOSE_KIN, KIN_WORDS } from '../words/trace.ts';
import { zone } from '../workshop.ts';

/** From failed parts to everything else in danger, and to what they share. */
export default function TracePage() {
  usePageTitle('Trace');
  const { query } = useLocation();
  const [failed, setFailed] = useState<readonly string[]>(() => (query.failed ?? '').split('\n').filter(Boolean));
  const reading = useRead<FailedParts>(FAILED_PARTS_PATH);
  const holds = useRead<Holds>(HOLDS_PATH);
  return (
    <Notebook>
      <PageHead title="Trace">
        <p class="soft">From a part that failed to everything else in danger, and to what the failed ones share.</p>
      </PageHead>
      <section>
        <h2>Which parts failed</h2>
        <Shown reading={reading} what="Reading the failed parts">
          {(known) => <FailedChoice known={known} failed={failed} onFailed={setFailed} />}
        </Shown>
      </section>
      <section class="section">
        <h2>What else is in danger</h2>
        <HoldForm failed={failed} />
      </section>
      <section class="section">
        <h2>What they share</h2>
        <p>
          Failed parts against sound ones: every figure and name on record, tested exactly, and their runs on one chart.
        </p>
        {failed.length === 0 ? (
          <p class="soft">Choose failed parts first.</p>
        ) : (
          <a
            class="button"
            href={withQuery('/trace/compare', { failed: failed.join('\n'), drawing: drawingOf(failed, reading.value) })}
          >
            Compare {failed.length === 1 ? failed[0] : `the ${failed.length} parts`} with sound ones
          </a>
        )}
      </section>
      <section class="section">
        <h2>Lists that were made</h2>
        <Shown reading={holds} what="Reading the hold lists">
          {({ holds: kept }) => (kept.length === 0 ? <p class="soft">None yet.</p> : <Kept holds={kept} />)}
        </Shown>
      </section>
    </Notebook>
  );
}

/** The drawing that all chosen parts are of, so that they are compared with their like. */
function drawingOf(failed: readonly string[], known: FailedParts | null): string | null {
  const drawings = new Set(
    failed.map((serial) => known?.parts.find((part) => part.serial === serial)?.drawing ?? null),
  );
  return drawings.size === 1 ? ([...drawings][0] ?? null) : null;
}

function Kept({ holds }: { holds: Holds['holds'] }) {
  return (
    <ul class="entries">
      {holds.map(({ hold, why, parts, deed }) => (
        <Entry key={hold} when={<When at={deed.at} />}>
          <div class="head">
            <a href={`/trace/holds/${hold}`}>Hold list {hold}</a>
            <span>{count(parts, 'part')}</span>
          </div>
          <p class="soft">
            {why} · made by {deed.by}
          </p>
        </Entry>
      ))}
    </ul>
  );
}

function HoldForm({ failed }: { failed: readonly string[] }) {
  const { route } = useLocation();
  const [kinds, setKinds] = useState<readonly KinKind[]>(CLOSE_KIN);
  const [from, setFrom] = useState('');
  const [until, setUntil] = useState('');
  const [why, setWhy] = useState('');
  const making = usePost(async () => {
    const request: MakeHoldRequest = {
      failed: [...failed],
      kinds: [...kinds],
      from: instantOf(from, 0),
      until: instantOf(until, 1),
      why,
    };
    const { hold } = await postJson<HoldView>(HOLDS_PATH, request);
    route(`/trace/holds/${hold}`);
  });
  const make = (event: Event) => {
    event.preventDefault();
    void making.post();
  };
  const toggle = (kind: KinKind) =>
    setKinds(kinds.includes(kind) ? kinds.filter((one) => one !== kind) : [...kinds, kind]);
  return (
    <form class="stack" onSubmit={make}>
      <fieldset class="ticks">
        <legend>Parts that share</legend>
        {(Object.keys(KIN_WORDS) as KinKind[]).map((kind) => (
          <label class="tick" key={kind}>
            <input type="checkbox" checked={kinds.includes(kind)} onChange={() => toggle(kind)} />
            {KIN_WORDS[kind]}
          </label>
        ))}
      </fieldset>
      <div class="fields">
        <TextField
          label="Runs from"
          hint="2026-03-01; empty: all"
          pattern="\d{4}-\d{2}-\d{2}"
          value={from}
          onValue={setFrom}
        />
        <TextField
          label="Runs until"
          hint="the whole of that day"
          pattern="\d{4}-\d{2}-\d{2}"
          value={until}
          onValue={setUntil}
        />
      </div>
      <AreaField label="Why the list is made" rows={2} required maxLength={2000} value={why} onValue={setWhy} />
      <p class="soft">
        The list is kept as it is and holds nothing by itself: whoever has the authority decides what is held, and lets
        it go.
      </p>
      {making.problem && <Problem problem={making.problem} kept="What you typed is kept on this page." />}
      <button type="submit" disabled={making.isUnderWay || failed.length === 0 || kinds.length === 0}>
        Make the hold list
      </button>
    </form>
  );
}

/** Midnight of a day in the workshop's zone, days later; what is no day is left for the server to refuse. */
function instantOf(written: string, daysLater: number): string | null {
  if (written.trim() === '') return null;
  const ms = instantOfWallClock(`${written.trim()}T00:00`, zone.value);
  return ms === null ? written : new Date(ms + daysLater * 86_400_000).toISOString();
}
