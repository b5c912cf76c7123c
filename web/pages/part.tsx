import { useRoute } from 'preact-iso';
import type { PartView } from '../../server/contract/parts.ts';
import { partPath } from '../../server/contract/paths.ts';
import { partPapersPath } from '../../server/contract/record-paths.ts';
import { usePageTitle } from '../page-title.ts';
import { AuditEntries } from '../parts/audit-entries.tsx';
import { LabelLink } from '../parts/label-link.tsx';
import { Notebook, PageHead } from '../parts/notebook.tsx';
import { OutcomeMark, VerdictLine } from '../parts/outcome-mark.tsx';
import { PaperSection } from '../parts/papers.tsx';
import { PartDangerSection } from '../parts/part-danger.tsx';
import { PartLayup } from '../parts/part-layup.tsx';
import { PartMaterialsSection } from '../parts/part-materials.tsx';
import { PartNonconformances } from '../parts/part-nonconformances.tsx';
import { PartResults } from '../parts/part-results.tsx';
import { PartRunEntry } from '../parts/part-run.tsx';
import { Shown } from '../parts/shown.tsx';
import { useRead } from '../use-read.ts';
import { day } from '../words/clock.ts';
import { missingOfPart } from '../words/missing.ts';
import { zone } from '../workshop.ts';
import { PartThickness } from './part-thickness.tsx';

/** A part's whole cure history: everything that touched it, everything that shares it, and what is not on record. */
export function PartPage() {
  const { params } = useRoute();
  const serial = params.serial ?? '';
  usePageTitle(`Part ${serial}`);
  const reading = useRead<PartView>(partPath(serial));
  const view = reading.value;
  return (
    <Notebook margin={view && <Marks view={view} />}>
      <PageHead title={serial}>
        {view && <About view={view} />}
        {view && <LabelLink kind="part" code={serial} />}
      </PageHead>
      <Shown reading={reading} what="Reading the part’s history">
        {(part) => <Body view={part} again={reading.again} />}
      </Shown>
    </Notebook>
  );
}

function About({ view }: { view: PartView }) {
  const drawing = view.drawing && `drawing ${view.drawing}${view.drawingIssue ? ` issue ${view.drawingIssue}` : ''}`;
  const said = [view.title, drawing, view.quantity > 1 && `${view.quantity} pieces`].filter(Boolean).join(' · ');
  const hasFailed = view.results.some(({ outcome }) => outcome === 'failed');
  return (
    <>
      <div class="row">
        {view.verdict ? <VerdictLine verdict={view.verdict} /> : <span class="soft">Not judged yet</span>}
        {hasFailed && (
          <span class="outcome-line outcome-not-met">
            <OutcomeMark mark="not-met" />
            Failed a test
          </span>
        )}
      </div>
      <p class="soft">
        {said}
        {view.tool && (
          <>
            {said && ' · '}tool <a href={`/tools/${encodeURIComponent(view.tool)}`}>{view.tool}</a>
          </>
        )}
      </p>
    </>
  );
}

function Marks({ view }: { view: PartView }) {
  const latest = view.runs[0];
  return (
    <dl class="marks">
      {latest && (
        <div>
          <dt>{day(latest.line.from, zone.value)}</dt>
          <dd>{view.runs.length === 1 ? 'its cure' : 'its latest cure'}</dd>
        </div>
      )}
    </dl>
  );
}

function Body({ view, again }: { view: PartView; again: () => void }) {
  const missing = missingOfPart(view);
  return (
    <>
      <section>
        <h2>Cures</h2>
        {view.runs.length === 0 ? (
          <p>No run on record names this part in its load.</p>
        ) : (
          <ul class="entries section">
            {view.runs.map((run) => (
              <PartRunEntry key={run.line.run} run={run} />
            ))}
          </ul>
        )}
      </section>
      <PartThickness view={view} />
      <PartLayup view={view} onChanged={again} />
      <PartMaterialsSection part={view.serial} onChanged={again} />
      <section class="section">
        <h2>Not on record</h2>
        {missing.length === 0 ? (
          <p>Nothing that this book can hold is missing.</p>
        ) : (
          <ul>
            {missing.map((what) => (
              <li key={what}>{what}</li>
            ))}
          </ul>
        )}
      </section>
      <PartResults view={view} onAdded={again} />
      <PartNonconformances view={view} onChanged={again} />
      <PaperSection path={partPapersPath(view.serial)} />
      <PartDangerSection serial={view.serial} hasFailed={view.results.some(({ outcome }) => outcome === 'failed')} />
      <section class="section">
        <h2>Parts that share something with it</h2>
        {view.shares.length === 0 ? (
          <p class="soft">None on record.</p>
        ) : (
          <ul class="entries">
            {view.shares.map((other) => (
              <li class="entry" key={other.serial}>
                <div class="head">
                  <a href={`/parts/${encodeURIComponent(other.serial)}`}>{other.serial}</a>
                  {other.verdict ? <VerdictLine verdict={other.verdict} /> : <span class="soft">not judged yet</span>}
                  {other.failedTest && (
                    <span class="outcome-line outcome-not-met">
                      <OutcomeMark mark="not-met" />
                      Failed a test
                    </span>
                  )}
                </div>
                <p class="soft">{other.what.join(' · ')}</p>
              </li>
            ))}
          </ul>
        )}
      </section>
      {view.audit.length > 0 && (
        <section class="section">
          <h2>Who wrote what about it</h2>
          <AuditEntries lines={view.audit} />
        </section>
      )}
    </>
  );
}
