import { useState } from 'preact/hooks';
import { useLocation } from 'preact-iso';
import type { Compared, Overlaid, OverlayEvent } from '../../server/contract/comparison.ts';
import { withQuery } from '../../server/contract/paths.ts';
import { comparePath, overlayPath, type ScopeWords } from '../../server/contract/trace-paths.ts';
import { OverlayFigure } from '../charts/overlay-figure.tsx';
import { usePageTitle } from '../page-title.ts';
import { ComparedFactors } from '../parts/compared-factors.tsx';
import { ChoiceField, TextField } from '../parts/field.tsx';
import { Notebook, PageHead } from '../parts/notebook.tsx';
import { Shown } from '../parts/shown.tsx';
import { useRead } from '../use-read.ts';
import { count, listed } from '../words/figures.ts';
import { EVENT_WORDS } from '../words/trace.ts';

type Asked = Readonly<Record<string, string | undefined>>;

/** What failed parts share that sound ones do not, and their runs laid over each other. */
export default function ComparePage() {
  usePageTitle('Failed against sound');
  const { query, route } = useLocation();
  const asked = query as Asked;
  const scope = scopeOf(asked);
  const event = (asked.event ?? 'heat-on') as OverlayEvent;
  const change = (words: Asked) => route(withQuery('/trace/compare', { ...scope, event, ...words }), true);
  const compared = useRead<Compared>(comparePath(scope));
  return (
    <Notebook>
      <PageHead title="Failed against sound">
        <p class="soft">
          {scope.failed
            ? `Failed: ${listed(scope.failed.split('\n'))}.`
            : 'Failed: every part in scope with a failed test.'}
        </p>
      </PageHead>
      <ScopeForm scope={scope} onScope={change} />
      <p class="notice">
        What goes with failure need not be the reason for it. This page points to where to look; a test, a micrograph or
        a repeat tells.
      </p>
      <Shown reading={compared} what="Comparing the parts, their readings and records">
        {(answer) => (
          <>
            <Scope compared={answer} />
            <ComparedFactors comparison={answer.comparison} />
            <Overlays scope={scope} event={event} onEvent={(next) => change({ event: next })} />
          </>
        )}
      </Shown>
    </Notebook>
  );
}

function scopeOf({ failed, drawing, cycle, from, until, sound }: Asked): ScopeWords {
  return {
    ...(failed ? { failed } : {}),
    ...(drawing ? { drawing } : {}),
    ...(cycle ? { cycle } : {}),
    ...(from ? { from } : {}),
    ...(until ? { until } : {}),
    ...(sound ? { sound } : {}),
  };
}

function ScopeForm({ scope, onScope }: { scope: ScopeWords; onScope: (words: Asked) => void }) {
  const [drawing, setDrawing] = useState(scope.drawing ?? '');
  const [cycle, setCycle] = useState(scope.cycle ?? '');
  const [sound, setSound] = useState(scope.sound ?? 'others');
  const look = (event: Event) => {
    event.preventDefault();
    onScope({ drawing: drawing.trim(), cycle: cycle.trim(), sound });
  };
  return (
    <form class="filters scope-form" onSubmit={look}>
      <div class="fields">
        <TextField label="Drawing" hint="empty: all" value={drawing} onValue={setDrawing} />
        <TextField label="Cycle" hint="SR-180, or SR-180/B" value={cycle} onValue={setCycle} />
        <ChoiceField
          label="Sound are"
          choices={[
            { value: 'others', text: 'all others in scope' },
            { value: 'passed', text: 'those that passed a test' },
          ]}
          value={sound}
          onValue={setSound}
        />
      </div>
      <button type="submit">Compare</button>
    </form>
  );
}

function Scope({ compared: { parts, untested, leftOut, comparison } }: { compared: Compared }) {
  const failed = parts.filter((part) => part.failed);
  return (
    <section class="section">
      <p>
        {count(comparison.parts.failed, 'failed part')} ({listed(failed.slice(0, 12).map(({ serial }) => serial))}
        {failed.length > 12 ? ' and others' : ''}) against {count(comparison.parts.sound, 'sound one')}; figures are
        those of each part’s first run in scope.
        {untested > 0 && ` Of ${untested} of the sound ones no passed test is on record.`}
      </p>
      {leftOut.length > 0 && (
        <details>
          <summary>{count(leftOut.length, 'part')} left out</summary>
          <ul>
            {leftOut.map(({ serial, because }) => (
              <li key={serial}>
                {serial}: {because}
              </li>
            ))}
          </ul>
        </details>
      )}
    </section>
  );
}

function Overlays({
  scope,
  event,
  onEvent,
}: {
  scope: ScopeWords;
  event: OverlayEvent;
  onEvent: (event: string) => void;
}) {
  const reading = useRead<Overlaid>(overlayPath(scope, event));
  return (
    <section class="section">
      <h2>Laid over each other</h2>
      <div class="no-print">
        <ChoiceField
          label="Aligned on"
          choices={Object.entries(EVENT_WORDS).map(([value, text]) => ({ value, text }))}
          value={event}
          onValue={onEvent}
        />
      </div>
      <Shown reading={reading} what="Reading the runs">
        {({ failed, sound, soundInScope, leftOut, strips }) => (
          <>
            <p>
              {count(failed, 'failed part')} as lines, {count(sound, 'sound one')} as a band from the 10th to the 90th
              percentile with its middle, all from {EVENT_WORDS[event]}.
              {sound < soundInScope && ` ${soundInScope} are in scope.`}
              {leftOut.length > 0 && ` Left out: ${listed(leftOut.map(({ serial }) => serial).slice(0, 20))}.`}
            </p>
            {strips.map((strip) => (
              <OverlayFigure key={strip.what} strip={strip} event={event} />
            ))}
          </>
        )}
      </Shown>
    </section>
  );
}
