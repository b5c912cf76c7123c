import type { BeginRunRequest } from '../../server/contract/live.ts';
import { type LoadForm, newPart, requestOfForm, type SensorForm } from './load-form.ts';
import { instantIn } from './typed.ts';

/** A run that is about to begin, as it stands on the page: its load, and since when it is to count. */
export interface BeginForm extends LoadForm {
  readonly fromEarlier: boolean;
  /** A wall clock of the shop. */
  readonly from: string;
}

export const EMPTY_BEGIN: BeginForm = {
  workOrder: '',
  barometer: '',
  vessel: '',
  cycle: '',
  parts: [],
  sensors: [],
  reason: '',
  fromEarlier: false,
  from: '',
};

/** Serials as they were scanned or typed, those that are there already left out. */
export function withSerials(form: BeginForm, typed: string): BeginForm {
  const there = new Set(form.parts.map(({ part }) => part));
  const serials = [...new Set(typed.split(/[\s,;]+/))].filter((serial) => serial !== '' && !there.has(serial));
  const first = Math.max(0, ...form.parts.map(({ id }) => id)) + 1;
  return { ...form, parts: [...form.parts, ...serials.map((serial, n) => newPart(first + n, serial))] };
}

export function withoutPart(form: BeginForm, id: number): BeginForm {
  return {
    ...form,
    parts: form.parts.filter((part) => part.id !== id),
    sensors: form.sensors.map((sensor) => ({ ...sensor, parts: sensor.parts.filter((one) => one !== id) })),
  };
}

/** Puts a thermocouple on a part, or takes it off again. */
export function withAttached(form: BeginForm, channel: string, id: number): BeginForm {
  const before = sensorOf(form, channel);
  const parts = before.parts.includes(id) ? before.parts.filter((one) => one !== id) : [...before.parts, id];
  return withSensor(form, channel, { parts });
}

export function withSensor(form: BeginForm, channel: string, change: Partial<SensorForm>): BeginForm {
  const others = form.sensors.filter((sensor) => sensor.channel !== channel);
  return { ...form, sensors: [...others, { ...sensorOf(form, channel), ...change }] };
}

export function sensorOf({ sensors }: Pick<LoadForm, 'sensors'>, channel: string): SensorForm {
  const found = sensors.find((sensor) => sensor.channel === channel);
  return found ?? { channel, parts: [], place: '', uncertainty: '', corrections: null };
}

export function channelsOn(form: BeginForm, id: number): string[] {
  return form.sensors.filter(({ parts }) => parts.includes(id)).map(({ channel }) => channel);
}

/** The next thermocouple that is on no part yet, after one in the order of the page; null where all are. */
export function nextFree(form: BeginForm, channels: readonly string[], after: string): string | null {
  const start = channels.indexOf(after) + 1;
  const inTurn = [...channels.slice(start), ...channels.slice(0, start)];
  return inTurn.find((channel) => sensorOf(form, channel).parts.length === 0) ?? null;
}

/** What is sent; without a part there is no load yet. */
export function beginRequest(form: BeginForm, zone: string): BeginRunRequest {
  const { load, cycle, particulars } = requestOfForm(form, null);
  const from = form.fromEarlier ? instantIn(form.from, zone) : null;
  return {
    ...(from === null ? {} : { from }),
    load: form.parts.length === 0 ? null : load,
    cycle,
    ...(particulars && particulars.length > 0 ? { particulars } : {}),
  };
}
