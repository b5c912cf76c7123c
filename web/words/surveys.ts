import type {
  AddAccuracyTestRequest,
  AddSurveyRequest,
  SetQualifiedRangeRequest,
} from '../../server/contract/surveys.ts';
import { numberIn } from './typed.ts';

/** A survey, a test or a range as it stands in a form: text everywhere. */
export interface SurveyText {
  readonly what: 'survey' | 'accuracy' | 'range';
  readonly done: string;
  readonly until: string;
  readonly zone: string;
  readonly unit: '°C' | '°F';
  readonly lowest: string;
  readonly highest: string;
  readonly figure: string;
  readonly channel: string;
  readonly certificate: string;
  readonly document: string;
  readonly replaces: string;
  readonly reason: string;
}

export const EMPTY_SURVEY: SurveyText = {
  what: 'survey',
  done: '',
  until: '',
  zone: '',
  unit: '°C',
  lowest: '',
  highest: '',
  figure: '',
  channel: '',
  certificate: '',
  document: '',
  replaces: '',
  reason: '',
};

export function requestOfSurvey(
  form: SurveyText,
): AddSurveyRequest | AddAccuracyTestRequest | SetQualifiedRangeRequest {
  const figure = (text: string) => numberIn(text) ?? Number.NaN;
  const { unit } = form;
  const reason = form.reason.trim() === '' ? {} : { reason: form.reason.trim() };
  const range = { lowest: figure(form.lowest), highest: figure(form.highest) };
  if (form.what === 'range') return { unit, ...range, document: form.document.trim(), ...reason };
  const written = {
    done: form.done.trim(),
    until: form.until.trim(),
    unit,
    certificate: form.certificate.trim() || null,
    ...(form.replaces === '' ? {} : { replaces: Number(form.replaces), ...reason }),
  };
  if (form.what === 'survey') return { ...written, ...range, zone: form.zone.trim(), uniformity: figure(form.figure) };
  return { ...written, channel: form.channel.trim() || null, difference: figure(form.figure) };
}
