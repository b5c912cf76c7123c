/** A row of a table with the line of the file it begins on. */
export interface CsvRow {
  readonly line: number;
  readonly cells: readonly string[];
  /** A quoted cell that is not closed, or has something after its closing quote. */
  readonly isBroken: boolean;
}

/** Rows of comma-separated text (RFC 4180, any delimiter of one character, LF or CRLF); empty lines are passed over. */
export function* csvRows(text: string, delimiter: string): Generator<CsvRow> {
  let line = 1;
  for (let at = 0; at < text.length; ) {
    const end = text.indexOf('\n', at);
    const until = end < 0 ? text.length : end;
    const plain = text.slice(at, text[until - 1] === '\r' && until > at ? until - 1 : until);
    if (!plain.includes('"')) {
      if (plain.trim() !== '')
        yield { line, cells: plain.split(delimiter).map((cell) => cell.trim()), isBroken: false };
      line += 1;
      at = until + 1;
      continue;
    }
    const row = quotedRow(text, at, delimiter);
    yield { line, cells: row.cells, isBroken: row.isBroken };
    line += row.lines;
    at = row.next;
  }
}

/** A row in which something is quoted. One that is broken ends with its first line, so that those after it are read. */
function quotedRow(text: string, start: number, delimiter: string) {
  const cells: string[] = [];
  let at = start;
  let lines = 1;
  for (;;) {
    if (text[at] === '"') {
      const cell = quotedCell(text, at);
      const after = cell === null ? -1 : cell.next;
      if (cell === null || !isEnd(text, after, delimiter)) return brokenRow(text, start, delimiter);
      cells.push(cell.text.trim());
      lines += cell.text.split('\n').length - 1;
      at = after;
    } else {
      let end = at;
      while (!isEnd(text, end, delimiter)) end += 1;
      cells.push(text.slice(at, end).trim());
      at = end;
    }
    if (text[at] === delimiter) at += 1;
    else return { cells, lines, isBroken: false, next: at + (text[at] === '\r' ? 2 : 1) };
  }
}

function quotedCell(text: string, start: number): { text: string; next: number } | null {
  for (let at = start + 1; ; at += 2) {
    at = text.indexOf('"', at);
    if (at < 0) return null;
    if (text[at + 1] !== '"') return { text: text.slice(start + 1, at).replaceAll('""', '"'), next: at + 1 };
  }
}

function isEnd(text: string, at: number, delimiter: string): boolean {
  const character = text[at];
  return (
    character === undefined ||
    character === delimiter ||
    character === '\n' ||
    (character === '\r' && (text[at + 1] === '\n' || at + 1 === text.length))
  );
}

function brokenRow(text: string, start: number, delimiter: string) {
  const end = text.indexOf('\n', start);
  const until = end < 0 ? text.length : end;
  return { cells: text.slice(start, until).trim().split(delimiter), lines: 1, isBroken: true, next: until + 1 };
}
