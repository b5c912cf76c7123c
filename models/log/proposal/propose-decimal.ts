import { isFigure } from './cells.ts';
import type { Reading } from './find-table.ts';
import { asked, guessed, type LayoutStatement, proved } from './statement.ts';

/** Finds the decimal mark. A figure such as 1.234 alone could as well be grouped thousands, and proves nothing. */
export function proposeDecimal(readings: readonly Reading[]): { decimal: '.' | ','; statement: LayoutStatement } {
  const seen = { '.': '', ',': '' };
  const proof = { '.': '', ',': '' };
  for (const { line, cells } of readings) {
    for (const cell of cells) {
      if (!isFigure(cell)) continue;
      const mark = cell.includes('.') ? '.' : cell.includes(',') ? ',' : null;
      if (mark === null) continue;
      seen[mark] ||= `${cell} in line ${line}`;
      if (!proof[mark] && !/^[+-]?[1-9]\d{0,2}[.,]\d{3}$/.test(cell)) proof[mark] = `${cell} in line ${line}`;
    }
  }
  if (proof['.'] && proof[',']) {
    const because = `${proof['.']} has a point, ${proof[',']} a comma.`;
    return { decimal: '.', statement: asked('decimal', because, ['.', ',']) };
  }
  const mark = proof[','] || (!proof['.'] && seen[',']) ? ',' : '.';
  if (proof[mark]) return { decimal: mark, statement: proved('decimal', `${proof[mark]} cannot be read otherwise.`) };
  if (seen['.'] || seen[',']) {
    const because = `${seen[mark]} may have decimals, or be grouped thousands.`;
    return { decimal: mark, statement: asked('decimal', because, ['.', ',']) };
  }
  return { decimal: '.', statement: guessed('decimal', 'All figures are whole numbers.', ['.', ',']) };
}
