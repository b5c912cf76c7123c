/** Instants are ms in the readings and ISO 8601 in UTC everywhere a person or a document sees them. */
export function isoFromMs(ms: number): string {
  return new Date(ms).toISOString();
}
