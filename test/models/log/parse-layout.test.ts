import { describe, expect, it } from 'vitest';
import { parseLayout } from '../../../models/log/parse-layout.ts';
import { refusalOf } from './logs.ts';

const channel = { column: 'T1', name: 'TC1', role: 'part', unit: '°C' };
const good = {
  format: 'dwellbook-layout/1',
  name: 'Oven 2 recorder',
  encoding: 'windows-1252',
  delimiter: ';',
  decimal: ',',
  header: 7,
  units: 8,
  firstReading: 9,
  time: { columns: ['Date', 'Time'], pattern: 'dd/MM/yyyy HH:mm:ss', zone: 'Europe/Lisbon' },
  channels: [channel, { column: 'P_AUT', name: 'vessel pressure', role: 'pressure', unit: 'bar' }],
  missing: ['OPEN', '----', '9999'],
};

describe('parseLayout', () => {
  it('returns the document as it was written', () => {
    expect(parseLayout(good)).toStrictEqual(good);
    const least = {
      format: 'dwellbook-layout/1',
      name: 'x',
      header: 1,
      time: { columns: ['t'], elapsed: 's', startsAt: '2026-03-02T08:14:00Z' },
      channels: [{ ...channel, scale: 0.1, offset: -1, range: [0, 400], uncertainty: 2.2, parts: ['SR-1'] }],
    };
    expect(parseLayout(least)).toStrictEqual(least);
  });

  const cold = { column: 'CJ', name: 'terminals', role: 'other', unit: '°C' };
  const emf = (thermocouple: unknown, more: object = {}) => ({
    channels: [{ ...channel, unit: 'mV', thermocouple, ...more }, cold],
  });

  it('returns a channel of emf with its thermocouple', () => {
    for (const coldJunction of ['terminals', 23.5, -40]) {
      const document = { ...good, ...emf({ type: 'K', coldJunction }, { range: [-1, 60], scale: 0.001 }) };
      expect(parseLayout(document)).toStrictEqual(document);
    }
    const unjudged = { ...good, channels: [{ ...channel, role: 'other', unit: 'mV' }] };
    expect(parseLayout(unjudged)).toStrictEqual(unjudged);
  });

  it.each([
    [emf({ type: 'S', coldJunction: 20 }), 'channels[0].thermocouple.type'],
    [emf({ type: 'k', coldJunction: 20 }), 'channels[0].thermocouple.type'],
    [emf({ coldJunction: 20 }), 'channels[0].thermocouple.type'],
    [emf({ type: 'K' }), 'channels[0].thermocouple.coldJunction'],
    [emf({ type: 'K', coldJunction: 296.65 }), 'channels[0].thermocouple.coldJunction'],
    [emf({ type: 'K', coldJunction: null }), 'channels[0].thermocouple.coldJunction'],
    [emf({ type: 'K', coldJunction: 'clamps' }), 'channels[0].thermocouple.coldJunction'],
    [emf({ type: 'K', coldJunction: 'TC1' }), 'channels[0].thermocouple.coldJunction'],
    [emf({ type: 'K', coldJunction: 20, gain: 2 }), 'channels[0].thermocouple.gain'],
    [emf({ type: 'K', coldJunction: 20 }, { unit: '°C' }), 'channels[0].unit'],
    [emf({ type: 'K', coldJunction: 20 }, { role: 'pressure' }), 'channels[0].role'],
    [emf({ type: 'K', coldJunction: 20 }, { role: 'other' }), 'channels[0].role'],
    [{ channels: [{ ...channel, unit: 'mV' }] }, 'channels[0].thermocouple'],
    [{ channels: [{ ...channel, unit: 'µV' }] }, 'channels[0].unit'],
  ])('refuses %j', (change, place) => {
    expect(refusalOf(() => parseLayout({ ...good, ...change })).message).toContain(place);
  });

  it.each([
    [{ delimeter: ';' }, 'document-unknown-key', 'delimeter'],
    [{ format: 'dwellbook-layout/2' }, 'document-wrong-format', 'format'],
    [{ encoding: 'latin-1' }, 'document-wrong-value', 'encoding'],
    [{ delimiter: ';;' }, 'document-wrong-value', 'delimiter'],
    [{ delimiter: '"' }, 'document-wrong-value', 'delimiter'],
    [{ delimiter: '.' }, 'document-wrong-value', 'delimiter'],
    [{ delimiter: '5' }, 'document-wrong-value', 'delimiter'],
    [{ decimal: ';' }, 'document-wrong-value', 'decimal'],
    [{ header: 0 }, 'document-wrong-value', 'header'],
    [{ header: 7.5 }, 'document-wrong-value', 'header'],
    [{ units: 7 }, 'document-wrong-value', 'units'],
    [{ firstReading: 8 }, 'document-wrong-value', 'firstReading'],
    [{ missing: [''] }, 'document-wrong-value', 'missing[0]'],
    [{ channels: [] }, 'document-wrong-value', 'channels'],
    [{ channels: [{ ...channel, role: 'oven' }] }, 'document-wrong-value', 'channels[0].role'],
    [{ channels: [channel, { ...channel, column: 'T2' }] }, 'document-name-twice', 'channels[1].name'],
    [{ channels: [channel, { ...channel, name: 'TC2' }] }, 'document-name-twice', 'channels[1].column'],
    [{ channels: [{ ...channel, column: 'Time' }] }, 'document-name-twice', 'channels[0].column'],
    [{ channels: [{ ...channel, unit: 'C' }] }, 'unit-unknown', 'channels[0].unit'],
    [{ channels: [{ ...channel, unit: 'toString' }] }, 'unit-unknown', 'channels[0].unit'],
    [{ channels: [{ ...channel, unit: 'bar' }] }, 'document-wrong-value', 'channels[0].unit'],
    [{ channels: [{ ...channel, role: 'vacuum' }] }, 'document-wrong-value', 'channels[0].unit'],
    [{ channels: [{ ...channel, scale: 0 }] }, 'document-wrong-value', 'channels[0].scale'],
    [{ channels: [{ ...channel, range: [400, 0] }] }, 'document-wrong-value', 'channels[0].range'],
    [{ channels: [{ ...channel, uncertainty: -1 }] }, 'document-wrong-value', 'channels[0].uncertainty'],
    [{ time: { ...good.time, zone: 'Europe/Lisboa' } }, 'zone-unknown', 'time.zone'],
    [{ time: { ...good.time, zone: '+15:00' } }, 'zone-unknown', 'time.zone'],
    [{ time: { ...good.time, elapsed: 's' } }, 'document-wrong-value', 'time.columns'],
    [{ time: { columns: ['t'], elapsed: 's', zone: 'UTC' } }, 'document-missing-key', 'time.startsAt'],
    [
      { time: { columns: ['t'], elapsed: 'd', startsAt: '2026-03-02T08:14:00Z' } },
      'document-wrong-value',
      'time.elapsed',
    ],
    [
      { time: { columns: ['t'], elapsed: 's', startsAt: '2026-03-02T08:14:00' } },
      'document-wrong-value',
      'time.startsAt',
    ],
    [{ time: { columns: ['t'], serialDays: false, zone: 'UTC' } }, 'document-wrong-value', 'time.serialDays'],
    [{ time: { columns: ['t'], pattern: 'yyyy-MM-dd HH:mm:ss' } }, 'document-missing-key', 'time.zone'],
  ])('refuses %j by name', (change, code, key) => {
    const refusal = refusalOf(() => parseLayout({ ...good, ...change }));
    expect([refusal.code, refusal.facts.key]).toEqual([code, key]);
  });

  it.each(['format', 'name', 'header', 'time', 'channels'])('requires %s', (key) => {
    const { [key as 'name']: _, ...rest } = good;
    const refusal = refusalOf(() => parseLayout(rest));
    expect([refusal.code, refusal.facts.key]).toEqual(['document-missing-key', key]);
  });

  // Unicode TR 35 part 4, Date Format Patterns: m is the minute, M the month; hh needs a.
  it.each([
    ['dd/mm/yyyy HH:mm', 'the minute stands twice'],
    ['dd/MM/yyyy', 'the minute is missing'],
    ['dd/MM/yyyy hh:mm', 'h or K goes with a'],
    ['dd/MM/yyyy HH:mm a', 'h or K goes with a'],
    ['dd/MM HH:mm', 'the year is missing'],
    ['DD/MM/YYYY HH:mm', '"DD" is not read here'],
    ['dd/MM/yyyy HH:mm.SSS', 'S goes with s'],
    ["dd/MM/yyyy 'at HH:mm", 'a quote is not closed'],
    ['dMyyyy HH:mm', '"d" right before another field'],
    ['yyyyy-MM-dd HH:mm', '"yyyyy" is not read here'],
  ])('refuses the pattern %s: %s', (pattern, why) => {
    const refusal = refusalOf(() => parseLayout({ ...good, time: { ...good.time, pattern } }));
    expect(refusal.facts.key).toBe('time.pattern');
    expect(refusal.message).toContain(why);
  });
});
