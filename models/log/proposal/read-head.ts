import { DomainError } from '../../errors.ts';
import { findMark, isBinary, looksLikeUtf16 } from '../check-encoding.ts';
import type { LogEncoding } from '../layout.ts';
import { firstInvalidUtf8 } from '../utf8.ts';
import { guessed, type LayoutStatement, proved } from './statement.ts';

/** The first lines of an unknown file as text. */
export interface Head {
  readonly encoding: LogEncoding;
  readonly lines: readonly string[];
  readonly statement: LayoutStatement;
}

/** The beginning of a file, or all of it. */
export interface FileHead {
  readonly name: string;
  readonly head: Uint8Array;
  /** `head` is the whole file, so that its last line is whole too. */
  readonly isWhole?: boolean;
}

/**
 * Turns a file's beginning into lines.
 *
 * @throws {DomainError} `log-empty`, or `log-not-text` when the bytes are no text in any encoding known here.
 */
export function readHead({ name, head, isWhole = false }: FileHead): Head {
  if (head.length === 0) throw new DomainError('log-empty', `${name} is empty`, { file: name });
  const [encoding, skipped, statement] = findEncoding(head, name);
  const text = new TextDecoder(encoding, { ignoreBOM: true }).decode(head.subarray(skipped));
  if (text.trim() === '') throw new DomainError('log-empty', `${name} holds nothing but blanks`, { file: name });
  const lines = text.split(/\r\n|\r|\n/);
  if (!isWhole || lines.at(-1) === '') lines.pop();
  return { encoding, lines, statement };
}

function findEncoding(head: Uint8Array, name: string): [LogEncoding, number, LayoutStatement] {
  const mark = findMark(head);
  if (mark?.encoding === 'utf-32') {
    throw new DomainError('log-not-text', `${name} is written in UTF-32, which is not read`, { file: name });
  }
  if (mark) return [mark.encoding, mark.length, proved('encoding', 'The file begins with its byte-order mark.')];
  const utf16 = looksLikeUtf16(head);
  if (utf16) return [utf16, 0, proved('encoding', 'Every other byte is zero, as in UTF-16.')];
  if (isBinary(head)) throw new DomainError('log-not-text', `${name} is not a text file`, { file: name });
  const wrong = firstInvalidUtf8(head, 0, head.length);
  if (wrong < head.length) {
    const line = lineAt(head, wrong);
    const because = `Line ${line} is not UTF-8; windows-1252 is what most such recorders write.`;
    return ['windows-1252', 0, guessed('encoding', because, ['windows-1252'])];
  }
  const special = head.findIndex((byte) => byte >= 0x80);
  if (special < 0) return ['utf-8', 0, guessed('encoding', 'There is nothing but plain ASCII in its first lines.')];
  const because = `The special characters, first in line ${lineAt(head, special)}, are well-formed UTF-8.`;
  return ['utf-8', 0, proved('encoding', because)];
}

function lineAt(bytes: Uint8Array, at: number): number {
  let line = 1;
  for (let i = 0; i < at; i++) if (bytes[i] === 10 || (bytes[i] === 13 && bytes[i + 1] !== 10)) line++;
  return line;
}
