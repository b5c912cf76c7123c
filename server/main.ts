#!/usr/bin/env node
import { runCommand } from './command/run-command.ts';

// Whoever reads the output may stop early: `dwellbook check … | head` is no fault.
process.stdout.on('error', (error: NodeJS.ErrnoException) => {
  if (error.code !== 'EPIPE') throw error;
  process.exit();
});

process.exitCode = await runCommand(process.argv.slice(2));
