import { useRoute } from 'preact-iso';
import type { Resin } from '../../models/cure/resin.ts';
import { resinPath } from '../../server/contract/paths.ts';
import type { ResinView } from '../../server/contract/resins.ts';
import { TgCurve } from '../charts/tg-curve.tsx';
import { usePageTitle } from '../page-title.ts';
import { Notebook, PageHead } from '../parts/notebook.tsx';
import { RESIN_STATUS_WORDS, ResinStatusTag } from '../parts/resin-status-tag.tsx';
import { Shown } from '../parts/shown.tsx';
import { When } from '../parts/when.tsx';
import { useRead } from '../use-read.ts';
import { asWritten } from '../words/figures.ts';

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
        {(resin) => <Body view={resin} />}
      </Shown>
    </Notebook>
  );
}

function Body({ view }: { view: ResinView }) {
  const resin = view.document;
  return (
    <>
      <div class="stack">
        <p>
          <ResinStatusTag status={resin.source.status} /> {RESIN_STATUS_WORDS[resin.source.status]}
        </p>
        <p>Source: {resin.source.citation}.</p>
        <p>
          {resin.validC
            ? `Fitted from ${asWritten(resin.validC[0])} to ${asWritten(resin.validC[1], '°C')}. Outside that range an estimate goes on, and the time spent there is reported.`
            : 'The range of temperature it was fitted in is not written.'}
        </p>
      </div>
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
        <Figures resin={resin} />
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

function Figures({ resin }: { resin: Resin }) {
  const { law, ...constants } = resin.kinetics;
  return (
    <dl class="facts">
      <dt>Law of the rate</dt>
      <dd>{law}</dd>
      {Object.entries(constants).map(([name, value]) => (
        <Line
          key={name}
          name={name}
          value={Array.isArray(value) ? value.join(', ') : `${asWritten(value)}${unitOf(name)}`}
        />
      ))}
      <Line name="Gas constant" value={asWritten(resin.gasConstant, 'J/(mol K)')} />
      <Line name="Degree of cure at the start" value={asWritten(resin.initialDegree)} />
      {resin.diffusion && (
        <Line
          name="Diffusion, logistic"
          value={`C ${asWritten(resin.diffusion.C)}, α at 0 K ${asWritten(resin.diffusion.alphaC0)}, per K ${asWritten(resin.diffusion.alphaCT)}`}
        />
      )}
      {resin.glassTransition && (
        <Line
          name="Tg, DiBenedetto"
          value={`${asWritten(resin.glassTransition.tg0C)} to ${asWritten(resin.glassTransition.tgInfC, '°C')}, λ ${asWritten(resin.glassTransition.lambda)}`}
        />
      )}
      {resin.gel && <Line name="Gels at a degree of" value={asWritten(resin.gel.degree)} />}
      {resin.thermal && (
        <Line
          name="Heat of reaction"
          value={`${asWritten(resin.thermal.heatOfReaction, 'J/kg')} of ${resin.thermal.basis}`}
        />
      )}
    </dl>
  );
}

function Line({ name, value }: { name: string; value: string }) {
  return (
    <>
      <dt>{name}</dt>
      <dd>{value}</dd>
    </>
  );
}

function unitOf(name: string): string {
  if (name.startsWith('A')) return '\u00a01/s';
  return name.startsWith('E') ? '\u00a0J/mol' : '';
}
