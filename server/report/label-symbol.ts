import bwip from '@bwip-js/node';
import { DomainError } from '../../models/errors.ts';
import type { LabelSymbol } from '../contract/labels.ts';

/**
 * A code as a symbol that a scanner reads: an SVG of one unit a module, quiet zones included.
 *
 * Code 128 by ISO/IEC 15417, which has ASCII alone; QR Code by ISO/IEC 18004, error correction M or, where it costs no module, more; a code beyond ASCII in
 * UTF-8. The symbol holds the code and nothing else.
 */
export function labelSymbol(symbol: LabelSymbol, code: string): string {
  return symbol === 'qr' ? qrCode(code) : code128(code);
}

/** Modules kept clear on every side of a QR Code: ISO/IEC 18004, 4. */
const QR_QUIET = 4;
/** Modules kept clear before and after a Code 128: ISO/IEC 15417, 10. */
const BAR_QUIET = 10;
/** Of a bar, in modules: 15 % of a symbol of 200 modules, which is what hand-held readers ask for. */
const BAR_HEIGHT = 30;

function qrCode(code: string): string {
  const [symbol] = bwip.raw('qrcode', code, 'eclevel=M');
  if (symbol === undefined || !('pixs' in symbol)) throw new Error('a QR Code without modules');
  const { pixs, pixx, pixy } = symbol;
  const side = pixx + 2 * QR_QUIET;
  let path = '';
  for (let row = 0; row < pixy; row += 1) {
    for (let from = 0; from < pixx; from += 1) {
      if (pixs[row * pixx + from] !== 1) continue;
      let until = from + 1;
      while (until < pixx && pixs[row * pixx + until] === 1) until += 1;
      path += rectangle(from + QR_QUIET, row + QR_QUIET, until - from, 1);
      from = until;
    }
  }
  return svg(side, side, path);
}

function code128(code: string): string {
  if (!/^[\x20-\x7e]+$/.test(code)) {
    throw new DomainError('invalid-request', `Code 128 has no letters beyond ASCII; print "${code}" as a QR Code`, {
      code,
    });
  }
  const [symbol] = bwip.raw({ bcid: 'code128', text: code });
  if (symbol === undefined || !('sbs' in symbol)) throw new Error('a Code 128 without bars');
  let path = '';
  let at = BAR_QUIET;
  symbol.sbs.forEach((width, n) => {
    if (n % 2 === 0) path += rectangle(at, 0, width, BAR_HEIGHT);
    at += width;
  });
  return svg(at + BAR_QUIET, BAR_HEIGHT, path);
}

function rectangle(x: number, y: number, width: number, height: number): string {
  return `M${x} ${y}h${width}v${height}h-${width}z`;
}

/** White beneath, so that it is read on a dark screen as on paper. */
function svg(width: number, height: number, path: string): string {
  return (
    `<svg xmlns="http://www.w3.org/2000/svg" viewBox="0 0 ${width} ${height}" shape-rendering="crispEdges">` +
    `<path fill="#fff" d="M0 0h${width}v${height}h-${width}z"/><path d="${path}"/></svg>\n`
  );
}
