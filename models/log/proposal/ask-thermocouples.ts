import { isTemperatureUnit } from '../../units.ts';
import { type ChannelLayout, THERMOCOUPLE_TYPES } from '../layout.ts';
import { asked, type LayoutStatement } from './statement.ts';

/** Headings of the terminals where thermocouple wire meets copper. */
export const COLD_JUNCTION_WORDS =
  /\bcjc?\b|\bcjt\b|(?:cold|reference|ref)[ ._-]*(?:junction|jct)|junction|terminals?|vergleichsstelle|soudure froide/i;

/** What no file says of a column of emf: the type of its wire, and how warm its cold junction was. */
export function askThermocouples(channels: readonly ChannelLayout[]): LayoutStatement[] {
  const temperatures = channels.filter(({ unit }) => isTemperatureUnit(unit));
  const cold = temperatures.filter(({ name }) => COLD_JUNCTION_WORDS.test(name));
  const choices = (cold.length > 0 ? cold : temperatures).map(({ name }) => name);
  return channels.flatMap(({ thermocouple }, n) =>
    thermocouple === undefined
      ? []
      : [
          asked(`channels/${n}/thermocouple/type`, 'It recorded emf in mV; the file does not say of which wire.', [
            ...THERMOCOUPLE_TYPES,
          ]),
          asked(
            `channels/${n}/thermocouple/coldJunction`,
            'The emf of its cold junction must be added: which channel read its temperature, or at how many °C was it held?',
            choices,
          ),
        ],
  );
}
