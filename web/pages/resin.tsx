import { useRoute } from 'preact-iso';
import { resinPath } from '../../server/contract/paths.ts';
import type { ResinView } from '../../server/contract/resins.ts';
import { TgCurve } from '../charts/tg-curve.tsx';
import { usePageTitle } from '../page-title.ts';
import { Notebook, PageHead } from '../parts/notebook.tsx';
import { ResinFigures } from '../parts/resin-figures.tsx';
import { ResinStanding } from '../parts/resin-status-tag.tsx';
import { Shown } from '../parts/shown.tsx';
import { When } from '../parts/when.tsx';
import { useRead } from '../use-read.ts';
import { asWritten } from '../words/figures.ts';
import { ResinProgramme } from './resin-programme.tsx';
import { ResinRates } from './resin-rates.tsx';

/** A resin set as it is: where it comes from, what it may be used for, its figures. */
export default function ResinPage() {
  const { params } = useRoute();
  const code = params.code ?? '';
  usePageTitle(`Resin ${code}`);
  const reading = useRead<ResinView>(resinPath(code));
  const view = reading.value;
  return (
    <Notebook
      margin={
        view && (
          <p class="when">
            <When at={view.imported.at} />
            <br />
            brought in by {view.imported.by}
          </p>
        )
      }
    >
      <PageHead title={code}>{view && <p class="lead">{view.name}</p>}</PageHead>
      <Shown reading={reading} what="Reading the resin set">
        {(resin) => <Body key={resin.code} view={resin} />}
      </Shown>
    </Notebook>
  );
}

function Body({ view }: { view: ResinView }) {
  const resin = view.document;
  return (
    <>
      <div class="stack">
        <ResinStanding status={resin.source.status} />
        <p>Source: {resin.source.citation}.</p>
        <p>
          {resin.validC
            ? `Fitted from ${asWritten(resin.validC[0])} to ${asWritten(resin.validC[1], '°C')}. Outside that range an estimate goes on, and the time spent there is reported.`
            : 'The range of temperature it was fitted in is not written.'}
        </p>
      </div>
      <ResinProgramme resin={resin} />
      <ResinRates resin={resin} />
      {resin.glassTransition && (
        <section class="section">
          <h2>Glass transition over degree of cure</h2>
          <p>
            {resin.glassTransition.method
              ? `By ${resin.glassTransition.method}. Tg by another method may lie 20 to 30 °C apart; compare within one.`
              : 'The method it was measured by is not written; methods may lie 20 to 30 °C apart.'}
          </p>
          <TgCurve glassTransition={resin.glassTransition} gelDegree={resin.gel?.degree ?? null} />
        </section>
      )}
      <section class="section">
        <h2>Figures of the set</h2>
        <ResinFigures resin={resin} />
      </section>
      <section class="section">
        <h2>Cycles that estimate with it</h2>
        {view.cycles.length === 0 ? (
          <p class="soft">None.</p>
        ) : (
          <ul class="row plain-list">
            {view.cycles.map(({ code, issue }) => (
              <li key={`${code} ${issue}`}>
                <a href={`/cycles/${encodeURIComponent(code)}/${encodeURIComponent(issue)}`}>
                  {code} issue {issue}
                </a>
              </li>
            ))}
          </ul>
        )}
      </section>
      <p class="section soft small breakable">
        SHA-256 <code>{view.sha256}</code>
      </p>
    </>
  );
}
