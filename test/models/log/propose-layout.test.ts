import { readdirSync, readFileSync } from 'node:fs';
import { join } from 'node:path';
import { describe, expect, it } from 'vitest';
import type { Layout } from '../../../models/log/layout.ts';
import { parseLayout } from '../../../models/log/parse-layout.ts';
import { readHead } from '../../../models/log/proposal/read-head.ts';
import { type LayoutProposal, proposeLayout } from '../../../models/log/propose-layout.ts';
import { readLog } from '../../../models/log/read-log.ts';
import { scaledReading } from '../../../models/log/readings.ts';
import { fileOf, refusalOf, rowsOf } from './logs.ts';

const propose = (text: string | Uint8Array) =>
  proposeLayout({
    name: 'run.csv',
    head: typeof text === 'string' ? new TextEncoder().encode(text) : text,
    isWhole: true,
  });

const basisOf = ({ statements }: LayoutProposal, key: string) => statements.find((one) => one.key === key)?.basis;
const whyOf = ({ statements }: LayoutProposal, key: string) => statements.find((one) => one.key === key)?.because;
const askedIn = ({ statements }: LayoutProposal) =>
  statements.filter(({ basis }) => basis === 'asked').map(({ key }) => key);

/** The layout with the zone, and the pattern where it was asked, answered. */
function answered({ layout }: LayoutProposal, zone: string, pattern?: string): Layout {
  return parseLayout({ ...layout, time: { ...layout.time, zone, ...(pattern ? { pattern } : {}) } });
}

describe('a proposal for a recorded run', () => {
  // Recorded runs with outcomes known by construction, each with the layout its author wrote.
  const folder = join(import.meta.dirname, '../../golden/recorded');
  it.each(readdirSync(folder).filter((name) => name !== 'bad-cell'))('reads %s as its own layout does', (name) => {
    const bytes = readFileSync(join(folder, name, 'run.csv'));
    const own = parseLayout(JSON.parse(readFileSync(join(folder, name, 'layout.json'), 'utf8')));
    const proposal = propose(bytes);
    if (!('pattern' in own.time)) throw new Error('these runs have patterns');
    const layout = answered(proposal, own.time.zone, own.time.pattern);
    expect(askedIn(proposal).filter((key) => key !== 'time.pattern')).toEqual(['time.zone']);
    const mine = readLog([fileOf(bytes)], layout);
    const theirs = readLog([fileOf(bytes)], own);
    expect(mine.readings.timeMs).toEqual(theirs.readings.timeMs);
    for (const { channel, value } of theirs.readings.channels) {
      const same = mine.readings.channels.find((one) => one.channel.column === channel.column);
      expect(same?.value).toEqual(value);
      expect([same?.channel.unit, same?.channel.role]).toEqual([channel.unit, channel.role]);
    }
  });
});

describe('readHead', () => {
  it('gives the lines as they are in the file', () => {
    const head = Buffer.from('\ufeffa;b\r\n\r\nlast', 'utf16le');
    expect(readHead({ name: 'x', head, isWhole: true }).lines).toEqual(['a;b', '', 'last']);
    expect(readHead({ name: 'x', head }).lines).toEqual(['a;b', '']);
  });
});

describe('the order of a date', () => {
  const log = (...stamps: string[]) => `Stamp,T1\n${stamps.map((stamp, i) => `${stamp},${20 + i}.5\n`).join('')}`;

  it('is asked where every date can be read both ways', () => {
    const proposal = propose(log('03/04/2026 08:14:00', '03/04/2026 08:14:30'));
    expect(basisOf(proposal, 'time.pattern')).toBe('asked');
    expect(proposal.statements.find(({ key }) => key === 'time.pattern')?.choices).toEqual([
      'dd/MM/yyyy HH:mm:ss',
      'MM/dd/yyyy HH:mm:ss',
    ]);
    expect(refusalOf(() => parseLayout(proposal.layout)).facts.key).toBe('time.pattern');
  });

  it.each([
    [['12/04/2026 23:59', '13/04/2026 00:00'], 'dd/MM/yyyy HH:mm', 'line 3'],
    [['04/12/2026 23:59', '04/13/2026 00:00'], 'MM/dd/yyyy HH:mm', 'line 3'],
    [['03/04/2026 23:59', '04/04/2026 00:00'], 'dd/MM/yyyy HH:mm', 'one night'],
    [['04/03/2026 23:59', '04/04/2026 00:00'], 'MM/dd/yyyy HH:mm', 'one night'],
    [['2026-03-04 08:14', '2026-03-04 08:15'], 'yyyy-MM-dd HH:mm', 'four figures'],
    [['31.12.25 23:59', '01.01.26 00:00'], 'dd.MM.yy HH:mm', 'line 2'],
    [['3-Apr-2026 8:14', '13-Apr-2026 18:14'], 'd-MMM-yyyy H:mm', 'as a word'],
  ])('is proved by %s', (stamps, pattern, evidence) => {
    const proposal = propose(log(...stamps));
    expect(proposal.layout.time).toMatchObject({ pattern });
    expect(basisOf(proposal, 'time.pattern')).toBe('proved');
    expect(whyOf(proposal, 'time.pattern')).toContain(evidence);
  });

  it('is asked of two-digit years, which may come first', () => {
    const proposal = propose(log('05/04/03 08:14', '05/04/03 08:15'));
    expect(proposal.statements.find(({ key }) => key === 'time.pattern')?.choices).toEqual([
      'dd/MM/yy HH:mm',
      'MM/dd/yy HH:mm',
      'yy/MM/dd HH:mm',
    ]);
  });

  it('is asked where no order reads all of them', () => {
    const proposal = propose(log('13/04/2026 08:14', '04/13/2026 08:15'));
    expect(basisOf(proposal, 'time.pattern')).toBe('asked');
    expect(whyOf(proposal, 'time.pattern')).toContain('No order');
  });
});

describe('the way the time is written', () => {
  it.each([
    ['2026-03-03T08:14:30.250Z', "yyyy-MM-dd'T'HH:mm:ss.SSSXXX", 'Z'],
    ['2026-03-03 08:14:30+01:00', 'yyyy-MM-dd HH:mm:ssXXX', '+01:00'],
    ['3/13/2026 8:14:30 AM', 'M/dd/yyyy h:mm:ss a', ''],
    ['20260303081430', 'yyyyMMddHHmmss', ''],
    ['13 March 2026 08:14', 'dd MMM yyyy HH:mm', ''],
    ['Mar 13, 2026 08:14', 'MMM d, yyyy HH:mm', ''],
  ])('is found: %s', (stamp, pattern, zone) => {
    const proposal = propose(`Stamp;T1\n"${stamp}";20,5\n"${stamp}";20,6\n`);
    expect(proposal.layout.time).toEqual({ columns: ['Stamp'], pattern, zone });
    expect(basisOf(proposal, 'time.zone')).toBe(zone === '' ? 'asked' : 'proved');
    const layout = answered(proposal, zone || 'UTC');
    expect(readLog([fileOf(`Stamp;T1\n"${stamp}";20,5\n`)], layout).readings.timeMs[0]).toBeGreaterThan(
      Date.UTC(2026, 2, 3),
    );
  });

  it('is elapsed time where figures rise, its start asked, its unit where the file does not say', () => {
    const named = propose('Time (min),T1\n0,20.5\n0.5,20.6\n1.0,20.4\n');
    expect(named.layout.time).toEqual({ columns: ['Time (min)'], elapsed: 'min', startsAt: '' });
    expect(askedIn(named)).toEqual(['time.startsAt']);
    const bare = propose('Elapsed,T1\n0,20.5\n30,20.6\n60,20.4\n');
    expect(askedIn(bare)).toEqual(['time.elapsed', 'time.startsAt']);
  });

  it('is serial days where they read as a date of this century', () => {
    const proposal = propose('t,T1\n46084.3430,20.5\n46084.3434,20.6\n');
    expect(proposal.layout.time).toEqual({ columns: ['t'], serialDays: true, zone: '' });
    expect(whyOf(proposal, 'time')).toContain('2026-03-03');
  });

  it.each([
    ['times of day without a date', 'Time,T1\n08:14:00,20.5\n08:14:30,20.6\n', 'holds times of day'],
    ['no time at all', 'T1,T2\n20.5,20.5\n20.4,20.6\n', 'no column reads as a time'],
    ['no headings', '2026-03-03 08:14:00,20.5\n2026-03-03 08:14:30,20.6\n', 'nothing stands above'],
    ['prose', 'Dear sir,\nplease find no log here.\n', 'no rows of figures'],
  ])('is refused: %s', (_, text, why) => {
    const refusal = refusalOf(() => propose(text));
    expect(refusal.code).toBe('layout-not-provable');
    expect(refusal.message).toContain(why);
  });
});

describe('the shape of the table', () => {
  const rows = [
    ['Date', 'Time', 'TC1', 'Air', 'Vac 1', 'Vac pump', 'Press', 'Set point', 'Segment', 'Alarm'],
    ['', '', 'degC', '[°C]', 'mbar(a)', 'mbar(a)', 'bar(g)', '°C', '', ''],
    ['13/03/2026', '08:14:00', '20.5', '21.0', '1005', '80', '0.0', '180', '1', ''],
    ['13/03/2026', '08:14:30', '----', '21.5', '1004', '80', '0.0', '180', '1', 'door open: check'],
    ['13/03/2026', '08:15:00', '20.6', '22.0', '1003', '80', '0.1', '180', '2', ''],
  ];

  it.each([
    [';', ','],
    ['\t', ','],
    ['\t', '.'],
    ['|', '.'],
    [',', '.'],
  ])('is found with delimiter %j and decimal %j', (delimiter, decimal) => {
    const table = rows.map((row) => row.map((cell) => (/^\d+\.\d$/.test(cell) ? cell.replace('.', decimal) : cell)));
    const text = `Oven 2; building B\nLot: 7, shift 2\n\n${table.map((row) => row.join(delimiter)).join('\r\n')}\r\nEnd of record\r\n`;
    const proposal = propose(text);
    expect(proposal.layout).toMatchObject({
      delimiter,
      decimal,
      header: 4,
      units: 5,
      firstReading: 6,
      missing: ['----'],
    });
    expect(proposal.layout.channels.map(({ name, role, unit }) => [name, role, unit])).toEqual([
      ['TC1', 'part', '°C'],
      ['Air', 'air', '°C'],
      ['Vac 1', 'vacuum', 'mbar abs'],
      ['Vac pump', 'vacuum-source', 'mbar abs'],
      ['Press', 'pressure', 'bar'],
      ['Set point', 'setpoint', '°C'],
      ['Segment', 'other', '-'],
    ]);
    expect(basisOf(proposal, 'delimiter')).toBe('proved');
    expect(basisOf(proposal, 'decimal')).toBe('proved');
    expect(basisOf(proposal, 'channels/0/unit')).toBe('proved');
    expect(basisOf(proposal, 'channels/0/role')).toBe('guessed');
    expect(basisOf(proposal, 'missing')).toBe('guessed');
    expect(askedIn(proposal)).toEqual(['time.zone']);
    const log = readLog([fileOf(text)], answered(proposal, 'UTC'));
    expect(rowsOf(log)[1]!.slice(0, 3)).toEqual(['2026-03-13T08:14:30Z', null, 21.5]);
  });

  it('takes a word among figures for a missing code, and a spoilt figure for nothing it could settle', () => {
    const rows = Array.from(
      { length: 30 },
      (_, i) => `2026-03-13 08:${String(i).padStart(2, '0')}:00,20.5,2${i % 10}.5`,
    );
    rows[7] = rows[7]!.replace(/,[^,]*$/, ',OPEN');
    rows[9] = rows[9]!.replace(/,[^,]*$/, ',12x.4');
    const proposal = propose(`Time,TC1,TC2\n${rows.join('\n')}\n`);
    expect(proposal.layout.missing).toEqual(['OPEN']);
  });

  it('is never a decimal mark by figures that may be grouped thousands', () => {
    expect(basisOf(propose('Stamp;a\n2026-03-03 08:14;1.234\n2026-03-03 08:15;1.235\n'), 'decimal')).toBe('asked');
    expect(basisOf(propose('Stamp;a\n2026-03-03 08:14;0.234\n2026-03-03 08:15;1.235\n'), 'decimal')).toBe('proved');
    expect(basisOf(propose('Stamp;a;b\n2026-03-03 08:14;1,5;2.5\n2026-03-03 08:15;1,5;2.5\n'), 'decimal')).toBe(
      'asked',
    );
    expect(basisOf(propose('Stamp;a\n2026-03-03 08:14;1\n2026-03-03 08:15;2\n'), 'decimal')).toBe('guessed');
  });

  it('has its units in the headings, or guessed by the workshop’s temperature, or asked', () => {
    const at = (heading: string, first: string) => {
      const proposal = propose(`Stamp,${heading}\n2026-03-03 08:14,${first}\n2026-03-03 08:15,${first}\n`);
      return [
        proposal.layout.channels[0]!.unit,
        basisOf(proposal, 'channels/0/unit'),
        proposal.layout.channels[0]!.role,
      ];
    };
    expect(at('T1 (°F)', '20.5')).toEqual(['°F', 'proved', 'part']);
    expect(at('T1', '20.5')).toEqual(['°C', 'guessed', 'part']);
    expect(at('T1', '68.0')).toEqual(['°F', 'guessed', 'part']);
    expect(at('T1', '42.5')).toEqual(['', 'asked', 'part']);
    expect(at('Pressure', '0.5')).toEqual(['', 'asked', 'pressure']);
    expect(at('P [psia]', '14.7')).toEqual(['psi abs', 'proved', 'pressure']);
    expect(at('T1 (K)', '293.5')).toEqual(['°C', 'proved', 'part']);
  });

  it('turns kelvin into °C', () => {
    const text = 'Stamp,T1\n,K\n2026-03-03 08:14,293.15\n2026-03-03 08:15,293.25\n';
    const proposal = propose(text);
    expect(proposal.layout.channels[0]).toMatchObject({ unit: '°C', offset: -273.15 });
    const { value, channel } = readLog([fileOf(text)], answered(proposal, 'UTC')).readings.channels[0]!;
    expect([...value].map((figure) => scaledReading(figure, channel))).toEqual([20, 20.1]);
  });

  it('names columns by number where headings do not tell them apart', () => {
    const proposal = propose('Stamp,T,T,\n2026-03-03 08:14,20.5,20.6,1\n2026-03-03 08:15,20.5,20.6,1\n');
    expect(proposal.layout.channels.map(({ column }) => column)).toEqual(['#2', '#3', '#4']);
  });

  it.each([
    ['utf-8', 'proved', new TextEncoder().encode('Stamp;T °C\n2026-03-03 08:14;20,5\n2026-03-03 08:15;20,5\n')],
    ['windows-1252', 'guessed', Buffer.from('Stamp;T °C\n2026-03-03 08:14;20,5\n2026-03-03 08:15;20,5\n', 'latin1')],
    ['utf-16le', 'proved', Buffer.from('\ufeffStamp;T °C\n2026-03-03 08:14;20,5\n2026-03-03 08:15;20,5\n', 'utf16le')],
    [
      'utf-16be',
      'proved',
      Buffer.from('Stamp;T °C\n2026-03-03 08:14;20,5\n2026-03-03 08:15;20,5\n', 'utf16le').swap16(),
    ],
    ['utf-8', 'guessed', Buffer.from('Stamp;T\n2026-03-03 08:14;20,5\n2026-03-03 08:15;20,5\n')],
  ])('is written in %s, %s', (encoding, basis, bytes) => {
    const proposal = propose(bytes);
    expect([proposal.layout.encoding, basisOf(proposal, 'encoding')]).toEqual([encoding, basis]);
    expect(readLog([fileOf(bytes)], answered(proposal, 'UTC')).readings.timeMs.length).toBe(2);
  });

  it('does not mind a beginning that is cut in a line', () => {
    const text = `Stamp,T1\n${Array.from({ length: 50 }, (_, i) => `2026-03-13 08:${10 + i},20.5\n`).join('')}`;
    const bytes = new TextEncoder().encode(text);
    for (let length = 60; length < 200; length++) {
      const { layout } = proposeLayout({ name: 'run.csv', head: bytes.subarray(0, length) });
      expect(layout.channels.length).toBe(1);
    }
  });

  it.each([
    ['', 'log-empty'],
    ['\n\n', 'log-empty'],
    ['PK\u0003\u0004\u0000', 'log-not-text'],
  ])('is refused for %j: %s', (text, code) => {
    expect(refusalOf(() => propose(text)).code).toBe(code);
  });
});
