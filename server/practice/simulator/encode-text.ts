import type { LogEncoding } from '../../../models/log/layout.ts';

/** Bytes of a text as a recorder's computer writes it. */
export function encodeText(text: string, encoding: LogEncoding, byteOrderMark: boolean): Uint8Array {
  const marked = byteOrderMark ? `\uFEFF${text}` : text;
  switch (encoding) {
    case 'utf-8':
      return new TextEncoder().encode(marked);
    case 'utf-16le':
    case 'utf-16be':
      return utf16(marked, encoding === 'utf-16le');
    case 'windows-1252':
      return windows1252(text);
  }
}

function utf16(text: string, isLittleEndian: boolean): Uint8Array {
  const bytes = new Uint8Array(2 * text.length);
  const view = new DataView(bytes.buffer);
  for (let i = 0; i < text.length; i++) view.setUint16(2 * i, text.charCodeAt(i), isLittleEndian);
  return bytes;
}

/** Only what practice files hold: ASCII and the upper half that the code page shares with Unicode. */
function windows1252(text: string): Uint8Array {
  const bytes = new Uint8Array(text.length);
  for (let i = 0; i < text.length; i++) {
    const code = text.charCodeAt(i);
    if (code > 0xff || (code >= 0x80 && code < 0xa0)) throw new Error(`"${text[i]}" is not written in windows-1252`);
    bytes[i] = code;
  }
  return bytes;
}
