import { readFile } from 'node:fs/promises';
import { DomainError } from '../../models/errors.ts';

/** Reads a JSON document from a file and takes it apart; every refusal names the file. */
export async function readDocumentFile<T>(path: string, parse: (document: unknown) => T): Promise<T> {
  const text = await readText(path);
  try {
    return parse(parseJson(text));
  } catch (error) {
    if (!(error instanceof DomainError)) throw error;
    throw new DomainError(error.code, `${path}: ${error.message}`, { file: path, ...error.facts }, { cause: error });
  }
}

async function readText(path: string): Promise<string> {
  try {
    const text = await readFile(path, 'utf8');
    return text.startsWith('\ufeff') ? text.slice(1) : text;
  } catch (cause) {
    const { code = 'unknown error' } = cause as NodeJS.ErrnoException;
    throw new DomainError('file-unreadable', `${path}: cannot be read (${code})`, { file: path }, { cause });
  }
}

function parseJson(text: string): unknown {
  try {
    return JSON.parse(text);
  } catch (cause) {
    if (!(cause instanceof SyntaxError)) throw cause;
    const before = text.slice(0, placeOfError(text, cause));
    const line = before.split('\n').length;
    const column = before.length - before.lastIndexOf('\n');
    const found = text[before.length];
    throw new DomainError(
      'document-not-json',
      `line ${line}, column ${column}: not JSON; ${found === undefined ? 'it ends too early' : `"${found}" cannot stand here`}`,
      { line, column },
    );
  }
}

/** The engine tells the place of some errors only; of the others it is where the text stops being a mere beginning. */
function placeOfError(text: string, { message }: SyntaxError): number {
  const told = /at position (\d+)/.exec(message);
  if (told !== null) return Number(told[1]);
  if (message.startsWith('Unexpected end')) return text.length;
  let [good, bad] = [0, text.length];
  while (bad - good > 1) {
    const middle = (good + bad) >> 1;
    if (isBeginning(text.slice(0, middle))) good = middle;
    else bad = middle;
  }
  return bad - 1;
}

function isBeginning(text: string): boolean {
  try {
    JSON.parse(text);
    return true;
  } catch (error) {
    // Only the message says whether more text could mend it.
    return !String(error).startsWith('SyntaxError: Unexpected token');
  }
}
