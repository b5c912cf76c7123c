import type { ChannelLayout, Layout, Thermocouple } from '../../models/log/layout.ts';

/** Keys of a layout that hold a line's number. */
const LINE_KEYS = ['header', 'units', 'firstReading'];

/** The layout with one place changed: `delimiter`, `time.pattern`, `channels/3/role`. Empty text takes a key out. */
export function withAnswer(layout: Layout, key: string, answer: string): Layout {
  const [first = '', ...rest] = key.split(/[./]/);
  const value = LINE_KEYS.includes(first) || isHeldJunction(key, answer) ? Number(answer) : answer;
  return setIn(layout as unknown as Tree, [first, ...rest], answer === '' ? undefined : value) as unknown as Layout;
}

/** What stands at a place of a layout, as text; empty where nothing does. */
export function answerAt(layout: Layout, key: string): string {
  let here: unknown = layout;
  for (const step of key.split(/[./]/)) {
    here = typeof here === 'object' && here !== null ? (here as Tree)[step] : undefined;
  }
  return here === undefined || here === null ? '' : String(here);
}

export function withChannel(layout: Layout, n: number, change: Partial<ChannelLayout>): Layout {
  const changed = (channel: ChannelLayout) => withThermocouple({ ...channel, ...change });
  return { ...layout, channels: layout.channels.map((channel, i) => (i === n ? changed(channel) : channel)) };
}

/** A channel of emf has a thermocouple, unknown at first; no other channel has one. */
function withThermocouple(channel: ChannelLayout): ChannelLayout {
  const { thermocouple = { type: '', coldJunction: '' } as unknown as Thermocouple, ...rest } = channel;
  return rest.unit === 'mV' && ['part', 'tool', 'air'].includes(rest.role) ? { ...rest, thermocouple } : rest;
}

/** Whether an answer says at how many °C a cold junction was held, and no channel's name. */
function isHeldJunction(key: string, answer: string): boolean {
  return key.endsWith('/coldJunction') && answer.trim() !== '' && Number.isFinite(Number(answer));
}

export function withoutChannel(layout: Layout, n: number): Layout {
  return { ...layout, channels: layout.channels.filter((_, i) => i !== n) };
}

/** One more cell that means "no reading". */
export function withMissing(layout: Layout, cell: string): Layout {
  return { ...layout, missing: [...new Set([...(layout.missing ?? []), cell])] };
}

type Tree = Record<string, unknown>;

function setIn(tree: Tree, steps: readonly string[], value: unknown): Tree {
  const [step = '', ...rest] = steps;
  const copy = (Array.isArray(tree) ? [...tree] : { ...tree }) as Tree;
  if (rest.length > 0) copy[step] = setIn((copy[step] ?? {}) as Tree, rest, value);
  else if (value === undefined) delete copy[step];
  else copy[step] = value;
  return copy;
}
