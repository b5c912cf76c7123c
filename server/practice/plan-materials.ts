import type { Material } from '../../models/material/material.ts';

/** The materials of the practice workshop. Every figure is invented. */
export const TAPE_180: Material = {
  format: 'dwellbook-material/1',
  code: 'skerry-180-tape',
  issue: 'A',
  name: 'skerry-180 tape',
  maker: 'Skerry Row',
  form: 'unidirectional prepreg tape',
  origin: { document: 'SR-MS-002', issue: '3', clause: '5' },
  resin: 'skerry-180',
  units: { temperature: '°C' },
  storage: { atMost: -18, lifeDays: 365, outAbove: -12 },
  out: { lifeDays: 30, atMost: 24 },
  thaw: { from: 'removal' },
  extension: { times: 1, tests: ['DSC', 'tack'] },
  ageing: { freshDegree: 0.01, degreeAtOutLife: 0.035, source: 'DSC, invented for practice' },
};

export const FABRIC_120: Material = {
  format: 'dwellbook-material/1',
  code: 'skerry-120-fabric',
  issue: 'A',
  name: 'skerry-120 glass fabric',
  maker: 'Skerry Row',
  form: 'woven glass prepreg',
  origin: { document: 'SR-MS-005', issue: '1', clause: '5' },
  resin: 'skerry-120',
  units: { temperature: '°C' },
  storage: { atMost: -18, lifeDays: 365, outAbove: -12 },
  out: { lifeDays: 13, atMost: 24 },
  thaw: { from: 'removal' },
  extension: { times: 1, tests: ['DSC', 'tack'] },
};

export const MATERIALS: readonly Material[] = [TAPE_180, FABRIC_120];

/** A life extended after re-test. */
export const EXTENSIONS = [
  {
    roll: 'G-06',
    at: '2026-05-06T10:20:00Z',
    lifeDays: 18,
    until: '2026-12-31T00:00:00Z',
    authority: 'materials engineer 1',
    tests: 'DSC and tack on a strip of the roll',
    reason: 'As SR-MS-005 clause 5 allows, after the press load of April',
  },
] as const;

/** Runs for which nobody wrote down how warm the room was as the roll was taken out. */
export const ROOM_NOT_WRITTEN: readonly string[] = ['P1-0075'];
