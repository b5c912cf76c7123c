import { describe, expect, it } from 'vitest';
import { readLog } from '../../../models/log/read-log.ts';
import { fileOf, layoutOf, read, rowsOf } from './logs.ts';

const TWO = 'Stamp,T1,T2\n2026-03-03 08:14:00,20.0,20.5\n2026-03-03 08:14:30,20.1,20.6\n';
const ROWS = [
  ['2026-03-03T08:14:00Z', 20, 20.5],
  ['2026-03-03T08:14:30Z', 20.1, 20.6],
];

describe('readLog', () => {
  it('reads a plain file', () => {
    const log = read(TWO);
    expect(rowsOf(log)).toEqual(ROWS);
    expect([log.repairs, log.passedOver]).toEqual([[], []]);
  });

  it.each([
    ['CR LF', TWO.replaceAll('\n', '\r\n')],
    ['CR', TWO.replaceAll('\n', '\r')],
    ['mixed', 'Stamp,T1,T2\r2026-03-03 08:14:00,20.0,20.5\r\n2026-03-03 08:14:30,20.1,20.6\n'],
    ['trailing delimiters', TWO.replaceAll('\n', ',,\n')],
    ['quotes', TWO.replace(/[^,\n]+/g, '"$&"')],
    ['padding', TWO.replaceAll(',', ' , ')],
    ['a plus sign', TWO.replaceAll(',2', ',+2')],
    [
      'exponents',
      TWO.replaceAll('20.', '2.0e1')
        .replace(/2\.0e1(\d)/g, '2.0$1e1')
        .replace('2.00e1', '2e+1'),
    ],
    ['columns in another order', 'T2,Stamp,T1\n20.5,2026-03-03 08:14:00,20.0\n20.6,2026-03-03 08:14:30,20.1\n'],
    [
      'columns nobody asked for',
      'x,Stamp,"a,b",T1,T2,n\n,2026-03-03 08:14:00,"1,""2",20.0,20.5,\n1,2026-03-03 08:14:30,"line\nbreak",20.1,20.6,x\n',
    ],
  ])('reads the same with %s', (_, text) => {
    expect(rowsOf(read(text))).toEqual(ROWS);
  });

  it.each([
    [';', ','],
    ['\t', ','],
    ['|', '.'],
    [',', ','],
    [' ', '.'],
  ])('reads delimiter "%s" with decimal "%s"', (delimiter, decimal) => {
    const cell = (text: string) => (delimiter === decimal ? `"${text}"` : text).replace('.', decimal);
    const lines = [
      ['Day', 'Time', 'T1', 'T2'],
      ['2026-03-03', '08:14:00', cell('20.0'), cell('20.5')],
      ['2026-03-03', '08:14:30', cell('20.1'), cell('20.6')],
    ];
    const text = lines.map((line) => line.join(delimiter === ' ' ? '   ' : delimiter)).join('\n');
    const time = { columns: ['Day', 'Time'], pattern: 'yyyy-MM-dd HH:mm:ss', zone: 'UTC' };
    expect(rowsOf(read(`${text}\n`, { delimiter, decimal, time }))).toEqual(ROWS);
  });

  it('joins time columns in the order of the layout, wherever they stand', () => {
    const text = 'Time,T1,Day,T2\n08:14:00,20.0,2026-03-03,20.5\n08:14:30,20.1,2026-03-03,20.6\n';
    const time = { columns: ['Day', 'Time'], pattern: 'yyyy-MM-dd HH:mm:ss', zone: 'UTC' };
    expect(rowsOf(read(text, { time }))).toEqual(ROWS);
  });

  it('reads elapsed time from its start', () => {
    for (const [elapsed, second] of [
      ['s', '30'],
      ['min', '0,5'],
      ['h', '0,00833333333333333'],
    ] as const) {
      const time = { columns: ['t'], elapsed, startsAt: '2026-03-03T09:14:00+01:00' };
      const text = `t;T1;T2\n0;20,0;20,5\n${second};20,1;20,6\n`;
      expect(rowsOf(read(text, { time, delimiter: ';', decimal: ',' }))).toEqual(ROWS);
    }
  });

  it('reads serial days, in one column or a day and a part of a day', () => {
    // 46084 is 2026-03-03: days since 1899-12-30, ISO/IEC 29500-1:2016, 18.17.4.1.
    const time = { columns: ['t'], serialDays: true, zone: 'Europe/Lisbon' };
    const text = 't,T1,T2\n46084.343055555553,20.0,20.5\n46084.343402777777,20.1,20.6\n';
    expect(rowsOf(read(text, { time }))).toEqual(ROWS);
    const split = 'd,t,T1,T2\n46084,0.343055555553,20.0,20.5\n46084,0.343402777777,20.1,20.6\n';
    expect(rowsOf(read(split, { time: { ...time, columns: ['d', 't'] } }))).toEqual(ROWS);
  });

  it('keeps every figure to the last digit', () => {
    const figures = [
      '0.1',
      '-0.1',
      '1371.999999999',
      '123.45678901234567890',
      '0.30000000000000004',
      '5e-324',
      '.5',
      '7.',
      '-0',
    ];
    const channels = [{ column: 'T1', name: 'TC1', role: 'part', unit: '°C' }];
    const text = `Stamp,T1\n${figures.map((f, i) => `2026-03-03 08:14:0${i},${f}\n`).join('')}`;
    expect([...read(text, { channels }).readings.channels[0]!.value]).toEqual(
      figures.map((figure) => Number(figure) + 0), // no negative zero
    );
  });

  describe('absent readings', () => {
    const values = (text: string, changes: object = {}) =>
      rowsOf(read(`Stamp,T1,T2\n2026-03-03 08:14:00,${text}\n`, changes))[0]!.slice(1);

    it('are missing codes, empty cells and values outside the range', () => {
      expect(values('OPEN,')).toEqual([null, null]);
      expect(values(' OPEN ,"OPEN"')).toEqual([null, null]);
      expect(values('-200.1,1372.1')).toEqual([null, null]);
      expect(values('-200,1372')).toEqual([-200, 1372]);
    });

    it('are judged in the channel’s unit, after scale and offset', () => {
      const channel = { column: 'T1', name: 'TC1', role: 'part', unit: '°F' };
      const other = { column: 'T2', name: 'TC2', role: 'part', unit: '°C', scale: 0.1, offset: -273 };
      // −200 °C and 1372 °C are −328 °F and 2501.6 °F.
      expect(values('2501.6,729', { channels: [channel, other] })).toEqual([2501.6, null]);
      expect(values('-328,730', { channels: [channel, other] })).toEqual([-328, 730]);
      expect(values('2501.7,16450', { channels: [channel, other] })).toEqual([null, 16450]);
      expect(values('-328.1,16451', { channels: [channel, other] })).toEqual([null, null]);
    });

    it('follow the channel’s own range, and pressures have none', () => {
      const channels = [
        { column: 'T1', name: 'TC1', role: 'part', unit: '°C', range: [0, 400] },
        { column: 'T2', name: 'p', role: 'pressure', unit: 'mbar' },
      ];
      expect(values('-0.1,9999', { channels })).toEqual([null, 9999]);
      expect(values('400,-9999', { channels })).toEqual([400, -9999]);
    });

    it('are codes as written: 0 is not 0.00', () => {
      const channels = [
        { column: 'T1', name: 'p', role: 'pressure', unit: 'bar' },
        { column: 'T2', name: 'q', role: 'pressure', unit: 'bar' },
      ];
      expect(values('0,0.00', { channels, missing: ['0'] })).toEqual([null, 0]);
      expect(values('"0","0.00"', { channels, missing: ['0'] })).toEqual([null, 0]);
      expect(values('9999, 9999', { channels, missing: ['9999'] })).toEqual([null, null]);
      expect(values('9999.0,---', { channels, missing: ['9999', '---'] })).toEqual([9999, null]);
    });
  });

  it('reads several files of one run, each with its own column order', () => {
    const second = 'T2,Stamp,T1\n20.7,2026-03-03 08:15:00,20.2\n';
    const log = readLog([fileOf(TWO, 'a.csv'), fileOf(second, 'b.csv')], layoutOf());
    expect(rowsOf(log)).toEqual([...ROWS, ['2026-03-03T08:15:00Z', 20.2, 20.7]]);
    expect(log.repairs).toEqual([]);
  });

  it('finds a column by its number where the heading does not tell', () => {
    const text = 'Stamp,T,T,\n2026-03-03 08:14:00,20.0,20.5\n2026-03-03 08:14:30,20.1,20.6\n';
    const channels = [
      { column: '#2', name: 'TC1', role: 'part', unit: '°C' },
      { column: '#3', name: 'TC2', role: 'part', unit: '°C' },
    ];
    expect(rowsOf(read(text, { channels }))).toEqual(ROWS);
  });
});

describe('lines passed over', () => {
  const preamble = 'Oven 2\nLot;SR-0417\n\nStamp;T1;T2\n;deg C;ºC\n';
  const changes = { delimiter: ';', decimal: ',', header: 4, units: 5 };
  const first = '2026-03-03 08:14:00;20,0;20,5\n';
  const second = '2026-03-03 08:14:30;20,1;20,6\n';
  const passed = (text: string) => {
    const log = read(text, changes);
    return [rowsOf(log).length, ...log.passedOver.map(({ kind, lines }) => `${kind} ${lines[0]}-${lines[1]}`)];
  };

  it.each([
    ['blank lines', `${preamble}${first}\n\n;;\n${second} \n`, [2, 'blank 7-9', 'blank 11-11']],
    [
      'a footer',
      `${preamble}${first}${second}\nEnd of record\nMax;20,1;20,6\n`,
      [2, 'blank 8-8', 'after-last-reading 9-10'],
    ],
    ['a footer without line end', `${preamble}${first}${second}Signed: op. 2`, [2, 'after-last-reading 8-8']],
    [
      'a signature with a time',
      `${preamble}${first}${second}Printed\n2026-03-03 15:00 operator 2\n`,
      [2, 'after-last-reading 8-9'],
    ],
    [
      'a footer with a time',
      `${preamble}${first}${second}2026-03-03 08:15:00;Run ended\n`,
      [2, 'after-last-reading 8-8'],
    ],
    ['a repeated header', `${preamble}${first}Stamp;T1;T2\n${second}`, [2, 'repeated-header 7-7']],
    [
      'a repeated header with units',
      `${preamble}${first}Stamp;T1;T2\n;deg C;ºC\n${second}`,
      [2, 'repeated-header 7-8'],
    ],
    ['a whole repeated top', `${preamble}${first}${preamble}${second}`, [2, 'blank 9-9', 'repeated-header 7-11']],
    [
      'a repeated header, units spelt otherwise',
      `${preamble}${first}Stamp;T1;T2\n;°C;C\n${second}`,
      [2, 'repeated-header 7-8'],
    ],
    ['a last line cut in its time', `${preamble}${first}${second}2026-03-03 08:`, [2, 'truncated-last-line 8-8']],
    [
      'a last line cut in a figure',
      `${preamble}${first}${second}2026-03-03 08:15:00;20,1;2`,
      [2, 'truncated-last-line 8-8'],
    ],
    [
      'a last line cut at a delimiter',
      `${preamble}${first}${second}2026-03-03 08:15:00;20,1;`,
      [2, 'truncated-last-line 8-8'],
    ],
    [
      'a last line cut, then ended',
      `${preamble}${first}${second}2026-03-03 08:15:00;20,1\n`,
      [2, 'truncated-last-line 8-8'],
    ],
    ['a last line cut in a quote', `${preamble}${first}${second}"2026-03-03 08:15:00`, [2, 'truncated-last-line 8-8']],
  ])('are listed: %s', (_, text, expected) => {
    expect(passed(text)).toEqual(expected);
  });

  it('do not grow into a list as long as the log', () => {
    const block = (i: number) => {
      const minute = new Date(i * 60_000).toISOString().slice(11, 16);
      return `2026-03-03 ${minute}:00;20,0;20,5\n\n2026-03-03 ${minute}:30;20,1;20,6\nStamp;T1;T2\n`;
    };
    const log = read(preamble + Array.from({ length: 300 }, (_, i) => block(i)).join(''), changes);
    expect(rowsOf(log).length).toBe(600);
    expect(log.passedOver.length).toBe(100);
    expect(log.passedOver.at(-1)?.lines[1]).toBe(1205);
  });

  it('are not a last line without line end whose figures have all their decimals', () => {
    const many = Array.from({ length: 40 }, (_, i) => `2026-03-03 08:13:${10 + i};20,1;20,6\n`).join('');
    expect(passed((preamble + many + first + second).slice(0, -1))).toEqual([42]);
    expect(passed((preamble + many + first + second).slice(0, -2))).toEqual([41, 'truncated-last-line 47-47']);
    expect(passed((preamble + first + second).slice(0, -1))).toEqual([1, 'truncated-last-line 7-7']);
    expect(passed(`${preamble}${first}2026-03-03 08:15:00;20,1;OPEN`)).toEqual([2]);
    expect(passed(`${preamble}${first}2026-03-03 08:15:00;20,1;"2"`)).toEqual([2]);
    expect(passed(`${preamble}${first}2026-03-03 08:15:00;20,1;2;`)).toEqual([2]);
  });

  it('are the last line without line end where decimals prove nothing', () => {
    const whole = 'Stamp,T1,T2\n2026-03-03 08:14:00,20.0,180\n2026-03-03 08:14:30,20.1,18';
    expect(read(whole).passedOver).toEqual([{ kind: 'truncated-last-line', file: 0, lines: [3, 3] }]);
    const varied =
      'Stamp,T1,T2\n2026-03-03 08:14:00,20,180.25\n2026-03-03 08:14:30,20,180.5\n2026-03-03 08:15:00,20,180.2';
    expect(read(varied).passedOver).toEqual([{ kind: 'truncated-last-line', file: 0, lines: [4, 4] }]);
  });
});
