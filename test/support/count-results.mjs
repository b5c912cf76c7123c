// Adds up the results vitest wrote as JSON and prints them on one line; fails where a result is missing or nothing passed.
import { readFileSync } from 'node:fs';

const results = process.argv.slice(2).map((path) => JSON.parse(readFileSync(path, 'utf8')));
const sum = (key) => results.reduce((total, result) => total + result[key], 0);
const passed = sum('numPassedTests');
const broken = results.filter(({ success, numFailedTests }) => !success && numFailedTests === 0).length;
const failed = sum('numFailedTests') + broken;
console.log(`${passed} passed, ${failed} failed, ${sum('numPendingTests') + sum('numTodoTests')} skipped`);
process.exit(passed === 0 || failed > 0 ? 1 : 0);
