import type { TypedProgramme, TypedStep } from './read-programme.ts';

/** A programme in one line that an address can hold: `20C_2to110_hold60_3to60`. */
export function programmeText({ unit, start, steps }: TypedProgramme): string {
  const words = steps.map((step) =>
    step.kind === 'hold' ? `hold${bare(step.minutes)}` : `${bare(step.rate)}to${bare(step.to)}`,
  );
  return [`${bare(start)}${unit.slice(1)}`, ...words].join('_');
}

/** The programme that {@link programmeText} wrote; null for any other text. Its figures are still to be read. */
export function parseProgrammeText(text: string): TypedProgramme | null {
  const [first = '', ...words] = text.split('_');
  const start = /^([\d.+-]*)([CF])$/.exec(first);
  if (start === null) return null;
  const steps: TypedStep[] = [];
  for (const word of words) {
    const hold = /^hold([\d.+-]*)$/.exec(word);
    const ramp = /^([\d.+-]*)to([\d.+-]*)$/.exec(word);
    if (hold !== null) steps.push({ kind: 'hold', minutes: hold[1]! });
    else if (ramp !== null) steps.push({ kind: 'ramp', rate: ramp[1]!, to: ramp[2]! });
    else return null;
  }
  return { unit: start[2] === 'C' ? '°C' : '°F', start: start[1]!, steps };
}

function bare(typed: string): string {
  return typed.trim().replace('\u2212', '-').replace(',', '.');
}
