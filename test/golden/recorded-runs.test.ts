import { readdirSync, readFileSync } from 'node:fs';
import { basename, join } from 'node:path';
import { describe, expect, it } from 'vitest';
import { DomainError } from '../../models/errors.ts';
import type { Evaluation, Finding } from '../../models/evaluation/evaluation.ts';
import { openRecordedRun } from '../support/recorded-run.ts';

// Where each folder comes from: SOURCES.md beside this file.
const FOLDERS = ['recorded', 'rewritten', 'second-reading', 'practice'].flatMap((name) => {
  const folder = join(import.meta.dirname, name);
  return readdirSync(folder).map((run) => join(folder, run));
});

interface ExpectedFinding {
  limit: string;
  outcome: string;
  observed?: number;
  within?: number;
  possible?: number;
  possibleWithin?: number;
  margin?: number;
  sensor?: string;
}

interface Expected {
  what: string;
  exit?: number;
  verdict?: string;
  findings?: ExpectedFinding[];
  parts?: Record<string, { verdict: string; findings: ExpectedFinding[] }>;
  notFindings?: string[];
  faults?: Record<string, string>;
  repairs?: boolean;
  cure?: {
    channel: string;
    degree: number;
    tgC: number;
    gelAt: string;
    within: { degree: number; tgC: number; gelS: number };
  }[];
  stderr?: string[];
}

describe('a recorded run', () => {
  it('was found at all', () => expect(FOLDERS.length).toBeGreaterThanOrEqual(280));

  for (const folder of FOLDERS) {
    const expected: Expected = JSON.parse(readFileSync(join(folder, 'expected.json'), 'utf8'));
    it(`${basename(folder)}: ${expected.what}`, () => {
      if (expected.exit === 65) {
        expect(() => openRecordedRun(folder).judge()).toThrow(DomainError);
        for (const word of expected.stderr ?? []) expect(() => openRecordedRun(folder).judge()).toThrow(word);
        return;
      }
      compare(openRecordedRun(folder).judge(), expected);
    });
  }
});

const EXITS = { conforms: 0, 'does-not-conform': 1, 'cannot-tell': 2, pending: 2 };

function compare(evaluation: Evaluation, expected: Expected): void {
  const all = evaluation.parts.flatMap(({ findings }) => findings);
  if (expected.verdict !== undefined) expect(evaluation.verdict).toBe(expected.verdict);
  if (expected.exit !== undefined) expect(EXITS[evaluation.verdict]).toBe(expected.exit);
  compareFindings(all, expected.findings ?? []);
  for (const [name, part] of Object.entries(expected.parts ?? {})) {
    const judged = evaluation.parts.find((one) => one.part === name);
    expect(judged?.verdict, name).toBe(part.verdict);
    compareFindings(judged?.findings ?? [], part.findings);
  }
  if (expected.verdict === 'conforms') expect(all.filter(({ outcome }) => outcome !== 'met')).toEqual([]);
  for (const outcome of expected.notFindings ?? []) expect(all.filter((one) => one.outcome === outcome)).toEqual([]);
  for (const [channel, kind] of Object.entries(expected.faults ?? {})) {
    const sensor = evaluation.sensors.find((one) => one.channel === channel);
    expect(sensor?.faults.map((fault) => fault.kind)).toContain(kind);
  }
  if (expected.repairs) expect(evaluation.log.repairs).not.toEqual([]);
  for (const { channel, degree, tgC, gelAt, within } of expected.cure ?? []) {
    const estimate = evaluation.parts[0]!.cure.find((one) => one.channel === channel)!;
    expect(Math.abs(estimate.degree - degree)).toBeLessThanOrEqual(within.degree);
    expect(Math.abs(estimate.tgC! - tgC)).toBeLessThanOrEqual(within.tgC);
    expect(Math.abs(Date.parse(estimate.gelAt!) - Date.parse(gelAt))).toBeLessThanOrEqual(1000 * within.gelS);
  }
}

function compareFindings(findings: readonly Finding[], expected: readonly ExpectedFinding[]): void {
  for (const one of expected) {
    const found = findings.find(({ limit }) => limit === one.limit);
    expect(found, one.limit).toBeDefined();
    expect({ limit: one.limit, outcome: found!.outcome, because: found!.because }).toMatchObject({
      outcome: one.outcome,
    });
    if (one.observed !== undefined)
      expect(Math.abs(found!.observed! - one.observed)).toBeLessThanOrEqual(one.within! + 1e-9);
    if (one.possible !== undefined)
      expect(Math.abs(found!.possible! - one.possible)).toBeLessThanOrEqual(one.possibleWithin!);
    if (one.margin !== undefined) expect(Math.abs(found!.margin! - one.margin)).toBeLessThanOrEqual(0.02);
    if (one.sensor !== undefined) expect(found!.sensor).toBe(one.sensor);
    expect(found!.because).not.toBe('');
  }
}
