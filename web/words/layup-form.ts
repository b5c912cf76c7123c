import { LAMINATES } from '../../models/cure/heat/laminates.ts';
import { celsiusFrom, type TemperatureUnit, temperatureFromCelsius } from '../../models/units.ts';
import type { Layup, LayupView, SetLayupRequest } from '../../server/contract/layups.ts';
import { instantOfWallClock, wallClock } from './clock.ts';
import { instantIn, numberIn } from './typed.ts';

/** A lay-up as it stands in a form: text everywhere. */
export interface LayupForm {
  readonly title: string;
  readonly drawing: string;
  readonly drawingIssue: string;
  readonly tool: string;
  readonly workOrder: string;
  readonly customer: string;
  readonly thicknessMm: string;
  readonly plies: string;
  readonly fibreFraction: string;
  readonly laminate: LaminateForm;
  readonly beganAt: string;
  readonly endedAt: string;
  /** In the unit shown to this person. */
  readonly room: string;
  readonly humidity: string;
  readonly debulks: readonly DebulkForm[];
  readonly reason: string;
}

export interface LaminateForm {
  /** Name of a table entry, `own` for figures of one's own, empty where not known. */
  readonly entry: string;
  readonly name: string;
  readonly density: string;
  readonly specificHeat: string;
  readonly conductivity: string;
  readonly resinDensity: string;
  readonly source: string;
}

export interface DebulkForm {
  readonly id: number;
  readonly at: string;
  readonly minutes: string;
  readonly vacuum: string;
  /** As it was written; of a new one the unit shown to this person. */
  readonly vacuumUnit: string;
}

const NO_LAMINATE: LaminateForm = {
  entry: '',
  name: '',
  density: '',
  specificHeat: '',
  conductivity: '',
  resinDensity: '',
  source: '',
};

/** What stands on record; where nothing does, an empty form. */
export function formOfLayup(view: LayupView, zone: string, unit: TemperatureUnit): LayupForm {
  const { title, drawing, drawingIssue, tool, layup } = view;
  const particulars = { title: title ?? '', drawing: drawing ?? '', drawingIssue: drawingIssue ?? '' };
  if (layup === null) return { ...formOf(null, unit), ...particulars, tool: tool ?? '' };
  const wall = (at: string | null) => (at === null ? '' : wallClock(at, zone).slice(0, 16));
  return {
    ...formOf(layup, unit),
    ...particulars,
    workOrder: layup.workOrder ?? '',
    beganAt: wall(layup.beganAt),
    endedAt: wall(layup.endedAt),
    debulks: layup.debulks.map((debulk, n) => ({
      id: n + 1,
      at: wall(debulk.at),
      minutes: text(debulk.minutes),
      vacuum: text(debulk.vacuum),
      vacuumUnit: debulk.vacuumUnit ?? '',
    })),
  };
}

/** What is alike from part to part, taken from the last one like it; times, room and work order are each part's own. */
export function formLike(
  form: LayupForm,
  similar: NonNullable<LayupView['similar']>,
  unit: TemperatureUnit,
): LayupForm {
  const like = formOf(similar.layup, unit);
  return {
    ...like,
    title: form.title || (similar.title ?? ''),
    drawing: form.drawing || (similar.drawing ?? ''),
    drawingIssue: form.drawingIssue || (similar.drawingIssue ?? ''),
    tool: form.tool || like.tool,
    workOrder: form.workOrder,
    beganAt: form.beganAt,
    endedAt: form.endedAt,
    room: form.room,
    humidity: form.humidity,
    debulks: similar.layup.debulks.map(({ minutes, vacuum, vacuumUnit }, n) => ({
      id: n + 1,
      at: '',
      minutes: text(minutes),
      vacuum: text(vacuum),
      vacuumUnit: vacuumUnit ?? '',
    })),
    reason: form.reason,
  };
}

/** What is sent: only what was filled in, figures as figures, instants in the shop's zone. */
export function requestOfLayup(
  form: LayupForm,
  zone: string,
  units: { readonly temperature: TemperatureUnit; readonly vacuum: string },
): SetLayupRequest {
  const room = numberIn(form.room);
  return {
    title: form.title.trim() || null,
    drawing: form.drawing.trim() || null,
    drawingIssue: form.drawingIssue.trim() || null,
    tool: form.tool.trim() || null,
    workOrder: form.workOrder.trim() || null,
    customer: form.customer.trim() || null,
    thicknessMm: numberIn(form.thicknessMm),
    plies: numberIn(form.plies),
    fibreFraction: shareIn(form.fibreFraction),
    laminate: laminateIn(form),
    beganAt: instantIn(form.beganAt, zone),
    endedAt: instantIn(form.endedAt, zone),
    roomC: room === null ? null : celsiusFrom(room, units.temperature),
    humidityPercent: numberIn(form.humidity),
    debulks: form.debulks.map(({ at, minutes, vacuum, vacuumUnit }) => ({
      at: instantIn(at, zone),
      minutes: numberIn(minutes),
      vacuum: numberIn(vacuum),
      vacuumUnit: numberIn(vacuum) === null ? null : vacuumUnit || units.vacuum,
    })),
    ...(form.reason.trim() === '' ? {} : { reason: form.reason.trim() }),
  };
}

/** Whether every time that was typed exists in the shop's zone. */
export function hasTimes(form: LayupForm, zone: string): boolean {
  const typed = [form.beganAt, form.endedAt, ...form.debulks.map(({ at }) => at)];
  return typed.every((wall) => wall === '' || instantOfWallClock(wall, zone) !== null);
}

/** Entries whose figures hang on the fibre fraction need one before they say anything. */
export function needsFraction({ laminate, fibreFraction }: LayupForm): boolean {
  const entry = LAMINATES.find(({ name }) => name === laminate.entry);
  return entry?.isMixed === true && !isShare(shareIn(fibreFraction));
}

function laminateIn(form: LayupForm): SetLayupRequest['laminate'] {
  const { laminate } = form;
  if (laminate.entry === '') return null;
  const fraction = shareIn(form.fibreFraction);
  const entry = LAMINATES.find(({ name }) => name === laminate.entry);
  if (entry !== undefined) {
    const { resinDensityKgM3, ...figures } = entry.figuresAt(fraction ?? Number.NaN);
    return {
      name: entry.name,
      densityKgM3: sixDigits(figures.densityKgM3),
      specificHeatJKgK: sixDigits(figures.specificHeatJKgK),
      conductivityWMK: sixDigits(figures.conductivityWMK),
      resinDensityKgM3,
      source: entry.source,
    };
  }
  return {
    name: laminate.name.trim(),
    densityKgM3: numberIn(laminate.density) ?? Number.NaN,
    specificHeatJKgK: numberIn(laminate.specificHeat) ?? Number.NaN,
    conductivityWMK: numberIn(laminate.conductivity) ?? Number.NaN,
    resinDensityKgM3: numberIn(laminate.resinDensity),
    source: laminate.source.trim(),
  };
}

function formOf(layup: Layup | null, unit: TemperatureUnit): LayupForm {
  return {
    title: '',
    drawing: '',
    drawingIssue: '',
    tool: layup?.tool ?? '',
    workOrder: '',
    customer: layup?.customer ?? '',
    thicknessMm: text(layup?.thicknessMm),
    plies: text(layup?.plies),
    fibreFraction: layup?.fibreFraction == null ? '' : String(Number((100 * layup.fibreFraction).toFixed(6))),
    laminate: laminateFormOf(layup?.laminate ?? null),
    beganAt: '',
    endedAt: '',
    room: layup?.roomC == null ? '' : String(Number(temperatureFromCelsius(layup.roomC, unit).toFixed(1))),
    humidity: text(layup?.humidityPercent),
    debulks: [],
    reason: '',
  };
}

function laminateFormOf(laminate: Layup['laminate']): LaminateForm {
  if (laminate === null) return NO_LAMINATE;
  const isOfTable = LAMINATES.some(({ name, source }) => name === laminate.name && source === laminate.source);
  return {
    entry: isOfTable ? laminate.name : 'own',
    name: laminate.name,
    density: text(laminate.densityKgM3),
    specificHeat: text(laminate.specificHeatJKgK),
    conductivity: text(laminate.conductivityWMK),
    resinDensity: text(laminate.resinDensityKgM3),
    source: laminate.source,
  };
}

/** The form asks for per cent, the record holds a share. */
function shareIn(percent: string): number | null {
  const figure = numberIn(percent);
  return figure === null ? null : Number((figure / 100).toFixed(8));
}

function isShare(share: number | null): boolean {
  return share !== null && share > 0 && share < Math.PI / 4;
}

function sixDigits(figure: number): number {
  return Number(figure.toPrecision(6));
}

function text(value: number | null | undefined): string {
  return value === null || value === undefined ? '' : String(value);
}
