import type { Room } from '../../models/material/ledger.ts';
import { keep, readKept } from '../kept-choice.ts';
import { workshop } from '../workshop.ts';
import { TextField } from './field.tsx';

/** A room as it is typed; both may be left out, and are then named as missing. */
export interface RoomForm {
  readonly temperature: string;
  readonly humidity: string;
}

const KEY = 'dwellbook.room';

/** The room as it was last typed in this browser, if that was today: a shop's room is the same from tap to tap. */
export function lastRoom(today: string): RoomForm {
  const [day, temperature = '', humidity = ''] = (readKept(KEY) ?? '').split('|');
  return day === today ? { temperature, humidity } : { temperature: '', humidity: '' };
}

export function keepRoom(today: string, { temperature, humidity }: RoomForm): void {
  keep(KEY, [today, temperature, humidity].join('|'));
}

export function roomOf({ temperature, humidity }: RoomForm): Room | undefined {
  if (temperature.trim() === '' && humidity.trim() === '') return undefined;
  const figure = (text: string) => (text.trim() === '' ? undefined : Number(text.replace(',', '.')));
  return { temperature: figure(temperature), unit: unitOfRoom(), humidity: figure(humidity) };
}

export function RoomFields({ room, onRoom }: { room: RoomForm; onRoom: (next: RoomForm) => void }) {
  return (
    <>
      <TextField
        label={`Room, ${unitOfRoom()}`}
        hint="Left out, its out-life cannot be told."
        inputMode="decimal"
        pattern="-?[0-9]+([.,][0-9]+)?"
        title="A figure, such as 21.5"
        value={room.temperature}
        onValue={(temperature) => onRoom({ ...room, temperature })}
      />
      <TextField
        label="Humidity, % RH"
        inputMode="decimal"
        pattern="[0-9]+([.,][0-9]+)?"
        title="A figure, such as 45"
        value={room.humidity}
        onValue={(humidity) => onRoom({ ...room, humidity })}
      />
    </>
  );
}

function unitOfRoom(): '°C' | '°F' {
  return workshop.value?.units.temperature ?? '°C';
}
