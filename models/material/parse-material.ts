import { flag, format, listOf, number, object, oneOf, pairOf, type Read, refuse, text } from '../document.ts';
import { celsiusFrom, TEMPERATURE_UNITS } from '../units.ts';
import type { Ageing, EquivalentTime, Extension, Material, OutLife, Storage, Thaw } from './material.ts';

/** Reads a material document; an unknown, missing or contradictory key is refused by its path. */
export function parseMaterial(document: unknown): Material {
  const material = readMaterial(document, '');
  checkTemperatures(material);
  checkEquivalent(material);
  return material;
}

const lifeDays = number({ above: 0, atMost: 36_500 });
const temperature = number({ atLeast: -300, atMost: 300 });

const storage: Read<Storage> = object((fields) => ({
  atMost: fields.required('atMost', temperature),
  ...fields.optional('atLeast', temperature),
  lifeDays: fields.required('lifeDays', lifeDays),
  ...fields.optional('outAbove', temperature),
}));

const out: Read<OutLife> = object((fields) => ({
  lifeDays: fields.required('lifeDays', lifeDays),
  atMost: fields.required('atMost', temperature),
  ...fields.optional('humidityAtMost', number({ above: 0, atMost: 100 })),
}));

const thaw: Read<Thaw> = object((fields) => {
  const from = fields.required('from', oneOf(['removal', 'temperature']));
  return from === 'removal' ? { from } : { from, above: fields.required('above', temperature) };
});

const equivalent: Read<EquivalentTime> = object((fields) => {
  const rule = fields.required('rule', oneOf(['two-lives', 'arrhenius']));
  const common = {
    approvedBy: fields.required('approvedBy', text),
    ...fields.optional('colderCountsLess', flag),
  };
  return rule === 'two-lives'
    ? { rule, ...common, lives: fields.required('lives', pairOf(pairOf(number()))) }
    : {
        rule,
        ...common,
        E: fields.required('E', number({ atLeast: 20_000, atMost: 250_000 })),
        atMost: fields.required('atMost', temperature),
      };
});

const extension: Read<Extension> = object((fields) => ({
  times: fields.required('times', number({ atLeast: 1, whole: true })),
  tests: fields.required('tests', listOf(text, { atLeast: 1 })),
}));

const ageing: Read<Ageing> = object((fields) => {
  const freshDegree = fields.required('freshDegree', number({ atLeast: 0, below: 1 }));
  return {
    freshDegree,
    degreeAtOutLife: fields.required('degreeAtOutLife', number({ above: freshDegree, below: 1 })),
    source: fields.required('source', text),
  };
});

const readMaterial: Read<Material> = object((fields) => ({
  format: fields.required('format', format('dwellbook-material/1')),
  code: fields.required('code', text),
  issue: fields.required('issue', text),
  name: fields.required('name', text),
  ...fields.optional('maker', text),
  ...fields.optional('form', text),
  ...fields.optional(
    'origin',
    object((origin) => ({
      document: origin.required('document', text),
      issue: origin.required('issue', text),
      ...origin.optional('clause', text),
    })),
  ),
  ...fields.optional('resin', text),
  units: fields.required(
    'units',
    object((units) => ({ temperature: units.required('temperature', oneOf(TEMPERATURE_UNITS)) })),
  ),
  storage: fields.required('storage', storage),
  out: fields.required('out', out),
  ...fields.optional(
    'tack',
    object((tack) => ({ lifeDays: tack.required('lifeDays', lifeDays) })),
  ),
  ...fields.optional('thaw', thaw),
  ...fields.optional(
    'refreezing',
    object((refreezing) => ({ atMost: refreezing.required('atMost', number({ atLeast: 0, whole: true })) })),
  ),
  ...fields.optional('equivalent', equivalent),
  ...fields.optional('extension', extension),
  ...fields.optional('ageing', ageing),
}));

function checkTemperatures({ storage: kept, out: life, thaw: thawing, units }: Material): void {
  const { atMost, atLeast, outAbove } = kept;
  if (atLeast !== undefined && atLeast >= atMost) {
    refuse('storage.atLeast', `a temperature below storage.atMost, ${atMost}`, atLeast);
  }
  if (outAbove !== undefined && (outAbove < atMost || outAbove >= life.atMost)) {
    refuse(
      'storage.outAbove',
      `a temperature from storage.atMost to below out.atMost, ${atMost} to ${life.atMost}`,
      outAbove,
    );
  }
  if (life.atMost <= atMost) refuse('out.atMost', `a temperature above storage.atMost, ${atMost}`, life.atMost);
  // Nobody lays up above 60 °C; a larger figure is one in the other unit.
  if (celsiusFrom(life.atMost, units.temperature) > 60) {
    refuse('out.atMost', `a room's temperature in ${units.temperature}`, life.atMost);
  }
  if (thawing?.from === 'temperature' && (thawing.above <= atMost || thawing.above > life.atMost)) {
    refuse(
      'thaw.above',
      `a temperature between storage.atMost and out.atMost, ${atMost} to ${life.atMost}`,
      thawing.above,
    );
  }
}

function checkEquivalent({ out: life, equivalent: rule }: Material): void {
  if (rule?.rule === 'two-lives') {
    const [[at, days], [warmer, fewer]] = rule.lives;
    if (at !== life.atMost || days !== life.lifeDays) {
      refuse('equivalent.lives[0]', `the out-life itself, [${life.atMost}, ${life.lifeDays}]`, rule.lives[0]);
    }
    if (warmer <= at || fewer >= days || fewer <= 0) {
      refuse('equivalent.lives[1]', 'a shorter life in a warmer room', rule.lives[1]);
    }
  }
  if (rule?.rule === 'arrhenius' && rule.atMost <= life.atMost) {
    refuse('equivalent.atMost', `a temperature above out.atMost, ${life.atMost}`, rule.atMost);
  }
}
