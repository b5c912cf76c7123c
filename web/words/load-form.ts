import type { Load, LoadPart, LoadSensor } from '../../models/run/load.ts';
import type { Particulars, RunView, SetLoadRequest } from '../../server/contract/runs.ts';

/** A load as it stands in a form: text everywhere, parts known by a number of their own so that a serial can be mended. */
export interface LoadForm {
  readonly workOrder: string;
  readonly barometer: string;
  readonly vessel: string;
  /** `code issue`, apart by a tab; empty where not known yet. */
  readonly cycle: string;
  readonly parts: readonly PartForm[];
  readonly sensors: readonly SensorForm[];
  readonly reason: string;
}

export interface PartForm {
  readonly id: number;
  readonly part: string;
  readonly quantity: string;
  readonly bagLine: string;
  readonly startDegree: string;
  /** Absent in a form kept from before it was asked for. */
  readonly humidity?: string;
  readonly leakStart: string;
  readonly leakEnd: string;
  readonly leakMinutes: string;
  readonly title: string;
  readonly drawing: string;
  readonly drawingIssue: string;
  readonly tool: string;
}

export interface SensorForm {
  readonly channel: string;
  readonly parts: readonly number[];
  readonly place: string;
  readonly uncertainty: string;
  readonly corrections: LoadSensor['corrections'] | null;
}

export function newPart(id: number, part: string): PartForm {
  const empty = {
    quantity: '',
    bagLine: '',
    startDegree: '',
    humidity: '',
    leakStart: '',
    leakEnd: '',
    leakMinutes: '',
  };
  return { id, part, ...empty, title: '', drawing: '', drawingIssue: '', tool: '' };
}

/** The form of a run: its load as it was set, or what is known before it was. */
export function formOfRun(run: RunView): LoadForm {
  const load = run.load;
  const parts = (load?.parts ?? []).map((part, n) => partForm(n + 1, part));
  const idOf = new Map(parts.map(({ id, part }) => [part, id]));
  const sensors = run.channels.map(({ name }) => {
    const set = load?.sensors.find((sensor) => sensor.channel === name);
    return {
      channel: name,
      parts: (set?.parts ?? []).flatMap((part) => idOf.get(part) ?? []),
      place: set?.place ?? '',
      uncertainty: text(set?.uncertainty),
      corrections: set?.corrections ?? null,
    };
  });
  return {
    workOrder: load?.workOrder ?? '',
    barometer: load?.barometer ?? '',
    vessel: run.vessel ?? '',
    cycle: run.cycle ? `${run.cycle.code}\t${run.cycle.issue}` : '',
    parts,
    sensors,
    reason: '',
  };
}

/** Thermocouples that can be on a part: those laid there, those in its tool, and the air where the cycle is judged by it. */
export function isAttachable({ role }: { readonly role: string }, judgedBy: string): boolean {
  return role === 'part' || role === 'tool' || role === judgedBy;
}

function partForm(id: number, part: LoadPart): PartForm {
  return {
    ...newPart(id, part.part),
    quantity: text(part.quantity),
    bagLine: part.bagLine ?? '',
    startDegree: text(part.startDegree),
    humidity: text(part.humidity),
    leakStart: text(part.leakTest?.start),
    leakEnd: text(part.leakTest?.end),
    leakMinutes: text(part.leakTest?.minutes),
  };
}

/** What is sent: only what was filled in, figures as figures. */
export function requestOfForm(form: LoadForm, before: Load | null): SetLoadRequest {
  const serialOf = new Map(form.parts.map(({ id, part }) => [id, part.trim()]));
  const load: Load = {
    format: 'dwellbook-load/1',
    ...filled('workOrder', form.workOrder),
    ...filled('barometer', form.barometer),
    parts: form.parts.map(loadPart),
    sensors: form.sensors.flatMap((sensor) => loadSensor(sensor, serialOf)),
    ...(before?.exclusions ? { exclusions: before.exclusions } : {}),
  };
  const [code = '', issue = ''] = form.cycle.split('\t');
  return {
    load,
    cycle: code === '' ? null : { code, issue },
    vessel: form.vessel.trim() || null,
    particulars: form.parts.flatMap(particularsOf),
    ...filled('reason', form.reason),
  };
}

function loadPart(form: PartForm): LoadPart {
  const hasLeakTest = form.leakStart.trim() !== '' || form.leakEnd.trim() !== '' || form.leakMinutes.trim() !== '';
  return {
    part: form.part.trim(),
    ...number('quantity', form.quantity),
    ...filled('bagLine', form.bagLine),
    ...number('startDegree', form.startDegree),
    ...number('humidity', form.humidity ?? ''),
    ...(hasLeakTest
      ? { leakTest: { start: Number(form.leakStart), end: Number(form.leakEnd), minutes: Number(form.leakMinutes) } }
      : {}),
  };
}

function loadSensor(sensor: SensorForm, serialOf: ReadonlyMap<number, string>): LoadSensor[] {
  const parts = sensor.parts.flatMap((id) => serialOf.get(id) ?? []);
  const said = {
    ...(parts.length > 0 ? { parts } : {}),
    ...filled('place', sensor.place),
    ...number('uncertainty', sensor.uncertainty),
    ...(sensor.corrections ? { corrections: sensor.corrections } : {}),
  };
  return Object.keys(said).length === 0 ? [] : [{ channel: sensor.channel, ...said }];
}

function particularsOf(form: PartForm): Particulars[] {
  const said = {
    ...filled('title', form.title),
    ...filled('drawing', form.drawing),
    ...filled('drawingIssue', form.drawingIssue),
    ...filled('tool', form.tool),
  };
  return Object.keys(said).length === 0 ? [] : [{ part: form.part.trim(), ...said }];
}

/** `{ key: value }` where something was typed, else nothing to spread. */
function filled<K extends string>(key: K, value: string): { [P in K]?: string } {
  return (value.trim() === '' ? {} : { [key]: value.trim() }) as { [P in K]?: string };
}

function number<K extends string>(key: K, value: string): { [P in K]?: number } {
  return (value.trim() === '' ? {} : { [key]: Number(value.replace(',', '.')) }) as { [P in K]?: number };
}

function text(value: number | undefined): string {
  return value === undefined ? '' : String(value);
}
