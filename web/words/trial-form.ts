import type { Resin } from '../../models/cure/resin.ts';
import { whyNotFrom } from '../../models/cure/start-degree.ts';
import { parseProgrammeText, programmeText } from '../../models/cycle/programme-text.ts';
import { figureFrom, type TypedProgramme, typedFrom } from '../../models/cycle/read-programme.ts';
import {
  round9,
  type TemperatureUnit,
  temperatureDifferenceFromCelsius,
  temperatureFromCelsius,
} from '../../models/units.ts';

/** What a person types to try a cure: figures are still text; an empty start degree is the set's own. */
export interface TrialForm {
  readonly programme: TypedProgramme;
  readonly startDegree: string;
  /** Code of the set beside; empty for none. */
  readonly other: string;
  readonly otherStartDegree: string;
  /** U, k = 2, of the thermocouple, in the programme's unit; empty: not reckoned with. */
  readonly uncertainty: string;
}

/** Limit of error of a type K thermocouple, the lower part of its range: ASTM E230, standard tolerance. */
const UNCERTAINTY: Readonly<Record<TemperatureUnit, string>> = { '°C': '2.2', '°F': '4' };

/** What a page without a programme in its address begins with: one ramp and one hold that the set was fitted for. */
export function firstForm(resin: Resin, unit: TemperatureUnit): TrialForm {
  const hottestC = Math.min(180, Math.floor((resin.validC?.[1] ?? 180) / 10) * 10);
  const programme = typedFrom({
    unit,
    start: temperatureFromCelsius(20, unit),
    steps: [
      {
        kind: 'ramp',
        rate: round9(temperatureDifferenceFromCelsius(2, unit)),
        to: temperatureFromCelsius(hottestC, unit),
      },
      { kind: 'hold', minutes: 120 },
    ],
  });
  return { programme, startDegree: '', other: '', otherStartDegree: '', uncertainty: UNCERTAINTY[unit] };
}

/** The form an address holds; `isUnreadable` where it names a programme that cannot be read. */
export function formFromQuery(
  query: URLSearchParams,
  otherwise: TrialForm,
): { readonly form: TrialForm; readonly isUnreadable: boolean } {
  const text = query.get('programme');
  const programme = text === null ? otherwise.programme : parseProgrammeText(text);
  const held = programme ?? otherwise.programme;
  return {
    isUnreadable: programme === null,
    form: {
      programme: held,
      startDegree: query.get('start') ?? '',
      other: query.get('with') ?? '',
      otherStartDegree: query.get('with-start') ?? '',
      uncertainty: query.get('uncertainty') ?? UNCERTAINTY[held.unit],
    },
  };
}

export function queryOfForm(form: TrialForm): Readonly<Record<string, string | null>> {
  const orNone = (text: string) => (text === '' ? null : text);
  return {
    programme: programmeText(form.programme),
    start: orNone(form.startDegree),
    with: orNone(form.other),
    'with-start': form.other === '' ? null : orNone(form.otherStartDegree),
    uncertainty: form.uncertainty === UNCERTAINTY[form.programme.unit] ? null : form.uncertainty,
  };
}

/** A start degree as typed: undefined is the set's own; the model says which it refuses. */
export function readStartDegree(text: string, resin: Resin): { value: number | undefined; wrong: string | null } {
  if (text.trim() === '') return { value: undefined, wrong: null };
  const value = figureFrom(text);
  const expected = value === null ? 'a number of at least 0 and below 1' : whyNotFrom(value, resin.kinetics);
  if (value === null || expected !== null) {
    return { value: undefined, wrong: `The start degree is ${text.trim()}; expected ${expected}.` };
  }
  return { value, wrong: null };
}

/** The thermocouple's uncertainty as typed, in the programme's unit; an empty field is none. */
export function readUncertainty(text: string, unit: TemperatureUnit): { value: number; wrong: string | null } {
  if (text.trim() === '') return { value: 0, wrong: null };
  const value = figureFrom(text);
  const most = temperatureDifferenceFromCelsius(50, unit);
  if (value !== null && value >= 0 && value <= most) return { value, wrong: null };
  return { value: 0, wrong: `Expected a figure from 0 to ${most} ${unit}; leave it empty for none.` };
}

/** The same programme in the other unit, to a hundredth. */
export function inOtherUnit(form: TrialForm, unit: TemperatureUnit): TrialForm {
  const { programme } = form;
  if (programme.unit === unit) return form;
  const [per, zero] = unit === '°F' ? [1.8, 32] : [1 / 1.8, -32 / 1.8];
  const converted = (text: string, offset: number) => {
    const value = figureFrom(text);
    return value === null ? text : String(Number((value * per + offset).toFixed(2)));
  };
  return {
    ...form,
    uncertainty: form.uncertainty === UNCERTAINTY[programme.unit] ? UNCERTAINTY[unit] : converted(form.uncertainty, 0),
    programme: {
      unit,
      start: converted(programme.start, zero),
      steps: programme.steps.map((step) =>
        step.kind === 'hold' ? step : { ...step, rate: converted(step.rate, 0), to: converted(step.to, zero) },
      ),
    },
  };
}
