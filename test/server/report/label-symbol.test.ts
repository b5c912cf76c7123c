import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { labelSymbol } from '../../../server/report/label-symbol.ts';
import { liveApp } from '../live-app.ts';
import { code128Values, readCode128, widthTable } from './read-code128.ts';
import { readQr } from './read-qr.ts';

interface Drawn {
  readonly width: number;
  readonly height: number;
  readonly rectangles: readonly {
    readonly x: number;
    readonly y: number;
    readonly width: number;
    readonly height: number;
  }[];
}

/** What an SVG of ours draws in black. */
function drawn(svg: string): Drawn {
  const [, width, height] = /viewBox="0 0 (\d+) (\d+)"/.exec(svg) ?? [];
  const path = /<path d="([^"]*)"/.exec(svg)?.[1] ?? '';
  const rectangles = [...path.matchAll(/M(\d+) (\d+)h(\d+)v(\d+)h-\3z/g)].map(([, x, y, w, h]) => ({
    x: Number(x),
    y: Number(y),
    width: Number(w),
    height: Number(h),
  }));
  expect(rectangles.map(({ x, y, width: w, height: h }) => `M${x} ${y}h${w}v${h}h-${w}z`).join('')).toBe(path);
  return { width: Number(width), height: Number(height), rectangles };
}

/** Widths of bars and spaces, and the modules left clear on either side. */
function barsOf(svg: string): { widths: number[]; quiet: readonly [number, number] } {
  const { width, rectangles } = drawn(svg);
  const widths: number[] = [];
  let at = rectangles[0]?.x ?? 0;
  for (const bar of rectangles) {
    if (bar.x > at) widths.push(bar.x - at);
    widths.push(bar.width);
    at = bar.x + bar.width;
  }
  return { widths, quiet: [rectangles[0]?.x ?? 0, width - at] };
}

function modulesOf(svg: string, quiet: number): boolean[][] {
  const { width, height, rectangles } = drawn(svg);
  const all = Array.from({ length: height }, () => new Array<boolean>(width).fill(false));
  for (const { x, y, width: w } of rectangles) for (let n = x; n < x + w; n += 1) (all[y] as boolean[])[n] = true;
  const inner = all.slice(quiet, height - quiet).map((row) => row.slice(quiet, width - quiet));
  const clear = all.flat().filter(Boolean).length === inner.flat().filter(Boolean).length;
  expect(clear, 'the quiet zone is clear').toBe(true);
  return inner;
}

const code = fc.stringMatching(/^[ -~]{1,24}$/);

describe('the reader the symbols are held against', () => {
  // ISO/IEC 15417: a character is 11 modules, its bars an even number of them; every one differs.
  it('has a table of widths that keeps the promises of Code 128', () => {
    const table = widthTable();
    expect(table.length).toBe(106);
    expect(new Set(table).size).toBe(106);
    for (const widths of table) {
      const [a = 0, b = 0, c = 0, d = 0, e = 0, f = 0] = [...widths].map(Number);
      expect([a + b + c + d + e + f, (a + c + e) % 2]).toEqual([11, 0]);
    }
  });
});

describe('a Code 128', () => {
  it('ends in the check digit worked out by hand', () => {
    // Start B 104; S = 51, R = 50, - = 13 and, one by one, weighed by their places: 104 + 51 + 2·50 + 3·13 = 294 = 2·103 + 88.
    expect(code128Values(barsOf(labelSymbol('code128', 'SR-')).widths)).toEqual([104, 51, 50, 13, 88]);
    // "Wikipedia" in code set B has the check digit 88: a published example, from memory.
    expect(code128Values(barsOf(labelSymbol('code128', 'Wikipedia')).widths).at(-1)).toBe(88);
  });

  it('is read back as the code, with ten clear modules on either side', () => {
    fc.assert(
      fc.property(code, (text) => {
        const { widths, quiet } = barsOf(labelSymbol('code128', text));
        expect([readCode128(widths), ...quiet]).toEqual([text, 10, 10]);
      }),
      { numRuns: 60 },
    );
  });

  it('refuses a letter that it has not, by name', () => {
    expect(() => labelSymbol('code128', 'ÄR-1')).toThrow('print "ÄR-1" as a QR Code');
  });
});

describe('a QR Code', () => {
  it('is read back as the code, by a reader of the standard', () => {
    fc.assert(
      fc.property(code, (text) => {
        expect(readQr(modulesOf(labelSymbol('qr', text), 4))).toBe(text);
      }),
      { numRuns: 60 },
    );
    for (const text of ['SR-0417', '0123456789', 'Holm Ä–1', 'ABC/12.5 B', 'https://x?a=b^c']) {
      expect(readQr(modulesOf(labelSymbol('qr', text), 4))).toBe(text);
    }
  });

  it('is not read where one module is turned over', () => {
    const modules = modulesOf(labelSymbol('qr', 'SR-0417'), 4);
    (modules[20] as boolean[])[20] = !modules[20]?.[20];
    expect(() => readQr(modules)).toThrow('syndrome');
  });
});

describe('GET /api/labels', () => {
  it('answers with the symbol of a thing that is on record, as a picture', async () => {
    const app = await liveApp();
    expect((await app.post('/api/parts/SR-1/layup', { tool: 'T-7' })).status).toBe(201);
    for (const [kind, of] of [
      ['part', 'SR-1'],
      ['tool', 'T-7'],
    ]) {
      const { status, headers, text } = await app.get(`/api/labels?kind=${kind}&code=${of}`);
      expect([status, headers.get('content-type'), headers.get('x-content-type-options')]).toEqual([
        200,
        'image/svg+xml',
        'nosniff',
      ]);
      expect(readQr(modulesOf(text, 4))).toBe(of);
      expect((await app.get(`/api/find?code=${of}`)).body.hits[0]).toMatchObject({ kind, exact: true });
    }
    const bars = await app.get('/api/labels?kind=part&code=SR-1&symbol=code128');
    expect(readCode128(barsOf(bars.text).widths)).toBe('SR-1');
  });

  it('prints none that would lead nowhere', async () => {
    const app = await liveApp();
    for (const kind of ['part', 'tool', 'roll', 'kit']) {
      const { status, body } = await app.get(`/api/labels?kind=${kind}&code=none`);
      expect([status, body.type]).toEqual([404, '/problems/not-found']);
    }
    expect((await app.get('/api/labels?kind=part')).status).toBe(400);
  });
});
