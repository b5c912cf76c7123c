/** Cells of one line, unquoted and trimmed; line ends inside quotes are not looked for. */
export function cellsOfLine(line: string, delimiter: string): string[] {
  const text = delimiter === ' ' ? line.trim().replace(/ +/g, ' ') : line;
  if (!text.includes('"')) return text.split(delimiter).map((cell) => cell.trim());
  const cells: string[] = [];
  for (let at = 0; at <= text.length; at++) {
    const quoted = /^"((?:[^"]|"")*)"/.exec(text.slice(at));
    const end = text.indexOf(delimiter, at + (quoted?.[0].length ?? 0));
    const until = end < 0 ? text.length : end;
    cells.push((quoted ? quoted[1]!.replaceAll('""', '"') : text.slice(at, until)).trim());
    at = until;
  }
  return cells;
}

/** A number with either decimal mark, or none. */
export function isFigure(cell: string): boolean {
  return /^[+-]?(?:\d+(?:[.,]\d*)?|[.,]\d+)(?:[eE][+-]?\d+)?$/.test(cell);
}

/** A date, a time of day, or both, in any of the forms that are proposed. */
export function isStampLike(cell: string): boolean {
  return /^\d{1,4}([-/.])\d{1,2}\1\d{1,4}(?:\D|$)/.test(cell) || /\d{1,2}:\d{2}/.test(cell) || hasMonthName(cell);
}

function hasMonthName(cell: string): boolean {
  return /^\d{1,2}[-/. ]\p{L}{3,9}\.?[-/. ]\d{2,4}(?:\D|$)/u.test(cell);
}
