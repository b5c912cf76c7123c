import { parseResin } from '../../models/cure/parse-resin.ts';
import { parseCycle } from '../../models/cycle/parse-cycle.ts';
import type { Evaluation, Verdict } from '../../models/evaluation/evaluation.ts';
import { evaluateLog } from '../../models/evaluation/judge.ts';
import { parseLayout } from '../../models/log/parse-layout.ts';
import { readLog } from '../../models/log/read-log.ts';
import { parseBarometer, parseExclusion, parseLoad } from '../../models/run/parse-load.ts';
import { openLog } from '../files/open-log.ts';
import { oneHash, sha256OfDocument } from '../store/canonical.ts';
import { evaluationTable } from './evaluation-table.ts';
import { readDocumentFile } from './read-document.ts';
import { asUsage, type Command, needed, readWords, wrongUsage } from './usage.ts';

const HELP = `Usage: dwellbook check --log RUN.csv --layout LAYOUT.json --cycle CYCLE.json [OPTIONS]

Judges a logged run against every limit of a cycle.

  --log FILE         the recorder's file; several times for the pieces of one run
  --layout FILE      how the file is to be read (dwellbook-layout/1)
  --cycle FILE       what was asked (dwellbook-cycle/1)
  --load FILE        who was where (dwellbook-load/1)
  --resin FILE       the resin set the cycle estimates with (dwellbook-resin/1)
  --exclude WORDS    a sensor not to be believed from an instant on, as
                     "TC4@2026-03-02T10:22:00Z:open circuit (inspector 2)"; may be given several times
  --barometer WORDS  ambient pressure during the run, as "1009 mbar"
  --open             the run goes on: what has not ended yet is pending
  --json             prints the evaluation (dwellbook-evaluation/1) instead of a table

Exit status: 0 conforms, 1 does not conform, 2 cannot tell or pending, 64 wrong usage, 65 the input cannot be read
or used, 70 a fault of the program itself.
`;

const EXIT_OF_VERDICT: Readonly<Record<Verdict, number>> = {
  conforms: 0,
  'does-not-conform': 1,
  'cannot-tell': 2,
  pending: 2,
};

export const checkCommand: Command = {
  help: HELP,
  async run(args) {
    const { values, positionals } = readWords('check', args, {
      log: { type: 'string', multiple: true },
      layout: { type: 'string' },
      cycle: { type: 'string' },
      load: { type: 'string' },
      resin: { type: 'string' },
      exclude: { type: 'string', multiple: true },
      barometer: { type: 'string' },
      open: { type: 'boolean' },
      json: { type: 'boolean' },
    });
    if (positionals.length > 0) throw wrongUsage('check', `"${positionals[0]}" is not expected`);
    const logs = values.log ?? [];
    needed('check', 'log', logs[0]);
    const layout = await readDocumentFile(needed('check', 'layout', values.layout), parseLayout);
    const cycle = await readDocumentFile(needed('check', 'cycle', values.cycle), parseCycle);
    const load = values.load === undefined ? null : await readDocumentFile(values.load, parseLoad);
    const resin = values.resin === undefined ? null : await readDocumentFile(values.resin, parseResin);
    const exclusions = (values.exclude ?? []).map((words) => asUsage('check', 'exclude', () => parseExclusion(words)));
    const barometer = values.barometer ?? null;
    if (barometer !== null) asUsage('check', 'barometer', () => parseBarometer(barometer));
    const files = await Promise.all(logs.map((path) => openLog(path, path)));
    const log = readLog(files, layout);
    const judged = evaluateLog(log, {
      cycle,
      load,
      resin,
      exclusions,
      barometer,
      open: values.open ?? false,
    });
    const evaluation: Evaluation = {
      ...judged,
      log: { ...judged.log, sha256: oneHash(files.map((file) => file.sha256())) },
      cycle: { ...judged.cycle, sha256: sha256OfDocument(cycle) },
    };
    process.stdout.write(values.json ? `${JSON.stringify(evaluation, null, 1)}\n` : evaluationTable(evaluation, cycle));
    return EXIT_OF_VERDICT[evaluation.verdict];
  },
};
