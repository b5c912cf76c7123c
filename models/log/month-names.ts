/**
 * Months as recorders spell them, by their first letters in lower case. No two languages here use one spelling for
 * different months.
 *
 * Source: Unicode CLDR 44, Gregorian calendar, abbreviated and wide month names of en, de, fr, es, pt, it, nl.
 */
const NAMES_BY_MONTH = [
  'jan january januar janv janvier ene enero janeiro gen gennaio januari',
  'feb february februar févr février fevr fevrier febrero fev fevereiro febbraio februari',
  'mar march mrz märz maerz mär mars marzo março marco mrt maart',
  'apr april avr avril abr abril aprile',
  'may mai mayo maio mag maggio mei',
  'jun june juni juin junio junho giu giugno',
  'jul july juli juil juillet julio julho lug luglio',
  'aug august août aout ago agosto augustus',
  'sep sept september septembre septiembre setembro set settembre',
  'oct october okt oktober octobre octubre out outubro ott ottobre',
  'nov november novembre noviembre novembro',
  'dec december dez dezember déc décembre decembre dic diciembre dezembro dicembre',
];

const MONTH_BY_NAME = new Map(
  NAMES_BY_MONTH.flatMap((names, i) => names.split(' ').map((name) => [name, i + 1] as const)),
);

/** 1 for January … 12; 0 for a word that is no month. */
export function monthFromName(name: string): number {
  return MONTH_BY_NAME.get(name.normalize('NFC').toLowerCase()) ?? 0;
}
