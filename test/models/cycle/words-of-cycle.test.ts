import { readdirSync, readFileSync } from 'node:fs';
import { join } from 'node:path';
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { limitsOfCycle, limitTitle } from '../../../models/cycle/limits-of-cycle.ts';
import { parseCycle } from '../../../models/cycle/parse-cycle.ts';
import { wordsOfCycle } from '../../../models/cycle/words-of-cycle.ts';
import { exampleCycle, exampleWith } from './example-cycle.ts';

const seed = 20260302;
const words = (document: unknown) => wordsOfCycle(parseCycle(document));
const allSentences = (document: unknown) => {
  const { opening, stages, windows, others, assumptions } = words(document);
  return [...opening, ...[...stages, ...windows, ...others].flatMap(({ sentences }) => sentences), ...assumptions];
};

describe('wordsOfCycle', () => {
  it('says a dwell in the trade’s words', () => {
    expect(words(exampleCycle()).stages[1]).toEqual({
      name: 'dwell 1',
      kind: 'dwell',
      sentences: [
        'Held at 105 to 115 °C; the target is 110 °C.',
        'The dwell lasts 60 to 80 min.',
        'Its clock starts when the last judged sensor has reached 105 °C and stops when the first judged sensor leaves the band.',
        'Time counts while every judged sensor is at 105 °C or above.',
        'The longest unbroken stretch is the time.',
        'A dip below 105 °C stops the clock.',
        'Forgiven: dips below 105 °C of up to 2 °C for up to 3 min each, at most 2 of them.',
        'A forgiven dip counts as if it had not happened; two dips less than 3 min apart are one.',
        'No judged sensor reads above 115 °C from its entering to its leaving.',
        'Forgiven: readings above 115 °C of up to 3 °C for up to 5 min each.',
        'At most 100 min, dips included, from when the first judged sensor has reached 105 °C to when the last judged sensor leaves the band.',
      ],
    });
  });

  it('says a rate, a window and its events', () => {
    const { stages, windows } = words(exampleCycle());
    expect(stages[4]?.sentences).toEqual([
      'From 170 to 70 °C every judged sensor cools at a rate of at most 3 °C/min.',
      'The rate is the least-squares slope over every window of 10 min that lies inside.',
      'The stage ends when all judged sensors have cooled to 60 °C.',
    ]);
    expect(windows[1]?.sentences).toEqual([
      'The vessel pressure is 6.5 to 7.5 bar, ends included.',
      'From: all judged sensors are at 100 °C or above. Until: all judged sensors have cooled to 60 °C.',
      'Forgiven: excursions of up to 0.3 bar for up to 2 min each.',
    ]);
    expect(windows[0]?.sentences[1]).toBe(
      'From: heat-on (the leading judged sensor 5 °C above its first reading). Until: the vessel pressure first reaches 1.4 bar.',
    );
  });

  it('says minutes before and after an event', () => {
    const from = (plus: number) =>
      words(exampleWith({ 'windows[1].from': { at: 'opens', stage: 'dwell 2', plus } })).windows[1]?.sentences[1];
    expect(from(10)).toContain('From: 10 min after the opening of dwell 2.');
    expect(from(-10)).toContain('From: 10 min before the opening of dwell 2.');
    expect(from(0)).toContain('From: the opening of dwell 2.');
  });

  it('keeps the zero point of a vacuum with its unit', () => {
    expect(words(exampleCycle()).windows[0]?.sentences[0]).toContain('at least 0.75 bar below ambient');
    const absolute = exampleWith({
      'units.vacuum': 'mbar abs',
      'windows[0].atLeast': undefined,
      'windows[0].atMost': 200,
      'leakTest.startAtLeast': undefined,
    });
    expect(words(absolute).windows[0]?.sentences[0]).toContain('at most 200 mbar abs');
    const tooDeep = exampleWith({ 'units.vacuum': 'mbar abs', 'windows[0].atLeast': 50, 'leakTest.startAtLeast': 120 });
    expect(words(tooDeep).windows[0]?.sentences.join(' ')).toContain('a bag at ambient would meet it');
    expect(
      words(tooDeep)
        .others.flatMap(({ sentences }) => sentences)
        .join(' '),
    ).toContain('at most 120 mbar abs');
  });

  it('speaks every default of a cycle that writes only what it must', () => {
    const { clock, counting, time, target, plus, minus, name, kind } = exampleCycle().stages[3]!;
    const { format, code, issue, title, judgedBy } = exampleCycle();
    const bare = {
      ...{ format, code, issue, title, judgedBy, units: { temperature: '°F' } },
      stages: [{ name, kind, target, plus, minus, time, clock, counting }],
    };
    expect(words(bare).assumptions).toEqual([
      'A dip below the band stops the clock.',
      'Chatter of less than 2 °F about the upper end of a band on the way out is not a return.',
      'Nothing is forgiven but what is written as forgiven.',
      'The record shows the cooling when all judged sensors have cooled 27 °F below their hottest as the log ends; a time that is short then is not met, before that it cannot be told.',
      'Gaps longer than the greater of 5 median intervals and 60 s count as missing; shorter ones are bridged by a straight line.',
      'In a gap a temperature may change by at most 36 °F/min (assumed); pressure and vacuum may be anything.',
      'A part with no part thermocouples of its own is judged by all part thermocouples in the load, and the verdict says so.',
      'Limits apply to calibrated readings as they stand; their uncertainty moves no limit.',
      'Not asked for: pressure, vacuum, a ceiling, a spread, a least number of working sensors, a longest gap, a bag leak test, out-life and calibration.',
    ]);
  });

  it.each([
    'origin.issue',
    'origin.clause',
    'stages[0].rate',
    'stages[1].below',
    'stages[1].longest',
    'stages[1].forgive.below.times',
    'stages[1].forgive.above',
    'stages[1].forgive',
    'stages[4].until',
    'windows[1].forgive',
    'windows[1].atMost',
    'ceiling',
    'spread',
    'sensors.workingAtLeast',
    'sensors.mustWork',
    'log.longestGap',
    'log.changesAtMost',
    'leakTest.startAtLeast',
    'leakTest',
    'cure.degreeAtLeast',
    'cure.tgAtLeast',
    'cure.pressureBeforeGel',
    'material',
    'instruments',
    'decision',
  ])('says something else where %s is not written', (path) => {
    expect(allSentences(exampleWith({ [path]: undefined }))).not.toEqual(allSentences(exampleCycle()));
  });

  const figures: readonly (readonly [string, number])[] = [
    ['stages[0].rate.atLeast', 0.37],
    ['stages[0].rate.atMost', 7.13],
    ['stages[0].rate.window', 13.7],
    ['stages[1].time.atLeast', 61.3],
    ['stages[1].time.atMost', 81.7],
    ['stages[1].target', 111.3],
    ['stages[1].longest.atMost', 101.9],
    ['stages[1].forgive.below.by', 2.07],
    ['stages[1].forgive.below.for', 3.09],
    ['stages[1].forgive.below.times', 23],
    ['stages[1].forgive.below.inTotal', 29.1],
    ['stages[1].forgive.above.by', 3.31],
    ['stages[1].forgive.above.for', 5.93],
    ['stages[4].until', 58.6],
    ['windows[0].atLeast', 0.757],
    ['windows[0].from.plus', 17.3],
    ['windows[0].until.value', 1.47],
    ['windows[1].atMost', 7.57],
    ['windows[1].from.value', 101.7],
    ['windows[1].forgive.by', 0.337],
    ['ceiling', 193.7],
    ['spread.atMost', 17.9],
    ['sensors.workingAtLeast', 19],
    ['log.longestGap', 2.43],
    ['log.changesAtMost', 23.9],
    ['leakTest.startAtLeast', 0.859],
    ['leakTest.over', 5.3],
    ['leakTest.lossAtMost', 0.0717],
    ['cure.degreeAtLeast', 0.907],
    ['cure.tgAtLeast', 187.3],
    ['cure.pressureBeforeGel', 5.7],
  ];

  it.each(figures)('shows the figure of %s as it is written', (path, figure) => {
    const text = allSentences(exampleWith({ [path]: figure })).join(' ');
    expect(text).toMatch(new RegExp(`(?<![\\d.])${String(figure).replace('.', '\\.')}(?![\\d])`));
  });

  it('writes tolerances as a band formed in the written unit, never with plus and minus', () => {
    fc.assert(
      fc.property(
        fc.integer({ min: 400, max: 4000 }),
        fc.integer({ min: 0, max: 200 }),
        fc.integer({ min: 1, max: 200 }),
        (target, plus, minus) => {
          const changes = {
            'stages[3].target': target / 10,
            'stages[3].plus': plus / 10,
            'stages[3].minus': minus / 10,
          };
          const stages = [exampleCycle().stages[0], (exampleWith(changes) as { stages: unknown[] }).stages[3]];
          const document = { ...exampleCycle(), stages, windows: [], ceiling: 999 };
          const [lower, upper] = [(target - minus) / 10, (target + plus) / 10];
          expect(words(document).stages[1]?.sentences[0]).toContain(`Held at ${lower} to ${upper} °C`);
          expect(allSentences(document).join(' ')).not.toMatch(/[±+]|\/−/);
        },
      ),
      { seed },
    );
  });

  it('says a colder dwell as entered from above', () => {
    const folder = join(import.meta.dirname, '../../reference/cycles');
    const { stages } = words(JSON.parse(readFileSync(join(folder, 'step-down.json'), 'utf8')));
    expect(stages.find(({ name }) => name === 'anneal')?.sentences[2]).toContain('has cooled to 125 °C');
    expect(stages.find(({ name }) => name === 'hot dwell')?.sentences[2]).toContain('has reached 175 °C');
  });
});

describe('limitsOfCycle', () => {
  it('lists the limits of the example with title and band, in its order', () => {
    expect(limitsOfCycle(parseCycle(exampleCycle())).map(({ name, title, band }) => [name, title, band])).toEqual([
      ['heat-up 1/slowest', 'Heat-up 1, slowest', 'at least 0.5 °C/min'],
      ['heat-up 1/fastest', 'Heat-up 1, fastest', 'at most 3 °C/min'],
      ['dwell 1/time', 'Dwell 1, time', '60 to 80 min'],
      ['dwell 1/longest', 'Dwell 1, longest', 'at most 100 min'],
      ['dwell 1/upper', 'Dwell 1, upper', 'at most 115 °C'],
      ['heat-up 2/slowest', 'Heat-up 2, slowest', 'at least 0.5 °C/min'],
      ['heat-up 2/fastest', 'Heat-up 2, fastest', 'at most 3 °C/min'],
      ['dwell 2/time', 'Dwell 2, time', '120 to 150 min'],
      ['dwell 2/upper', 'Dwell 2, upper', 'at most 185 °C'],
      ['cool-down/fastest', 'Cool-down, fastest', 'at most 3 °C/min'],
      ['window/bag vacuum until venting', 'Bag vacuum until venting', 'at least 0.75 bar below ambient'],
      ['window/cure pressure', 'Cure pressure', '6.5 to 7.5 bar'],
      ['ceiling', 'Ceiling', 'at most 190 °C'],
      ['spread', 'Spread', 'at most 17 °C'],
      ['sensors/working', 'Sensors, working', 'at least 2'],
      ['sensors/must-work', 'Sensors, must work', 'lag'],
      ['log/gap', 'Log, longest gap', 'at most 2 min'],
      ['leak-test', 'Bag leak test', 'at most 0.07 bar in 5 min'],
      ['cure/degree', 'Degree of cure, estimate', 'at least 0.9'],
      ['cure/tg', 'Tg, estimate', 'at least 185 °C'],
      ['cure/pressure-before-gel', 'Pressure before gel, estimate', 'at least 5 bar'],
      ['material/out-life', 'Material, out-life', 'within its out-life'],
      ['instruments/calibration', 'Instruments, calibration', 'in date on the day of the run'],
    ]);
  });

  it('names each limit once, as findings are named', () => {
    const golden = join(import.meta.dirname, '../../reference/cycles');
    for (const name of readdirSync(golden).filter((file) => file.endsWith('.json'))) {
      const names = limitsOfCycle(parseCycle(JSON.parse(readFileSync(join(golden, name), 'utf8')))).map((l) => l.name);
      expect(new Set(names).size).toBe(names.length);
      expect(
        names.every((one) =>
          /^(window\/.+|.+\/(time|longest|upper|lower|slowest|fastest)|ceiling|spread|(sensors|log|cure|material|instruments)\/.+|leak-test)$/.test(
            one,
          ),
        ),
      ).toBe(true);
    }
  });

  it('titles a limit the cycle does not have from its name', () => {
    expect(limitTitle(parseCycle(exampleCycle()), 'dwell 2/lower')).toBe('Dwell 2, lower');
  });
});
