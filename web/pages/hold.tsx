import { useRoute } from 'preact-iso';
import { withQuery } from '../../server/contract/paths.ts';
import type { HeldPart, HoldView, Shared } from '../../server/contract/trace.ts';
import { holdCsvPath, holdPath } from '../../server/contract/trace-paths.ts';
import { usePageTitle } from '../page-title.ts';
import { Entry, Notebook, PageHead } from '../parts/notebook.tsx';
import { OutcomeMark, VerdictLine } from '../parts/outcome-mark.tsx';
import { Shown } from '../parts/shown.tsx';
import { When } from '../parts/when.tsx';
import { useRead } from '../use-read.ts';
import { count } from '../words/figures.ts';
import { completenessWords, criteriaWords, reasonWords, whereWords } from '../words/trace.ts';
import { zone } from '../workshop.ts';

/** A hold list as it was kept: every part, why it is on it, and what may be missing. */
export default function HoldPage() {
  const { params } = useRoute();
  usePageTitle(`Hold list ${params.hold ?? ''}`);
  const reading = useRead<HoldView>(holdPath(Number(params.hold)));
  return (
    <Notebook margin={reading.value && <Marks view={reading.value} />}>
      <PageHead title={`Hold list ${params.hold}`}>
        {reading.value && <p class="soft">{reading.value.document.why}</p>}
      </PageHead>
      <Shown reading={reading} what="Reading the hold list">
        {(view) => <Body view={view} />}
      </Shown>
    </Notebook>
  );
}

function Marks({ view: { deed } }: { view: HoldView }) {
  return (
    <dl class="marks">
      <div>
        <dt>
          <When at={deed.at} />
        </dt>
        <dd>made by {deed.by}</dd>
      </div>
    </dl>
  );
}

function Body({ view: { hold, sha256, document } }: { view: HoldView }) {
  const others = document.parts.filter(({ isStart }) => !isStart);
  const shipped = others.filter(({ whereabouts }) => whereabouts?.place === 'shipped').length;
  const unknown = others.filter(({ whereabouts }) => whereabouts === null).length;
  const gaps = completenessWords(document);
  const drawings = new Set(document.parts.filter(({ isStart }) => isStart).map((part) => part.drawing));
  const drawing = drawings.size === 1 ? ([...drawings][0] ?? null) : null;
  return (
    <>
      <p class="lead">
        {count(others.length, 'other part')} may be in danger: {shipped} shipped, {others.length - shipped - unknown} in
        the shop, {unknown} of which it is not on record where they are.
      </p>
      <p>{criteriaWords(document, zone.value)}</p>
      <p>
        This list holds nothing and releases nothing. Sharing something with a failed part is no proof of a fault, and
        not being listed is no proof of soundness: whoever has the authority decides.
      </p>
      <div class="row no-print">
        <button type="button" onClick={() => window.print()}>
          Print
        </button>
        <a class="button" href={holdCsvPath(hold)} download>
          As a spreadsheet (CSV)
        </a>
        <a class="button" href={withQuery('/trace/compare', { failed: document.failed.join('\n'), drawing })}>
          What they share
        </a>
      </div>
      <section class="section">
        <h2>What may be missing</h2>
        {gaps.length === 0 ? (
          <p>Every part has all of this on record.</p>
        ) : (
          <ul>
            {gaps.map((sentence) => (
              <li key={sentence}>{sentence}</li>
            ))}
          </ul>
        )}
      </section>
      <section class="section">
        <h2>Parts</h2>
        <ul class="entries held">
          {document.parts.map((part) => (
            <HeldEntry key={part.serial} part={part} shared={document.shared} failedParts={document.failed.length} />
          ))}
        </ul>
      </section>
      <p class="small soft breakable">SHA-256 {sha256}</p>
    </>
  );
}

function HeldEntry({ part, shared, failedParts }: { part: HeldPart; shared: readonly Shared[]; failedParts: number }) {
  return (
    <Entry when={part.lastRunAt && <When at={part.lastRunAt} />}>
      <div class="head">
        <a href={`/parts/${encodeURIComponent(part.serial)}`}>{part.serial}</a>
        {part.verdict ? <VerdictLine verdict={part.verdict} /> : <span class="soft">not judged</span>}
        {part.failedTests.length > 0 && (
          <span class="outcome-line outcome-not-met">
            <OutcomeMark mark="not-met" />
            Failed {part.failedTests.join(', ')}
          </span>
        )}
      </div>
      <p>
        <b>{whereWords(part.whereabouts)}</b>
        <span class="soft">
          {[part.title, part.drawing, part.quantity > 1 ? `${part.quantity} pieces` : '']
            .filter(Boolean)
            .map((text) => ` · ${text}`)
            .join('')}
        </span>
      </p>
      {part.isStart && <p>The list began from it.</p>}
      <p class="soft">{part.because.map((reason) => reasonWords(reason, shared, failedParts)).join(' · ')}</p>
    </Entry>
  );
}
