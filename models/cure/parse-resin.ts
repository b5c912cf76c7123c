import { format, number, object, oneOf, pairOf, type Read, refuse, text } from '../document.ts';
import { readCovariance, refuseStrangeParameters } from './parse-covariance.ts';
import { readKinetics } from './parse-kinetics.ts';
import { readViscosity } from './parse-viscosity.ts';
import { refuseImplausible } from './refuse-implausible.ts';
import { type Diffusion, type GlassTransition, RESIN_STATUSES, type Resin } from './resin.ts';
import { whyNotFrom } from './start-degree.ts';

/**
 * The resin in a document of unknown shape.
 *
 * @throws {DomainError} `document-…` naming the key and what was expected there, for what is missing, unknown or of the
 *   wrong kind, sign or range; and for figures that look like another unit, unless `source.confirmed` says why they stand.
 */
export function parseResin(document: unknown): Resin {
  const resin = readResin(document, '');
  const expected = whyNotFrom(resin.initialDegree, resin.kinetics);
  if (expected !== null) refuse('initialDegree', expected, resin.initialDegree);
  refuseStrangeParameters(resin);
  refuseImplausible(resin);
  return resin;
}

const readDiffusion: Read<Diffusion> = object((fields) => ({
  law: fields.required('law', oneOf(['logistic'])),
  C: fields.required('C', number({ above: 0, atMost: 1000 })),
  alphaC0: fields.required('alphaC0', number({ atLeast: -20, atMost: 20 })),
  alphaCT: fields.required('alphaCT', number({ atLeast: 0, atMost: 0.1 })),
}));

const readGlassTransition: Read<GlassTransition> = object((fields) => {
  const tg0C = fields.required('tg0C', number({ atLeast: -150, atMost: 250 }));
  return {
    law: fields.required('law', oneOf(['dibenedetto'])),
    tg0C,
    tgInfC: fields.required('tgInfC', number({ above: tg0C, atMost: 450 })),
    lambda: fields.required('lambda', number({ above: 0, atMost: 1 })),
    ...fields.optional('method', text),
  };
});

const readValidC: Read<readonly [number, number]> = (value, path) => {
  const range = pairOf(number({ atLeast: -100 }))(value, path);
  if (range[0] >= range[1]) refuse(path, 'the lower temperature first', value);
  if (range[0] > 280 || range[1] > 450) {
    refuse(path, 'temperatures in °C: these look like K; take 273.15 off both', value);
  }
  return range;
};

const readHeat: Read<number> = (value, path) => {
  const heat = number()(value, path);
  return heat >= 5000 && heat <= 3e6 ? heat : refuse(path, 'a heat in J/kg, 5000 to 3000000 (1 J/g is 1000)', value);
};

const readGasConstant: Read<number> = (value, path) => {
  const gasConstant = number()(value, path);
  if (gasConstant < 8.31 || gasConstant > 8.32) {
    refuse(path, 'the gas constant in J/(mol K), 8.31 to 8.32; energies in J/mol (1 cal = 4.184 J)', value);
  }
  return gasConstant;
};

const readResin: Read<Resin> = object((fields) => ({
  format: fields.required('format', format('dwellbook-resin/1')),
  code: fields.required('code', text),
  name: fields.required('name', text),
  source: fields.required(
    'source',
    object((source) => ({
      citation: source.required('citation', text),
      status: source.required('status', oneOf(RESIN_STATUSES)),
      ...source.optional('confirmed', text),
    })),
  ),
  ...fields.optional('validC', readValidC),
  initialDegree: fields.required('initialDegree', number({ atLeast: 0, below: 1 })),
  gasConstant: fields.required('gasConstant', readGasConstant),
  kinetics: fields.required('kinetics', readKinetics),
  ...fields.optional('diffusion', readDiffusion),
  ...fields.optional('glassTransition', readGlassTransition),
  ...fields.optional(
    'gel',
    object((gel) => ({ degree: gel.required('degree', number({ above: 0, below: 1 })) })),
  ),
  ...fields.optional('viscosity', readViscosity),
  ...fields.optional('covariance', readCovariance),
  ...fields.optional(
    'thermal',
    object((thermal) => ({
      heatOfReaction: thermal.required('heatOfReaction', readHeat),
      basis: thermal.required('basis', oneOf(['resin', 'composite'])),
    })),
  ),
}));
