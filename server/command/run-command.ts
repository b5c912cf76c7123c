import { DomainError } from '../../models/errors.ts';
import { VERSION } from '../contract/version.ts';
import { type Command, EXIT } from './usage.ts';

interface NamedCommand {
  readonly name: string;
  readonly summary: string;
  /** Loads it: each command needs another part of the program. */
  readonly load: () => Promise<Command>;
}

const COMMANDS: readonly NamedCommand[] = [
  {
    name: 'check',
    summary: 'judges a logged run against a cycle',
    load: async () => (await import('./check.ts')).checkCommand,
  },
  {
    name: 'cure',
    summary: 'estimates degree of cure and Tg along a logged run',
    load: async () => (await import('./cure.ts')).cureCommand,
  },
  {
    name: 'import',
    summary: "records a recorder's file as a run in the database",
    load: async () => (await import('./import.ts')).importCommand,
  },
  {
    name: 'serve',
    summary: 'serves a workshop to browsers',
    load: async () => (await import('./serve.ts')).serveCommand,
  },
  {
    name: 'practice',
    summary: 'serves an invented workshop to practise on',
    load: async () => (await import('./practice.ts')).practiceCommand,
  },
  {
    name: 'verify',
    summary: 'recomputes every hash of a workshop',
    load: async () => (await import('./verify.ts')).verifyCommand,
  },
];

/** Does what the words of the command line ask for and returns the exit status. */
export async function runCommand(words: readonly string[]): Promise<number> {
  try {
    return await dispatch(words);
  } catch (error) {
    if (!(error instanceof DomainError)) {
      process.stderr.write(
        `dwellbook: a fault of the program itself\n${error instanceof Error ? error.stack : error}\n`,
      );
      return EXIT.fault;
    }
    process.stderr.write(`dwellbook: ${error.message}\n`);
    return error.code === 'usage' ? EXIT.wrongUsage : EXIT.unusableInput;
  }
}

async function dispatch([name, ...args]: readonly string[]): Promise<number> {
  if (name === '--help' || name === '-h' || name === 'help') return say(overview());
  if (name === '--version') return say(`${VERSION}\n`);
  const named = COMMANDS.find((one) => one.name === name);
  if (named === undefined) {
    const what = name === undefined ? 'Say what is to be done' : `"${name}" is not a command`;
    throw new DomainError('usage', `${what}.\n\n${overview()}`);
  }
  const command = await named.load();
  if (args.includes('--help') || args.includes('-h')) return say(command.help);
  return command.run(args);
}

function say(text: string): number {
  process.stdout.write(text);
  return EXIT.done;
}

function overview(): string {
  const lines = COMMANDS.map(({ name, summary }) => `  ${name.padEnd(9)} ${summary}\n`);
  return `Usage: dwellbook COMMAND [OPTIONS]

${lines.join('')}
"dwellbook COMMAND --help" says more. It only reads: it controls no vessel, and says nothing about whether one is
safe to open.
`;
}
