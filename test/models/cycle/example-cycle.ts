/** The example of the cycle and verdict rules, key by key; its figures are an example, not a recommendation. */
export function exampleCycle() {
  return structuredClone({
    format: 'dwellbook-cycle/1',
    code: 'SR-180',
    issue: 'B',
    title: 'Two-dwell 180 °C autoclave cure, solid laminate',
    origin: { document: 'SR-PS-014', issue: '4', clause: '6.3' },
    units: { temperature: '°C', pressure: 'bar', vacuum: 'bar' },
    judgedBy: 'part',
    stages: [
      {
        name: 'heat-up 1',
        kind: 'heat',
        rate: { atLeast: 0.5, atMost: 3, over: [50, 100], average: 'window', window: 10, of: 'every' },
      },
      {
        name: 'dwell 1',
        kind: 'dwell',
        target: 110,
        plus: 5,
        minus: 5,
        time: { atLeast: 60, atMost: 80 },
        clock: { opens: 'lagging-enters', closes: 'first-leaves' },
        counting: 'contiguous',
        below: 'stops-clock',
        longest: { atMost: 100, clock: { opens: 'leading-enters', closes: 'last-leaves' } },
        forgive: { below: { by: 2, for: 3, times: 2 }, above: { by: 3, for: 5 } },
      },
      {
        name: 'heat-up 2',
        kind: 'heat',
        rate: { atLeast: 0.5, atMost: 3, over: [120, 170], average: 'chord', of: 'every' },
      },
      {
        name: 'dwell 2',
        kind: 'dwell',
        target: 180,
        plus: 5,
        minus: 5,
        time: { atLeast: 120, atMost: 150 },
        clock: { opens: 'lagging-enters', closes: 'first-leaves' },
        counting: 'contiguous',
      },
      {
        name: 'cool-down',
        kind: 'cool',
        rate: { atMost: 3, over: [170, 70], average: 'window', window: 10, of: 'every' },
        until: 60,
      },
    ],
    windows: [
      {
        name: 'bag vacuum until venting',
        quantity: 'vacuum',
        atLeast: 0.75,
        from: { at: 'heat-on' },
        until: { at: 'pressure-reaches', value: 1.4 },
      },
      {
        name: 'cure pressure',
        quantity: 'pressure',
        atLeast: 6.5,
        atMost: 7.5,
        from: { at: 'all-reach', value: 100 },
        until: { at: 'all-cool-to', value: 60 },
        forgive: { by: 0.3, for: 2 },
      },
    ],
    ceiling: 190,
    spread: { atMost: 17, during: 'heating' },
    sensors: { workingAtLeast: 2, own: false, mustWork: ['lag'] },
    log: { longestGap: 2, changesAtMost: 20 },
    leakTest: { startAtLeast: 0.85, over: 5, lossAtMost: 0.07 },
    cure: { resin: 'skerry-180', degreeAtLeast: 0.9, tgAtLeast: 185, pressureBeforeGel: 5 },
    material: { outLife: true },
    instruments: { calibration: true },
    decision: { rule: 'as-indicated' },
  });
}

/** A copy of a document with the value at a path (`stages[1].time.atLeast`) changed; undefined takes the key away. */
export function withValue(document: object, path: string, value: unknown): object {
  const copy = structuredClone(document) as Record<string, unknown>;
  const keys = path.split(/[.[\]]+/).filter((key) => key !== '');
  let at = copy;
  for (const key of keys.slice(0, -1)) at = at[key] as Record<string, unknown>;
  const last = keys.at(-1)!;
  if (value === undefined) delete at[last];
  else at[last] = value;
  return copy;
}

/** The example with several values changed. */
export function exampleWith(changes: Readonly<Record<string, unknown>>): object {
  return Object.entries(changes).reduce<object>(
    (cycle, [path, value]) => withValue(cycle, path, value),
    exampleCycle(),
  );
}
