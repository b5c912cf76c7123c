import { describe, expect, it } from 'vitest';
import { readLog } from '../../../models/log/read-log.ts';
import { fileOf, layoutOf, read, refusalOf } from './logs.ts';

const HEAD = 'Stamp,T1,T2\n';
const GOOD = '2026-03-03 08:14:00,20.0,20.5\n';
const MORE = '2026-03-03 08:14:30,20.1,20.6\n';

describe('a log that cannot be read', () => {
  it.each([
    ['12x.4', 'is not a number'],
    ['123.4*', 'something stands behind the figure'],
    ['1 234.5', 'thousands separators are not read'],
    ["1'234.5", 'thousands separators are not read'],
    ['"1,234.5"', 'thousands separators are not read'],
    ['"20,5"', 'another decimal mark'],
    ['NaN', 'missing codes'],
    ['-', 'missing codes'],
    ['--1', 'is not a number'],
    ['1e999', 'is not a number'],
    ['0x14', 'is not a number'],
    ['open', 'missing codes'],
    ['∞', 'is not a number'],
  ])('names file, line and column of the cell %s', (cell, why) => {
    const refusal = refusalOf(() => read(`${HEAD}${GOOD}\n2026-03-03 08:14:30,${cell},20.6\n${MORE}`));
    expect(refusal).toMatchObject({ code: 'log-cell-unreadable', facts: { file: 'run.csv', line: 4, column: 'T1' } });
    expect(refusal.message).toContain('run.csv, line 4, column "T1"');
    expect(refusal.message).toContain(why);
  });

  it('is refused for a bad cell in the last line too, which is no footer', () => {
    const refusal = refusalOf(() => read(`${HEAD}${GOOD}2026-03-03 08:14:30,2x.1,20.6\n`));
    expect(refusal).toMatchObject({ code: 'log-cell-unreadable', facts: { line: 3 } });
    expect(refusalOf(() => read(`${HEAD}${GOOD}2026-03-03 08:14:30,2x.1,20.6`)).facts.line).toBe(3);
  });

  it('can be read once the cell is called missing', () => {
    const text = `${HEAD}${GOOD}2026-03-03 08:14:30,12x.4,20.6\n`;
    const { cell } = refusalOf(() => read(text)).facts;
    expect(read(text, { missing: [cell] }).readings.channels[0]!.value[1]).toBeNaN();
  });

  it.each([
    ['a text line between readings', `${HEAD}${GOOD}door opened\n${MORE}`, 'log-row-ragged', 3],
    ['too few cells', `${HEAD}${GOOD}2026-03-03 08:14:15,20.0\n${MORE}`, 'log-row-ragged', 3],
    ['too many cells', `${HEAD}${GOOD}2026-03-03 08:14:15,20.0,1,2\n${MORE}`, 'log-row-ragged', 3],
    ['a broken row and then a footer', `${HEAD}${GOOD}2026-03-03 08:14:15,20.0\nend\n`, 'log-row-ragged', 3],
    [
      'many rows of too few cells at the end',
      `${HEAD}${GOOD}2026-03-03 08:14:15,2\n2026-03-03 08:14:30,2\n`,
      'log-row-ragged',
      3,
    ],
    [
      'a broken row before a repeated header',
      `${HEAD}${GOOD}2026-03-03 08:14:15,2\n${HEAD}${MORE}`,
      'log-row-ragged',
      3,
    ],
    ['an impossible date', `${HEAD}${GOOD}2026-02-30 08:14:00,20.0,20.5\n`, 'log-time-unreadable', 3],
    ['a time written otherwise', `${HEAD}${GOOD}03.03.2026 08:14,20.0,20.5\n`, 'log-time-unreadable', 3],
    ['an empty time', `${HEAD}${GOOD},20.0,20.5\n${MORE}`, 'log-time-unreadable', 3],
    [
      'text behind a closing quote',
      `${HEAD}${GOOD}2026-03-03 08:14:15,"20.0"x,20.5\n${MORE}`,
      'log-cell-unreadable',
      3,
    ],
    ['a quote never closed', `${HEAD}${GOOD}"2026-03-03 08:14:15,20.0,20.5\n${MORE}${MORE}`, 'log-cell-unreadable', 3],
  ])('names the line: %s', (_, text, code, line) => {
    expect(refusalOf(() => read(text))).toMatchObject({ code, facts: { file: 'run.csv', line } });
  });

  it('is refused for wrong quotes in a column nobody asked for, which may have moved the others', () => {
    const text = 'Stamp,n,T1,T2\n2026-03-03 08:14:00,"a"b,20.0,20.5\n2026-03-03 08:14:30,a,20.1,20.6\n';
    expect(refusalOf(() => read(text))).toMatchObject({ code: 'log-cell-unreadable', facts: { line: 2, column: 'n' } });
  });

  it('counts the lines of quoted cells', () => {
    const text = `Stamp,T1,T2,n\n2026-03-03 08:14:00,20.0,20.5,"three\r\nlong\nlines"\n2026-03-03 08:14:30,hot,20.5,x\n`;
    expect(refusalOf(() => read(text)).facts.line).toBe(5);
  });

  it.each([
    [';°F;°C', 'T1', '°F', '°C'],
    [';°C;K', 'T2', 'K', '°C'],
    [';°C;bar', 'T2', 'bar', '°C'],
    [';mystery;°C', 'T1', 'mystery', '°C'],
  ])('is refused where the units row says %s', (units, column, unitInFile, unitInLayout) => {
    const text = `Stamp;T1;T2\n${units}\n2026-03-03 08:14:00;20.0;20.5\n`;
    const refusal = refusalOf(() => read(text, { units: 2, delimiter: ';' }));
    expect(refusal).toMatchObject({
      code: 'log-units-contradict',
      facts: { file: 'run.csv', line: 2, column, unitInFile, unitInLayout },
    });
    for (const named of ['line 2', column, unitInFile, unitInLayout]) expect(refusal.message).toContain(named);
  });

  it('is refused where the units change at a repeated header', () => {
    const text = `Stamp,T1,T2\n,C,C\n${GOOD}Stamp,T1,T2\n,F,F\n${MORE}`;
    expect(refusalOf(() => read(text, { units: 2 }))).toMatchObject({
      code: 'log-units-contradict',
      facts: { line: 5 },
    });
  });

  it('is refused where gauge and absolute contradict, and not where the file says neither', () => {
    const text = (unit: string) => `Stamp,P\n,${unit}\n2026-03-03 08:14:00,6.0\n`;
    const channels = (unit: string) => [{ column: 'P', name: 'p', role: 'pressure', unit }];
    const code = (inFile: string, inLayout: string) => {
      try {
        read(text(inFile), { units: 2, channels: channels(inLayout) });
        return 'read';
      } catch (error) {
        return (error as { code: string }).code;
      }
    };
    expect(code('bar(g)', 'bar')).toBe('read');
    expect(code('bar', 'bar')).toBe('read');
    expect(code('bar', 'bar abs')).toBe('read');
    expect(code('bara', 'bar abs')).toBe('read');
    expect(code('bara', 'bar')).toBe('log-units-contradict');
    expect(code('bar(g)', 'bar abs')).toBe('log-units-contradict');
    expect(code('mbar', 'bar')).toBe('log-units-contradict');
  });

  it('lists the headings where a column is missing', () => {
    const refusal = refusalOf(() => read('Stamp,T 1,T2\n'));
    expect(refusal).toMatchObject({ code: 'log-column-missing', facts: { line: 1, column: 'T1' } });
    expect(refusal.message).toContain('"Stamp", "T 1", "T2"');
    expect(refusalOf(() => read('Time,T1,T2\n')).facts.column).toBe('Stamp');
  });

  it('says how to name a column whose heading stands twice', () => {
    const refusal = refusalOf(() => read(`Stamp,T1,T1,T2\n`));
    expect(refusal.code).toBe('log-column-twice');
    expect(refusal.message).toContain('"#2" or "#3"');
  });

  it('is refused where one column is named twice, once by its number', () => {
    const channels = [
      { column: 'T1', name: 'TC1', role: 'part', unit: '°C' },
      { column: '#2', name: 'TC2', role: 'part', unit: '°C' },
    ];
    expect(refusalOf(() => read(HEAD + GOOD, { channels })).code).toBe('log-column-twice');
  });

  it.each([
    ['no file', []],
    ['an empty file', ['']],
    ['a byte-order mark alone', ['\ufeff']],
  ])('is empty: %s', (_, texts) => {
    const files = texts.map((text) => fileOf(text));
    expect(refusalOf(() => readLog(files, layoutOf())).code).toBe('log-empty');
  });

  it.each([
    ['it ends before the headings', '\n', { header: 4 }],
    ['nothing follows the headings', HEAD, {}],
    ['only blank lines follow', `${HEAD}\n\n`, {}],
    ['the first reading is beyond the end', `${HEAD}${GOOD}`, { firstReading: 9 }],
  ])('holds no reading: %s', (_, text, changes) => {
    expect(refusalOf(() => read(text, changes)).code).toBe('log-no-readings');
  });

  it('is refused with its first line where no line is a reading', () => {
    const refusal = refusalOf(() => read(`${HEAD}a,b,c\nd,e,f\n`));
    expect(refusal).toMatchObject({ code: 'log-time-unreadable', facts: { line: 2 } });
  });

  describe('is no text', () => {
    const bytes = (text: string) => new TextEncoder().encode(text);

    it('with a zero byte, early or late', () => {
      expect(refusalOf(() => read(bytes('PK\0\0'))).code).toBe('log-not-text');
      const late = `${HEAD}${GOOD.repeat(20_000)}\0\0\0`;
      expect(refusalOf(() => read(bytes(late)))).toMatchObject({ code: 'log-not-text', facts: { line: 20_002 } });
    });

    it('with control bytes', () => {
      const image = Uint8Array.from({ length: 4000 }, (_, i) => 1 + ((i * 7919) % 255));
      expect(refusalOf(() => read(image)).code).toBe('log-not-text');
    });
  });

  it('holds no more than a line of a megabyte', () => {
    let bytes = 0;
    function* endless() {
      yield new TextEncoder().encode(HEAD + GOOD);
      const rubbish = new Uint8Array(1 << 20).fill(0x78);
      for (;;) {
        bytes += rubbish.length;
        yield rubbish;
      }
    }
    const refusal = refusalOf(() => readLog([{ name: 'run.csv', chunks: endless() }], layoutOf()));
    expect(refusal).toMatchObject({ code: 'log-line-too-long', facts: { file: 'run.csv', line: 3 } });
    expect(bytes).toBeLessThan(8 << 20);
  });

  it('closes its source when it stops', () => {
    let isClosed = false;
    function* chunks() {
      try {
        for (;;) yield new TextEncoder().encode('x\n');
      } finally {
        isClosed = true;
      }
    }
    refusalOf(() => readLog([{ name: 'run.csv', chunks: chunks() }], layoutOf()));
    expect(isClosed).toBe(true);
  });
});
