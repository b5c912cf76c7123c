import type { PictureType } from '../contract/papers.ts';

/**
 * What kind of picture bytes are, told from how they begin; null where they are none that a browser may show.
 *
 * Source: first bytes of PNG (W3C PNG, 5.2), JPEG (ITU-T T.81, B.1.1.3), GIF (GIF89a, 17), WebP (RFC 9649, 2.4).
 */
export function pictureType(head: Uint8Array): PictureType | null {
  if (begins(head, [0x89, 0x50, 0x4e, 0x47, 0x0d, 0x0a, 0x1a, 0x0a])) return 'image/png';
  if (begins(head, [0xff, 0xd8, 0xff])) return 'image/jpeg';
  if (begins(head, ascii('GIF87a')) || begins(head, ascii('GIF89a'))) return 'image/gif';
  if (begins(head, ascii('RIFF')) && begins(head.subarray(8), ascii('WEBP'))) return 'image/webp';
  return null;
}

function begins(head: Uint8Array, bytes: readonly number[]): boolean {
  return bytes.every((byte, n) => head[n] === byte);
}

function ascii(text: string): number[] {
  return [...text].map((letter) => letter.charCodeAt(0));
}
