import { delimiter, join } from 'node:path';
import { pathToFileURL } from 'node:url';
import { isRunnable, say, tryInstalling } from './apt-install.mjs';

/** Where socat stands, which makes the pair of serial lines the Modbus RTU tests need; null where it does not. */
export function findSocat(environment = process.env) {
  const folders = [...(environment.PATH ?? '').split(delimiter), '/usr/bin', '/usr/local/bin', '/opt/homebrew/bin'];
  return (
    folders
      .filter((folder) => folder !== '')
      .map((folder) => join(folder, 'socat'))
      .find(isRunnable) ?? null
  );
}

/** Finds socat, or installs Debian's where that is possible, or says plainly what to do. */
function main() {
  if (findSocat() === null) tryInstalling('socat', 'The tests of serial lines need socat');
  const found = findSocat();
  if (found !== null) {
    say(`Tests of serial lines use ${found}`);
    return 0;
  }
  say('The tests of serial lines need socat, and none was found. Install it');
  say('  (Debian and Ubuntu: sudo apt-get install socat; Fedora: sudo dnf install socat; macOS: brew install socat).');
  return 1;
}

if (process.argv[1] && import.meta.url === pathToFileURL(process.argv[1]).href) process.exitCode = main();
