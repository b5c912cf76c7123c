import { GAS_LATE_AND_ABSOLUTE, TORR_AGAINST_INCHES } from './bags-and-gas.ts';
import { CLOCKS_BACK_HALF_AN_HOUR, FELL_OFF, PIECES_OUT_OF_ORDER, SERIAL_DAYS_AND_A_POWER_CUT } from './clocks.ts';
import { GUARDED_IN_FAHRENHEIT } from './guarded.ts';
import { DEGREES_PER_HOUR } from './post-cure.ts';
import type { PracticeCase } from './practice-case.ts';
import { ESTIMATES_OF_CURE, SET_TO_THE_OTHER_SCALE, TENTHS_IN_UTF_16 } from './reactions.ts';
import { THICK_TOOL_IN_FAHRENHEIT } from './thick-tool.ts';

export const PRACTICE_CASES: readonly PracticeCase[] = [
  CLOCKS_BACK_HALF_AN_HOUR,
  SERIAL_DAYS_AND_A_POWER_CUT,
  PIECES_OUT_OF_ORDER,
  FELL_OFF,
  THICK_TOOL_IN_FAHRENHEIT,
  TORR_AGAINST_INCHES,
  GUARDED_IN_FAHRENHEIT,
  DEGREES_PER_HOUR,
  GAS_LATE_AND_ABSOLUTE,
  TENTHS_IN_UTF_16,
  ESTIMATES_OF_CURE,
  SET_TO_THE_OTHER_SCALE,
];
