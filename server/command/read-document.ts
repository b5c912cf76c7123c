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
    const at = /at position (\d+)/.exec(cause.message);
    const before = text.slice(0, at === null ? text.length : Number(at[1]));
    const line = before.split('\n').length;
    const column = before.length - before.lastIndexOf('\n');
    throw new DomainError('document-not-json', `line ${line}, column ${column}: not JSON (${cause.message})`, {
      line,
      column,
    });
  }
}
