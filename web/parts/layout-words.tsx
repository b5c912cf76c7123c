import type { Layout, Thermocouple } from '../../models/log/layout.ts';
import { asTemperature } from '../../models/log/temperatures-of-emf.ts';
import { asWritten } from '../words/figures.ts';
import { delimiterName, ROLE_WORDS, timeWords } from '../words/layouts.ts';
import { Wide } from './wide.tsx';

/** A layout in words, and its channels side by side. */
export function LayoutWords({ layout }: { layout: Layout }) {
  return (
    <div class="stack section">
      <dl class="facts">
        <dt>Written in</dt>
        <dd>{layout.encoding ?? 'utf-8'}</dd>
        <dt>Cells apart by</dt>
        <dd>{delimiterName(layout.delimiter ?? ',')}</dd>
        <dt>Decimals with</dt>
        <dd>{layout.decimal === ',' ? 'comma' : 'point'}</dd>
        <dt>Headings</dt>
        <dd>line {layout.header}</dd>
        <dt>Units</dt>
        <dd>{layout.units === undefined ? 'not written in the file' : `line ${layout.units}`}</dd>
        <dt>First reading</dt>
        <dd>{layout.firstReading === undefined ? 'the line after them' : `line ${layout.firstReading}`}</dd>
        <dt>Time</dt>
        <dd>{timeWords(layout.time)}</dd>
        <dt>No reading</dt>
        <dd>{['empty cell', ...(layout.missing ?? [])].join(', ')}</dd>
      </dl>
      <Wide label="Channels of the layout">
        <table>
          <caption class="unseen">Channels of the layout</caption>
          <thead>
            <tr>
              <th scope="col">Column</th>
              <th scope="col">Channel</th>
              <th scope="col">Role</th>
              <th scope="col">Unit</th>
              <th scope="col">Changed by</th>
            </tr>
          </thead>
          <tbody>
            {layout.channels.map((channel) => (
              <tr key={channel.column}>
                <td>{channel.column}</td>
                <th scope="row">{channel.name}</th>
                <td>{ROLE_WORDS[channel.role]}</td>
                <td>{channel.unit}</td>
                <td>{changes(channel)}</td>
              </tr>
            ))}
          </tbody>
        </table>
      </Wide>
    </div>
  );
}

function changes(channel: Layout['channels'][number]): string {
  const said = [
    channel.scale === undefined ? '' : `× ${asWritten(channel.scale)}`,
    channel.offset === undefined ? '' : `+ ${asWritten(channel.offset, channel.unit)}`,
    channel.range === undefined
      ? ''
      : `believed from ${asWritten(channel.range[0])} to ${asWritten(channel.range[1], channel.unit)}`,
    channel.uncertainty === undefined ? '' : `U ${asWritten(channel.uncertainty, asTemperature(channel).unit)}`,
    channel.thermocouple === undefined
      ? ''
      : `type ${channel.thermocouple.type} to °C, ${coldJunctionWords(channel.thermocouple)}`,
  ];
  return said.filter(Boolean).join(', ') || 'nothing';
}

function coldJunctionWords({ coldJunction }: Thermocouple): string {
  return typeof coldJunction === 'number'
    ? `cold junction held at ${asWritten(coldJunction, '°C')}`
    : `cold junction read by ${coldJunction}`;
}
