/** Sensor faults that are looked for, in the order they are told. */
export const FAULT_KINDS = [
  'open',
  'stuck',
  'reversed',
  'follows-air',
  'jumping',
  'offset',
  'wrong-unit',
  'unused',
] as const;
export type FaultKind = (typeof FAULT_KINDS)[number];
