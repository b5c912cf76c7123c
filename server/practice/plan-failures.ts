/** A proof load every strut is pulled to, kN. Invented. */
export const PROOF_LOAD_KN = 9;

/** Struts that broke under their proof load, and at what. What they share is told nowhere else in the workshop. */
export const BROKEN_AT_KN: Readonly<Record<string, number>> = {
  'SR-0453': 8.2,
  'SR-0461': 7.9,
  'SR-0465': 7.4,
  'SR-0473': 8.4,
  'SR-0477': 7.7,
  'SR-0481': 8.0,
};
