/** Cells that mean "no reading", ready to be compared as bytes and as text. */
export interface MissingCodes {
  readonly bytes: readonly Uint8Array[];
  /** Figures among the codes: a reading equal to one is looked at again, as text. */
  readonly figures: readonly number[];
  has(cell: string): boolean;
}

export function missingCodes(
  codes: readonly string[],
  decimal: '.' | ',',
  charset: 'utf-8' | 'windows-1252',
): MissingCodes {
  const trimmed = codes.map((code) => code.trim());
  const set = new Set(trimmed);
  return {
    bytes: trimmed.map((code) => encoded(code, charset)).filter((bytes) => bytes !== null),
    figures: trimmed.map((code) => Number(code.replace(decimal, '.'))).filter((figure) => Number.isFinite(figure)),
    has: (cell) => cell === '' || set.has(cell),
  };
}

/** Null where the text cannot be written in Windows-1252 by its code points alone; such a code is compared as text. */
function encoded(code: string, charset: 'utf-8' | 'windows-1252'): Uint8Array | null {
  if (charset === 'utf-8') return new TextEncoder().encode(code);
  return /^[ -~]*$/.test(code) ? Uint8Array.from(code, (one) => one.charCodeAt(0)) : null;
}
