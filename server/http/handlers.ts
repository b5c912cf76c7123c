import { askHandlers } from './ask-handlers.ts';
import { cycleHandlers } from './cycle-handlers.ts';
import type { Handlers } from './handler.ts';
import { importHandlers } from './import-handlers.ts';
import { instrumentHandlers } from './instrument-handlers.ts';
import { labelHandlers } from './label-handlers.ts';
import { liveHandlers } from './live-handlers.ts';
import { liveRunHandlers } from './live-run-handlers.ts';
import { materialHandlers } from './material-handlers.ts';
import { paperHandlers } from './paper-handlers.ts';
import { partHandlers } from './part-handlers.ts';
import { runHandlers } from './run-handlers.ts';
import { senderHandlers } from './sender-handlers.ts';
import { sourceHandlers } from './source-handlers.ts';
import { tableHandlers } from './table-handlers.ts';
import { toolHandlers } from './tool-handlers.ts';
import { traceHandlers } from './trace-handlers.ts';
import { warningHandlers } from './warning-handlers.ts';
import { workshopHandlers } from './workshop-handlers.ts';

/** One handler for every operation of the contract: one that lacks does not compile. */
export const HANDLERS: Handlers = {
  ...workshopHandlers,
  ...importHandlers,
  ...runHandlers,
  ...cycleHandlers,
  ...partHandlers,
  ...toolHandlers,
  ...labelHandlers,
  ...tableHandlers,
  ...paperHandlers,
  ...traceHandlers,
  ...materialHandlers,
  ...instrumentHandlers,
  ...askHandlers,
  ...liveRunHandlers,
  ...senderHandlers,
  ...sourceHandlers,
  ...liveHandlers,
  ...warningHandlers,
};
