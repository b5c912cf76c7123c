import type { Resin, Viscosity } from '../../models/cure/resin.ts';
import { asWritten, listed } from '../words/figures.ts';

/** The figures of a set as its document writes them, each with its unit. */
export function ResinFigures({ resin }: { resin: Resin }) {
  const { law, ...constants } = resin.kinetics;
  return (
    <dl class="facts">
      <dt>Law of the rate</dt>
      <dd>{law}</dd>
      {Object.entries(constants).map(([name, value]) => (
        <Line
          key={name}
          name={name}
          value={Array.isArray(value) ? `${value.join(', ')}${unitOf(name)}` : `${asWritten(value)}${unitOf(name)}`}
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
      {resin.viscosity && <Line name={`Viscosity, ${resin.viscosity.law}`} value={viscosityWords(resin.viscosity)} />}
      {resin.viscosity?.flowsBelow !== undefined && (
        <Line name="Flows below" value={asWritten(resin.viscosity.flowsBelow, 'Pa s')} />
      )}
      {resin.thermal && (
        <Line
          name="Heat of reaction"
          value={`${asWritten(resin.thermal.heatOfReaction, 'J/kg')} of ${resin.thermal.basis}`}
        />
      )}
      {resin.covariance && <Line name="Covariance of the fit" value={`of ${listed(resin.covariance.parameters)}`} />}
      {resin.source.confirmed && <Line name="As the source prints it" value={resin.source.confirmed} />}
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

function viscosityWords(set: Viscosity): string {
  return set.law === 'castro-macosko'
    ? `A ${asWritten(set.A, 'Pa s')}, E ${asWritten(set.E, 'J/mol')}, gel at ${asWritten(set.gelDegree)}, a ${asWritten(set.a)}, b ${asWritten(set.b)}`
    : `μ∞ ${asWritten(set.muInf, 'Pa s')}, U ${asWritten(set.U, 'J/mol')}, K ${asWritten(set.K)}, up to degree ${asWritten(set.validTo)}`;
}
