/** RFC 4180: a cell with a delimiter, a quote or a line break stands in quotes, its quotes doubled. */
export function csvCell(text: string): string {
  return /[",\r\n]/.test(text) ? `"${text.replaceAll('"', '""')}"` : text;
}
