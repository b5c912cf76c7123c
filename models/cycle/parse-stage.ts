import { type Fields, number, object, oneOf, pairOf, type Read, refuse, text } from '../document.ts';
import { DomainError } from '../errors.ts';
import type { Clock, CoolStage, DwellStage, HeatStage, RateLimit, Stage } from './cycle.ts';
import { ABOVE_NOTHING, bounds, boundsIn, forgiveness, NOT_NEGATIVE, notEmpty } from './parse-bounds.ts';

/** One stage of a cycle: `heat`, `dwell` or `cool`. */
export const stage: Read<Stage> = object((fields) => {
  const name = fields.required('name', text);
  const kind = fields.required('kind', oneOf(['heat', 'dwell', 'cool']));
  if (kind === 'dwell') return dwellIn(fields, name);
  if (kind === 'heat') return { name, kind, ...fields.optional('rate', rate('heat')) } satisfies HeatStage;
  return {
    name,
    kind,
    ...fields.optional('rate', rate('cool')),
    ...fields.optional('until', number()),
  } satisfies CoolStage;
});

function dwellIn(fields: Fields, name: string): DwellStage {
  const dwell: DwellStage = {
    name,
    kind: 'dwell',
    target: fields.required('target', number()),
    plus: fields.required('plus', number({ atLeast: 0 })),
    minus: fields.required('minus', number({ atLeast: 0 })),
    ...fields.optional('time', bounds),
    ...(fields.has('time') ? { clock: fields.required('clock', clock) } : fields.optional('clock', clock)),
    ...(fields.has('time')
      ? { counting: fields.required('counting', counting) }
      : fields.optional('counting', counting)),
    ...fields.optional('below', oneOf(['stops-clock', 'not-allowed'])),
    ...fields.optional('longest', longest),
    ...fields.optional('forgive', forgive),
  };
  if (dwell.plus + dwell.minus === 0) refuse(fields.pathOf('plus'), 'a band wider than nothing with minus', dwell.plus);
  if (dwell.clock === undefined && (dwell.below !== undefined || dwell.forgive?.below !== undefined)) {
    const why = dwell.below === undefined ? 'forgive.below' : 'below';
    throw new DomainError(
      'document-missing-key',
      `${fields.pathOf('clock')} is missing; ${fields.pathOf(why)} is about dips, and a dip is the clock's`,
      { key: fields.pathOf('clock') },
    );
  }
  return dwell;
}

const counting = oneOf(['contiguous', 'accumulated', 'each']);

const clock: Read<Clock> = object((fields) => ({
  opens: fields.required('opens', oneOf(['lagging-enters', 'leading-enters', 'mean-enters', 'air-enters'])),
  closes: fields.required('closes', oneOf(['first-leaves', 'last-leaves', 'mean-leaves', 'air-leaves'])),
}));

const longest: Read<NonNullable<DwellStage['longest']>> = object((fields) => ({
  atMost: fields.required('atMost', number({ above: 0 })),
  clock: fields.required('clock', clock),
}));

const forgive: Read<NonNullable<DwellStage['forgive']>> = notEmpty(
  object((fields) => ({ ...fields.optional('below', forgiveness), ...fields.optional('above', forgiveness) })),
  'below, above',
);

function rate(kind: 'heat' | 'cool'): Read<RateLimit> {
  return (value, path) =>
    object((fields) => {
      const over = fields.required('over', pairOf(number()));
      const rises = over[1] > over[0];
      if (over[0] === over[1]) refuse(fields.pathOf('over'), 'two different temperatures', over);
      if (rises !== (kind === 'heat')) {
        const order =
          kind === 'heat'
            ? 'from colder to hotter, as a heat stage goes'
            : 'from hotter to colder, as a cool stage goes';
        refuse(fields.pathOf('over'), order, over);
      }
      const average = fields.required('average', oneOf(['window', 'chord']));
      const window = average === 'window' ? { window: fields.required('window', number({ above: 0 })) } : {};
      if (average === 'chord' && fields.has('window')) {
        refuse(fields.pathOf('average'), '"window", since a window is written beside it', average);
      }
      return {
        ...boundsIn(fields, path, NOT_NEGATIVE, ABOVE_NOTHING),
        over,
        average,
        ...window,
        of: fields.required('of', oneOf(['every', 'leading', 'lagging', 'mean', 'air'])),
      };
    })(value, path);
}
