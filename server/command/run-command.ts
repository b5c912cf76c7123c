import { DomainError } from '../../models/errors.ts';
import { VERSION } from '../contract/version.ts';
import { checkCommand } from './check.ts';
import { cureCommand } from './cure.ts';
import { importCommand } from './import.ts';
import { practiceCommand } from './practice.ts';
import { serveCommand } from './serve.ts';
import { type Command, EXIT } from './usage.ts';
import { verifyCommand } from './verify.ts';

const COMMANDS: readonly Command[] = [
  checkCommand,
  cureCommand,
  importCommand,
  serveCommand,
  practiceCommand,
  verifyCommand,
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
  const command = COMMANDS.find((one) => one.name === name);
  if (command === undefined) {
    const what = name === undefined ? 'Say what is to be done' : `"${name}" is not a command`;
    throw new DomainError('usage', `${what}.\n\n${overview()}`);
  }
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
