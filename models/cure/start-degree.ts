import type { Kinetics } from './resin.ts';

/** Why a cure cannot start from a degree under a law; null where it can. */
export function whyNotFrom(startDegree: number, kinetics: Kinetics): string | null {
  if (!(startDegree >= 0 && startDegree < 1)) return 'a number of at least 0 and below 1';
  if (kinetics.law === 'isoconversional' && startDegree < kinetics.degree[0]!) {
    return `at least ${kinetics.degree[0]}, where kinetics.degree begins`;
  }
  if (startDegree === 0 && neverStartsFromZero(kinetics)) {
    return `a number above 0: by the law "${kinetics.law}" nothing ever starts from 0`;
  }
  return null;
}

/** True for a law whose rate is 0 at α = 0, so that the start degree is part of the set and must be above 0. */
function neverStartsFromZero(kinetics: Kinetics): boolean {
  return (
    (kinetics.law === 'autocatalytic' && kinetics.m > 0) ||
    (kinetics.law === 'two-term' && kinetics.m1 > 0 && kinetics.m2 > 0)
  );
}
