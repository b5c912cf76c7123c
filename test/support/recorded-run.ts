import { existsSync, readFileSync } from 'node:fs';
import { join } from 'node:path';
import { parseResin } from '../../models/cure/parse-resin.ts';
import { parseCycle } from '../../models/cycle/parse-cycle.ts';
import type { Evaluation } from '../../models/evaluation/evaluation.ts';
import { evaluateLog, type JudgementInputs } from '../../models/evaluation/judge.ts';
import type { Layout } from '../../models/log/layout.ts';
import { parseLayout } from '../../models/log/parse-layout.ts';
import { readLog } from '../../models/log/read-log.ts';
import type { ReadLog } from '../../models/log/readings.ts';
import { parseExclusion, parseLoad } from '../../models/run/parse-load.ts';

/** A recorded run with an outcome known by construction: a folder of `test/golden`. */
export interface RecordedRun {
  readonly layout: Layout;
  readonly inputs: JudgementInputs;
  read(): ReadLog;
  judge(): Evaluation;
}

export function openRecordedRun(folder: string): RecordedRun {
  const json = (name: string): unknown => {
    const path = join(folder, name);
    return existsSync(path) ? JSON.parse(readFileSync(path, 'utf8')) : undefined;
  };
  const optional = <T>(name: string, parse: (document: unknown) => T): T | null => {
    const document = json(name);
    return document === undefined ? null : parse(document);
  };
  const args = (json('args.json') ?? []) as string[];
  const option = (name: string): string | null => {
    const at = args.indexOf(name);
    return at < 0 ? null : (args[at + 1] ?? null);
  };
  const excluded = args.filter((_, i) => args[i - 1] === '--exclude');
  const layout = parseLayout(json('layout.json'));
  const inputs: JudgementInputs = {
    cycle: parseCycle(json('cycle.json')),
    load: optional('load.json', parseLoad),
    resin: optional('resin.json', parseResin),
    exclusions: excluded.map(parseExclusion),
    barometer: option('--barometer'),
    open: args.includes('--open'),
  };
  const read = () => readLog([{ name: 'run.csv', chunks: [readFileSync(join(folder, 'run.csv'))] }], layout);
  return { layout, inputs, read, judge: () => evaluateLog(read(), inputs) };
}
