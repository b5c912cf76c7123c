import type { SourceKind } from '../../models/log/live-source.ts';
import type { Cycles } from '../../server/contract/cycles.ts';
import { CYCLES_PATH, RECORDERS_PATH } from '../../server/contract/paths.ts';
import type { Recorders } from '../../server/contract/recorders.ts';
import { useRead } from '../use-read.ts';
import type { SourceForm } from '../words/source-form.ts';
import { type Choice, ChoiceField, TextField } from './field.tsx';

interface Editing {
  readonly form: SourceForm;
  readonly onChange: (next: Partial<SourceForm>) => void;
}

/** Where a source is reached, by its kind. */
export function SourcePlaces(editing: Editing) {
  const Places = PLACES[editing.form.kind];
  return <Places {...editing} />;
}

function ModbusTcp({ form, onChange }: Editing) {
  return (
    <>
      <TextField
        label="Host"
        hint="Name or address of the device on the shop’s network"
        required
        value={form.host}
        onValue={(host) => onChange({ host })}
      />
      <TextField label="Port" required inputMode="numeric" value={form.port} onValue={(port) => onChange({ port })} />
    </>
  );
}

const PARITIES = ['none', 'even', 'odd'].map(same);
const STOP_BITS = ['1', '2'].map(same);

function ModbusRtu({ form, onChange }: Editing) {
  return (
    <>
      <TextField
        label="Serial port"
        hint="/dev/ttyUSB0, COM3"
        required
        value={form.serialPort}
        onValue={(serialPort) => onChange({ serialPort })}
      />
      <TextField label="Baud" required inputMode="numeric" value={form.baud} onValue={(baud) => onChange({ baud })} />
      <ChoiceField label="Parity" choices={PARITIES} value={form.parity} onValue={(parity) => onChange({ parity })} />
      <ChoiceField
        label="Stop bits"
        choices={STOP_BITS}
        value={form.stopBits}
        onValue={(stopBits) => onChange({ stopBits })}
      />
    </>
  );
}

function Mqtt({ form, onChange }: Editing) {
  return (
    <>
      <TextField
        label="Broker"
        hint="mqtt://host:1883 or mqtts://host:8883"
        required
        value={form.broker}
        onValue={(broker) => onChange({ broker })}
      />
      <TextField label="User" value={form.user} onValue={(user) => onChange({ user })} />
      <TextField
        label="Password"
        type="password"
        hint="Kept beside the settings and never shown again"
        value={form.password}
        onValue={(password) => onChange({ password })}
      />
      <TextField
        label="Where the time stands"
        hint="A JSON pointer, /t; left empty: the arrival counts"
        value={form.timePointer}
        onValue={(timePointer) => onChange({ timePointer })}
      />
      <TextField
        label="Where the sequence number stands"
        hint="A JSON pointer, /n"
        value={form.sequencePointer}
        onValue={(sequencePointer) => onChange({ sequencePointer })}
      />
    </>
  );
}

function GrowingFiles({ form, onChange }: Editing) {
  const recorders = useRead<Recorders>(RECORDERS_PATH).value?.recorders ?? [];
  const known = recorders.filter(({ layout }) => layout !== null);
  const chosen = known.find(({ layout }) => layout?.document.name === form.layout?.name);
  return (
    <>
      <TextField
        label="Folder"
        hint="Full path on the computer Dwellbook runs on"
        required
        value={form.folder}
        onValue={(folder) => onChange({ folder })}
      />
      <ChoiceField
        label="Read by the layout of"
        hint={
          known.length === 0 ? (
            <>
              No recorder has a layout yet; <a href="/import">import one of its files</a> first.
            </>
          ) : undefined
        }
        choices={[
          { value: '', text: form.layout ? `as set: ${form.layout.name}` : 'choose a recorder' },
          ...known.map(({ name }) => ({ value: name, text: name })),
        ]}
        value={chosen?.name ?? ''}
        onValue={(name) =>
          onChange({ layout: known.find((one) => one.name === name)?.layout?.document ?? form.layout })
        }
      />
    </>
  );
}

function Practice({ form, onChange }: Editing) {
  const cycles = useRead<Cycles>(CYCLES_PATH).value?.cycles ?? [];
  const released = cycles.filter(({ status }) => status === 'released');
  return (
    <>
      <ChoiceField
        label="Cycle it runs"
        choices={[
          { value: '', text: 'choose' },
          ...released.map(({ code, issue, title }) => ({
            value: `${code}\t${issue}`,
            text: `${code} issue ${issue}: ${title}`,
          })),
        ]}
        value={form.cycle}
        onValue={(cycle) => onChange({ cycle })}
      />
      <TextField
        label="Times faster than the clock"
        hint="1 to 600"
        required
        inputMode="decimal"
        value={form.speed}
        onValue={(speed) => onChange({ speed })}
      />
    </>
  );
}

function Nowhere() {
  return null;
}

const PLACES: Readonly<Record<SourceKind, (editing: Editing) => preact.JSX.Element | null>> = {
  push: Nowhere,
  'modbus-tcp': ModbusTcp,
  'modbus-rtu': ModbusRtu,
  mqtt: Mqtt,
  'growing-files': GrowingFiles,
  gauge: Nowhere,
  practice: Practice,
};

function same(value: string): Choice {
  return { value, text: value };
}
