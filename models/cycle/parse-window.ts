import { type Fields, number, object, oneOf, type Read, text } from '../document.ts';
import type { CycleEvent, WindowLimit } from './cycle.ts';
import { boundsIn, forgiveness } from './parse-bounds.ts';

const WITHOUT_VALUE = ['start', 'end', 'heat-on', 'gel'] as const;
const OF_TEMPERATURE = ['first-reaches', 'all-reach', 'first-cools-to', 'all-cool-to'] as const;
const OF_DWELL = ['opens', 'closes'] as const;
const OF_PRESSURE = ['pressure-reaches', 'vacuum-reaches', 'pressure-falls-to', 'vacuum-falls-to'] as const;

/** One pressure or vacuum window. */
export const window: Read<WindowLimit> = (value, path) =>
  object((fields) => {
    const name = fields.required('name', text);
    const quantity = fields.required('quantity', oneOf(['pressure', 'vacuum']));
    // A vacuum is written as it is read: more below ambient, or less absolute; never with a minus sign.
    const bound = quantity === 'vacuum' ? number({ atLeast: 0 }) : number();
    return {
      name,
      quantity,
      ...boundsIn(fields, path, bound),
      from: fields.required('from', event),
      until: fields.required('until', event),
      ...fields.optional('forgive', forgiveness),
    };
  })(value, path);

const event: Read<CycleEvent> = object((fields) => {
  const at = fields.required('at', oneOf([...WITHOUT_VALUE, ...OF_TEMPERATURE, ...OF_DWELL, ...OF_PRESSURE]));
  return { ...eventAt(at, fields), ...fields.optional('plus', number()) };
});

function eventAt(at: CycleEvent['at'], fields: Fields): CycleEvent {
  if (isIn(WITHOUT_VALUE, at)) return { at };
  if (isIn(OF_DWELL, at)) return { at, stage: fields.required('stage', text) };
  if (isIn(OF_TEMPERATURE, at)) return { at, value: fields.required('value', number()) };
  const positive = at.startsWith('vacuum') ? number({ atLeast: 0 }) : number();
  return { at, value: fields.required('value', positive) };
}

function isIn<T extends string>(list: readonly T[], at: string): at is T {
  return (list as readonly string[]).includes(at);
}
