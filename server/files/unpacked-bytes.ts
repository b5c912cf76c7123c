const DIRECTORY_END = 0x06054b50;
const DIRECTORY_ENTRY = 0x02014b50;

/**
 * How many bytes a zip archive says it unpacks to; 0 where its directory is damaged, which unpacking will find out.
 *
 * Source: PKWARE APPNOTE 6.3.10, 4.3.12 (central directory) and 4.3.16 (its end).
 */
export function unpackedBytes(zip: Uint8Array): number {
  const view = new DataView(zip.buffer, zip.byteOffset, zip.byteLength);
  let end = zip.length - 22;
  while (end >= 0 && view.getUint32(end, true) !== DIRECTORY_END) end--;
  if (end < 0) return 0;
  let at = view.getUint32(end + 16, true);
  let sum = 0;
  while (at + 46 <= zip.length && view.getUint32(at, true) === DIRECTORY_ENTRY) {
    sum += view.getUint32(at + 24, true);
    at += 46 + view.getUint16(at + 28, true) + view.getUint16(at + 30, true) + view.getUint16(at + 32, true);
  }
  return sum;
}
