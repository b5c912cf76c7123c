import { describe, expect, it } from 'vitest';
import { parseLayout } from '../../../models/log/parse-layout.ts';
import { proposeLayout } from '../../../models/log/propose-layout.ts';

describe('a proposal for columns of emf', () => {
  it('asks for the wire and the cold junction', () => {
    const text =
      'Stamp,TC 1 (mV),Air [µV],Cold junction [°C],Bag pressure (mV)\n' +
      '2026-03-03 08:14,0.1,100,21.5,2.5\n2026-03-03 08:15,0.2,200,21.5,2.5\n';
    const proposal = proposeLayout({ name: 'run.csv', head: new TextEncoder().encode(text), isWhole: true });
    const unknown = { type: '', coldJunction: '' };
    expect(proposal.layout.channels).toMatchObject([
      { name: 'TC 1', role: 'part', unit: 'mV', thermocouple: unknown },
      { name: 'Air', role: 'air', unit: 'mV', scale: 0.001, thermocouple: unknown },
      { name: 'Cold junction', role: 'other', unit: '°C' },
      { name: 'Bag pressure', role: 'other', unit: 'mV' },
    ]);
    expect(proposal.layout.channels[3]).not.toHaveProperty('thermocouple');
    const asked = proposal.statements.filter(({ key }) => key.includes('thermocouple'));
    expect(asked.map(({ key, basis, choices }) => [key, basis, choices])).toEqual([
      ['channels/0/thermocouple/type', 'asked', ['K', 'J', 'T', 'N', 'E']],
      ['channels/0/thermocouple/coldJunction', 'asked', ['Cold junction']],
      ['channels/1/thermocouple/type', 'asked', ['K', 'J', 'T', 'N', 'E']],
      ['channels/1/thermocouple/coldJunction', 'asked', ['Cold junction']],
    ]);
    const channels = proposal.layout.channels.map((channel) =>
      channel.thermocouple ? { ...channel, thermocouple: { type: 'K', coldJunction: 'Cold junction' } } : channel,
    );
    const time = { columns: ['Stamp'], pattern: 'yyyy-MM-dd HH:mm', zone: 'UTC' };
    expect(parseLayout({ ...proposal.layout, time, channels }).channels).toEqual(channels);
  });
});
