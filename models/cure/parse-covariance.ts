import { listOf, number, object, type Read, refuse, refuseNamedTwice, text } from '../document.ts';
import { cholesky } from '../numerics/cholesky.ts';
import { withParameters } from './parameters.ts';
import type { Resin } from './resin.ts';

export const readCovariance: Read<NonNullable<Resin['covariance']>> = object((fields) => {
  const parameters = fields.required('parameters', listOf(text, { atLeast: 1 }));
  const size = { atLeast: parameters.length, atMost: parameters.length };
  refuseNamedTwice(parameters, (i) => `${fields.pathOf('parameters')}[${i}]`);
  const matrix = fields.required('matrix', listOf(listOf(number(), size), size));
  try {
    cholesky(matrix);
  } catch (error) {
    // Whatever makes it no covariance matrix, the document's author is told by the key.
    refuse(fields.pathOf('matrix'), `a covariance matrix (${(error as Error).message})`, matrix);
  }
  return { parameters, matrix };
});

/** Refuses covariances of what the kinetics have not, now that the kinetics are known. */
export function refuseStrangeParameters(resin: Resin): void {
  for (const [i, name] of (resin.covariance?.parameters ?? []).entries()) {
    if (withParameters(resin, new Map([[name, 0]])) !== null) continue;
    refuse(`covariance.parameters[${i}]`, 'a constant of kinetics, or ln and one above 0', name);
  }
}
