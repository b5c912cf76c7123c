import type { CureThroughPart } from '../actions/ask-thickness.ts';
import type { EstimateCure, EvaluateLog } from '../actions/evaluate-log.ts';
import type { JudgingParts } from '../actions/judge-run.ts';
import type { TraceWork } from '../actions/long-work.ts';
import type { AuditVerification } from '../contract/audit.ts';
import type { LiveEngine } from '../live/engine/live-engine.ts';
import type { LiveLogging } from '../live/live-logging.ts';
import type { RunningSources } from '../live/run-sources.ts';
import type { Telling } from '../live/warnings/tell-outside.ts';

/** What the server is made of. Everything is opened by who makes it. */
export interface AppParts extends JudgingParts {
  /** As `evaluate`, however small the log: for many runs one after another. */
  readonly evaluateAside: EvaluateLog;
  readonly estimateCure: EstimateCure;
  /** What takes scans and keeps them. */
  readonly live: LiveLogging;
  /** What follows the vessels as they go. */
  readonly engine: LiveEngine;
  /** How warnings are told beyond the screen. */
  readonly telling: Telling;
  /** What is listened to. */
  readonly sources: RunningSources;
  readonly cureThroughPart: CureThroughPart;
  readonly trace: TraceWork;
  /** Folder of the built pages; null where none are served. */
  readonly siteFolder: string | null;
  /** Folder an upload is written to while it arrives. */
  readonly incomingFolder: string;
  /** Folder watched for finished files; null where none is. */
  readonly watchedFolder: string | null;
  /** Most bytes an upload may have. */
  readonly mostUploadBytes: number;
  /** Recomputes every hash there is, without anything else waiting for it. */
  readonly verify: () => Promise<AuditVerification>;
  readonly log: { info(facts: object, message: string): void; error(facts: object, message: string): void };
}
