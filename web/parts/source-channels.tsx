import { CHANNEL_ROLES, type ChannelRole } from '../../models/log/layout.ts';
import type { SourceKind } from '../../models/log/live-source.ts';
import { ROLE_WORDS } from '../words/layouts.ts';
import { newChannel, type SourceChannelForm, type SourceForm, usualChannels } from '../words/source-form.ts';
import { type Choice, ChoiceField, TextField } from './field.tsx';

/** The channels of a source: what each is called and measures, and where at the source its figure is. */
export function SourceChannels({
  form,
  onChange,
}: {
  form: SourceForm;
  onChange: (next: Partial<SourceForm>) => void;
}) {
  const { channels, kind } = form;
  const change = (id: number, next: Partial<SourceChannelForm>) =>
    onChange({ channels: channels.map((channel) => (channel.id === id ? { ...channel, ...next } : channel)) });
  if (kind === 'growing-files') {
    return <p class="soft">Its channels are those of the layout.</p>;
  }
  return (
    <>
      <ol class="source-channels">
        {channels.map((channel) => (
          <li key={channel.id}>
            <ChannelFields
              kind={kind}
              channel={channel}
              onChange={(next) => change(channel.id, next)}
              onRemove={() => onChange({ channels: channels.filter(({ id }) => id !== channel.id) })}
            />
          </li>
        ))}
      </ol>
      <div class="row">
        <button type="button" onClick={() => onChange({ channels: [...channels, newChannel(channels)] })}>
          Add a channel
        </button>
        {channels.length === 0 && (
          <button type="button" class="quiet" onClick={() => onChange({ channels: usualChannels() })}>
            Begin with four thermocouples, air, pressure and a vacuum
          </button>
        )}
      </div>
    </>
  );
}

const ROLES = CHANNEL_ROLES.map((role) => ({ value: role, text: ROLE_WORDS[role] ?? role }));
const TABLES: readonly Choice[] = [
  { value: 'input', text: 'input registers (04)' },
  { value: 'holding', text: 'holding registers (03)' },
];
const TYPES = ['int16', 'uint16', 'int32', 'uint32', 'float32'].map((value) => ({ value, text: value }));
const WORDS: readonly Choice[] = [
  { value: 'high-first', text: 'high word first' },
  { value: 'low-first', text: 'low word first' },
];
const COLUMN_WORDS: Partial<Record<SourceKind, string>> = { push: 'Key in values' };

function ChannelFields({
  kind,
  channel,
  onChange,
  onRemove,
}: {
  kind: SourceKind;
  channel: SourceChannelForm;
  onChange: (next: Partial<SourceChannelForm>) => void;
  onRemove: () => void;
}) {
  const line = (key: keyof SourceChannelForm & string, label: string, more: object = {}) => (
    <TextField label={label} value={channel[key] as string} onValue={(value) => onChange({ [key]: value })} {...more} />
  );
  const figure = { inputMode: 'decimal' } as const;
  const isModbus = kind === 'modbus-tcp' || kind === 'modbus-rtu';
  return (
    <fieldset class="source-channel">
      <legend>{channel.name || 'Channel'}</legend>
      <div class="fields">
        {line('name', 'Called', { required: true })}
        {COLUMN_WORDS[kind] && line('column', COLUMN_WORDS[kind], { required: true })}
        <ChoiceField
          label="Role"
          choices={ROLES}
          value={channel.role}
          onValue={(role) => onChange({ role: role as ChannelRole })}
        />
        {line('unit', 'Unit', { required: true, list: 'source-units' })}
        {isModbus && (
          <>
            {line('unitId', 'Unit number', { inputMode: 'numeric' })}
            <ChoiceField
              label="Table"
              choices={TABLES}
              value={channel.table}
              onValue={(table) => onChange({ table })}
            />
            {line('address', 'Register, from 0', { inputMode: 'numeric' })}
            <ChoiceField label="Type" choices={TYPES} value={channel.type} onValue={(type) => onChange({ type })} />
            {/32/.test(channel.type) && (
              <ChoiceField
                label="Order of its words"
                choices={WORDS}
                value={channel.words}
                onValue={(words) => onChange({ words })}
              />
            )}
            {line('notAvailable', 'Means no reading', { hint: 'Figures before any scale: 32768, 65535' })}
          </>
        )}
        {kind === 'mqtt' && (
          <>
            {line('topic', 'Topic', { required: true })}
            {line('pointer', 'Where in the message', { hint: 'A JSON pointer; empty: the message itself' })}
          </>
        )}
        {kind === 'gauge' &&
          line('readingError', `Reading error, ${channel.unit}`, {
            ...figure,
            required: true,
            hint: 'Half the least division that can be told',
          })}
      </div>
      <button type="button" class="quiet" onClick={onRemove} aria-label={`Leave out ${channel.name}`}>
        Leave out
      </button>
      <details open={[channel.scale, channel.offset, channel.low, channel.high].some((value) => value !== '')}>
        <summary>Scale, offset, believable range</summary>
        <div class="fields">
          {line('scale', 'Scale', { ...figure, hint: 'Multiplies what comes' })}
          {line('offset', `Offset, ${channel.unit}`, figure)}
          {line('low', `Least believable, ${channel.unit}`, figure)}
          {line('high', `Greatest believable, ${channel.unit}`, figure)}
        </div>
      </details>
    </fieldset>
  );
}
