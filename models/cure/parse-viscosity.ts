import { number, object, oneOf, type Read } from '../document.ts';
import type { Viscosity } from './resin.ts';

const energy = number({ atLeast: 5000, atMost: 1e6 });
const viscosity = number({ above: 0 });
const degree = number({ above: 0, atMost: 1 });

/** Reads `viscosity`: the law by its name, then its own keys and no others. Viscosities in Pa s, energies in J/mol. */
export const readViscosity: Read<Viscosity> = object((fields) => {
  const law = fields.required('law', oneOf(['castro-macosko', 'lee-loos-springer']));
  if (law === 'castro-macosko') {
    return {
      law,
      A: fields.required('A', viscosity),
      E: fields.required('E', energy),
      gelDegree: fields.required('gelDegree', degree),
      a: fields.required('a', number({ atLeast: 0, atMost: 50 })),
      b: fields.required('b', number({ atLeast: -50, atMost: 50 })),
      ...fields.optional('flowsBelow', viscosity),
    };
  }
  return {
    law,
    muInf: fields.required('muInf', viscosity),
    U: fields.required('U', energy),
    K: fields.required('K', number({ above: 0, atMost: 200 })),
    validTo: fields.required('validTo', degree),
    ...fields.optional('flowsBelow', viscosity),
  };
});
