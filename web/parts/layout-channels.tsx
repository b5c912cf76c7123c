import { CHANNEL_ROLES, type ChannelLayout, type ChannelRole } from '../../models/log/layout.ts';
import type { Preview } from '../../server/contract/imports.ts';
import { figure } from '../words/figures.ts';
import { withChannel, withoutChannel } from '../words/layout-edits.ts';
import { ROLE_WORDS } from '../words/layouts.ts';
import { Basis } from './basis.tsx';
import type { LayoutEditing } from './layout-editor.tsx';
import { isOpen, wrongIfOpen } from './open-field.ts';
import { ThermocoupleFields } from './thermocouple-fields.tsx';

const UNITS = [
  '°C',
  '°F',
  'mV',
  'bar',
  'mbar',
  'kPa',
  'MPa',
  'psi',
  'inHg',
  'mmHg',
  'torr',
  'bar abs',
  'mbar abs',
  'kPa abs',
  'psi abs',
  'torr abs',
];

/** Each column of the file: what it is called here, its role, its unit, and what was read from it. */
export function LayoutChannels({ editing, preview }: { editing: LayoutEditing; preview: Preview | null }) {
  return (
    <div class="channels">
      {editing.layout.channels.map((channel, n) => (
        <ChannelLine key={n} editing={editing} n={n} channel={channel} preview={preview} />
      ))}
      <datalist id="units">
        {UNITS.map((unit) => (
          <option key={unit} value={unit} />
        ))}
      </datalist>
    </div>
  );
}

function ChannelLine({
  editing,
  n,
  channel,
  preview,
}: {
  editing: LayoutEditing;
  n: number;
  channel: ChannelLayout;
  preview: Preview | null;
}) {
  const { layout, onChange } = editing;
  const change = (key: keyof ChannelLayout, value: string) =>
    onChange(withChannel(layout, n, { [key]: value }), `channels/${n}/${key}`);
  const read = preview?.channels.find((one) => one.name === channel.name);
  return (
    <fieldset class="channel">
      <legend>
        Column <strong>{channel.column}</strong>
      </legend>
      <label>
        <span>Called</span>
        <input value={channel.name} onInput={(event) => change('name', event.currentTarget.value)} />
      </label>
      <label>
        <span>Role</span>
        <select
          value={isOpen(editing, `channels/${n}/role`) ? '' : channel.role}
          {...wrongIfOpen(editing, `channels/${n}/role`)}
          onChange={(event) => change('role', event.currentTarget.value as ChannelRole)}
        >
          {isOpen(editing, `channels/${n}/role`) && <option value="">choose</option>}
          {CHANNEL_ROLES.map((role) => (
            <option key={role} value={role}>
              {ROLE_WORDS[role]}
            </option>
          ))}
        </select>
      </label>
      <label>
        <span>Unit</span>
        <input
          list="units"
          size={8}
          value={channel.unit}
          {...wrongIfOpen(editing, `channels/${n}/unit`)}
          onInput={(event) => change('unit', event.currentTarget.value)}
        />
      </label>
      <button
        type="button"
        class="quiet"
        onClick={() => onChange(withoutChannel(layout, n), `channels/${n}`)}
        aria-label={`Leave out column ${channel.column}`}
      >
        Leave out
      </button>
      {channel.thermocouple && <ThermocoupleFields editing={editing} n={n} thermocouple={channel.thermocouple} />}
      <p class="read small soft">
        {read &&
          `${figure(read.least, read.unit)} to ${figure(read.greatest, read.unit)}${read.absent > 0 ? `, ${read.absent} absent` : ''}. `}
        <ChannelBasis editing={editing} n={n} />
      </p>
    </fieldset>
  );
}

/** Only what is not proved is worth the words. */
function ChannelBasis({ editing, n }: { editing: LayoutEditing; n: number }) {
  const open = editing.statements.filter(
    ({ key, basis }) => key.startsWith(`channels/${n}/`) && basis !== 'proved' && !editing.answered.has(key),
  );
  return (
    <>
      {open.map((statement) => (
        <Basis key={statement.key} statement={statement} isAnswered={false} />
      ))}
    </>
  );
}
