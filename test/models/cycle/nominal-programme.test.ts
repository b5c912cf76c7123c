import { describe, expect, it } from 'vitest';
import { nominalProgramme } from '../../../models/cycle/nominal-programme.ts';
import { parseCycle } from '../../../models/cycle/parse-cycle.ts';
import { readProgramme, typedFrom } from '../../../models/cycle/read-programme.ts';
import { exampleCycle } from './example-cycle.ts';

type Written = ReturnType<typeof exampleCycle>;

function made(change: (cycle: Written) => void = () => undefined) {
  const cycle = exampleCycle();
  change(cycle);
  return nominalProgramme(parseCycle(cycle));
}

describe('nominalProgramme', () => {
  it('heats at the middle of each rate band and holds each dwell at its target for its least time', () => {
    // By hand from the example: 0.5 to 3 °C/min, 110 °C for 60 to 80 min, 180 °C for 120 to 150 min, at most 3 °C/min to 60 °C.
    const { programme, words } = made();
    expect(programme).toEqual({
      unit: '°C',
      start: 20,
      steps: [
        { kind: 'ramp', rate: 1.75, to: 110 },
        { kind: 'hold', minutes: 60 },
        { kind: 'ramp', rate: 1.75, to: 180 },
        { kind: 'hold', minutes: 120 },
        { kind: 'ramp', rate: 3, to: 60 },
      ],
    });
    expect(words).toEqual([
      'It starts at 20 °C; the document names no start.',
      'Heat-up 1: to 110 °C at 1.75 °C/min, the middle of its band.',
      'Dwell 1: 110 °C for 60 min, its least time.',
      'Heat-up 2: to 180 °C at 1.75 °C/min, the middle of its band.',
      'Dwell 2: 180 °C for 120 min, its least time.',
      'Cool-down: to 60 °C at 3 °C/min, its greatest rate, as no other is written.',
    ]);
  });

  it('says what it takes where the document leaves it open', () => {
    const { programme, words } = made((cycle) => {
      for (const stage of cycle.stages as Record<string, unknown>[]) delete stage.rate;
      delete (cycle.stages[4] as Record<string, unknown>).until;
      delete (cycle as Record<string, unknown>).windows;
    });
    expect(programme.steps.filter(({ kind }) => kind === 'ramp')).toEqual([
      { kind: 'ramp', rate: 2, to: 110 },
      { kind: 'ramp', rate: 2, to: 180 },
      { kind: 'ramp', rate: 2, to: 60 },
    ]);
    expect(words[1]).toBe('Heat-up 1: to 110 °C at 2 °C/min, taken here, as no rate is written.');
    expect(words[5]).toBe(
      'Cool-down: to 60 °C, taken here as no end is written, at 2 °C/min, taken here, as no rate is written.',
    );
  });

  it('turns rates by the hour, and in the other unit, into the cycle’s own a minute', () => {
    const { programme } = made((cycle) => {
      (cycle.units as Record<string, unknown>).rate = '°F/h';
      (cycle.stages[0] as { rate: object }).rate = { ...cycle.stages[0]!.rate, atLeast: 54, atMost: 162 };
    });
    // 108 °F/h = 60 °C/h = 1 °C/min.
    expect(programme.steps[0]).toEqual({ kind: 'ramp', rate: 1, to: 110 });
  });

  it('is a programme that can be tried', () => {
    expect(readProgramme(typedFrom(made().programme)).refusals).toEqual([]);
  });
});
