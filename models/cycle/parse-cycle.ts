import { flag, format, listOf, number, object, oneOf, type Read, refuse, refuseNamedTwice, text } from '../document.ts';
import { checkCycle } from './check-cycle.ts';
import type { Cycle } from './cycle.ts';
import { notEmpty } from './parse-bounds.ts';
import { stage } from './parse-stage.ts';
import { units } from './parse-units.ts';
import { window } from './parse-window.ts';

/** Reads a cycle document; an unknown, missing or contradictory key is refused by its path. */
export function parseCycle(document: unknown): Cycle {
  const cycle = readCycle(document, '');
  checkCycle(cycle);
  return cycle;
}

const readCycle: Read<Cycle> = object((fields) => ({
  format: fields.required('format', format('dwellbook-cycle/1')),
  code: fields.required('code', text),
  issue: fields.required('issue', text),
  title: fields.required('title', text),
  ...fields.optional('origin', origin),
  units: fields.required('units', units),
  judgedBy: fields.required('judgedBy', oneOf(['part', 'tool', 'air'])),
  stages: fields.required('stages', listOf(stage, { atLeast: 1 })),
  ...fields.optional('windows', listOf(window)),
  ...fields.optional('ceiling', number()),
  ...fields.optional('spread', spread),
  ...fields.optional('sensors', sensors),
  ...fields.optional('log', log),
  ...fields.optional('leakTest', leakTest),
  ...fields.optional('cure', cure),
  ...fields.optional('material', material),
  ...fields.optional('instruments', instruments),
  ...fields.optional('decision', decision),
}));

const origin: Read<NonNullable<Cycle['origin']>> = object((fields) => ({
  document: fields.required('document', text),
  ...fields.optional('issue', text),
  ...fields.optional('clause', text),
}));

const spread: Read<NonNullable<Cycle['spread']>> = object((fields) => {
  const during = fields.required('during', oneOf(['heating', 'dwells', 'run']));
  const after = fields.optional('after', number({ atLeast: 0 }));
  if (after.after !== undefined && during !== 'dwells') {
    refuse(fields.pathOf('during'), '"dwells", since "after" is minutes after an opening', during);
  }
  return { atMost: fields.required('atMost', number({ above: 0 })), during, ...after };
});

const sensors: Read<NonNullable<Cycle['sensors']>> = notEmpty(
  object((fields) => ({
    ...fields.optional('workingAtLeast', number({ atLeast: 1, whole: true })),
    ...fields.optional('own', flag),
    ...fields.optional('mustWork', (value, path) => {
      const places = listOf(text, { atLeast: 1 })(value, path);
      refuseNamedTwice(places, (i) => `${path}[${i}]`);
      return places;
    }),
  })),
  'workingAtLeast, own, mustWork',
);

const log: Read<NonNullable<Cycle['log']>> = notEmpty(
  object((fields) => ({
    ...fields.optional('longestGap', number({ above: 0 })),
    ...fields.optional('changesAtMost', number({ above: 0 })),
  })),
  'longestGap, changesAtMost',
);

const leakTest: Read<NonNullable<Cycle['leakTest']>> = object((fields) => ({
  ...fields.optional('startAtLeast', number({ above: 0 })),
  over: fields.required('over', number({ above: 0 })),
  lossAtMost: fields.required('lossAtMost', number({ atLeast: 0 })),
}));

const cure: Read<NonNullable<Cycle['cure']>> = object((fields) => ({
  resin: fields.required('resin', text),
  ...fields.optional('degreeAtLeast', number({ above: 0, atMost: 1 })),
  ...fields.optional('tgAtLeast', number()),
  ...fields.optional('pressureBeforeGel', number({ above: 0 })),
}));

const material: Read<NonNullable<Cycle['material']>> = notEmpty(
  object((fields) => fields.optional('outLife', flag)),
  'outLife',
);

const instruments: Read<NonNullable<Cycle['instruments']>> = notEmpty(
  object((fields) => fields.optional('calibration', flag)),
  'calibration',
);

const decision: Read<NonNullable<Cycle['decision']>> = object((fields) => ({
  rule: fields.required('rule', oneOf(['as-indicated', 'guarded'])),
}));
