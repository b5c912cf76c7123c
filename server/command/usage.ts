import { type ParseArgsConfig, parseArgs } from 'node:util';
import { DomainError } from '../../models/errors.ts';

type Options = NonNullable<ParseArgsConfig['options']>;

/** A command of the command line. */
export interface Command {
  readonly help: string;
  /** Does it and returns the exit status. */
  readonly run: (args: readonly string[]) => Promise<number>;
}

/** Exit statuses beside those of a verdict. */
export const EXIT = { done: 0, wrongUsage: 64, unusableInput: 65, fault: 70 } as const;

/** Reads a command's words; what is not understood is wrong usage. */
export function readWords<const O extends Options>(command: string, args: readonly string[], options: O) {
  try {
    return parseArgs({ args: [...args], options, allowPositionals: true, strict: true });
  } catch (error) {
    if (!(error instanceof TypeError)) throw error;
    throw wrongUsage(command, error.message.split('. To specify')[0] ?? error.message);
  }
}

/** An option that must be given. */
export function needed(command: string, option: string, value: string | undefined): string {
  if (value !== undefined && value !== '') return value;
  throw wrongUsage(command, `--${option} is missing`);
}

export function wrongUsage(command: string, what: string): DomainError {
  return new DomainError('usage', `${what}. "dwellbook ${command} --help" says how it is written`, { command });
}

/** Reads an option's value; one that cannot be read is wrong usage. */
export function asUsage<T>(command: string, option: string, read: () => T): T {
  try {
    return read();
  } catch (error) {
    if (!(error instanceof DomainError)) throw error;
    throw wrongUsage(command, `--${option}: ${error.message}`);
  }
}

/** A whole number within bounds, as an option gives it. */
export function wholeNumber(
  command: string,
  option: string,
  value: string,
  { atLeast, atMost }: { atLeast: number; atMost: number },
): number {
  const number = Number(value);
  if (/^\d+$/.test(value) && number >= atLeast && number <= atMost) return number;
  throw wrongUsage(command, `--${option} is "${value}"; expected a whole number from ${atLeast} to ${atMost}`);
}
