import { object, oneOf, type Read } from '../document.ts';
import type { Cycle } from './cycle.ts';

/** Units of vessel pressure a cycle may be written in: gauge, or absolute with ` abs`. */
export const CYCLE_PRESSURE_UNITS = ['bar', 'kPa', 'MPa', 'psi', 'bar abs', 'kPa abs', 'MPa abs', 'psi abs'] as const;

/** Units of vacuum a cycle may be written in: below ambient, or absolute with ` abs`. */
export const CYCLE_VACUUM_UNITS = ['bar', 'kPa', 'mbar', 'inHg', 'mmHg', 'mbar abs', 'kPa abs', 'torr abs'] as const;

/** The units a cycle is written in, each declared once. */
export const units: Read<Cycle['units']> = object((fields) => {
  return {
    temperature: fields.required('temperature', oneOf(['°C', '°F'])),
    ...fields.optional('rate', oneOf(['°C/min', '°F/min', '°C/h', '°F/h'])),
    ...fields.optional('pressure', oneOf(CYCLE_PRESSURE_UNITS)),
    ...fields.optional('vacuum', oneOf(CYCLE_VACUUM_UNITS)),
  };
});
