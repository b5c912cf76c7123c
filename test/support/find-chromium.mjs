import { platform } from 'node:process';
import { pathToFileURL } from 'node:url';
import { isRunnable, say, tryInstalling } from './apt-install.mjs';

const PLACES = {
  linux: [
    '/usr/bin/chromium',
    '/usr/bin/chromium-browser',
    '/usr/bin/google-chrome',
    '/usr/bin/google-chrome-stable',
    '/usr/bin/microsoft-edge',
    '/opt/google/chrome/chrome',
    '/snap/bin/chromium',
  ],
  darwin: [
    '/Applications/Chromium.app/Contents/MacOS/Chromium',
    '/Applications/Google Chrome.app/Contents/MacOS/Google Chrome',
    '/Applications/Microsoft Edge.app/Contents/MacOS/Microsoft Edge',
  ],
  win32: [
    'C:/Program Files/Google/Chrome/Application/chrome.exe',
    'C:/Program Files (x86)/Google/Chrome/Application/chrome.exe',
    'C:/Program Files (x86)/Microsoft/Edge/Application/msedge.exe',
  ],
};

/** Where a Chromium stands that the browser tests can drive; null where none does. `CHROMIUM_PATH` comes first. */
export function findChromium(environment = process.env) {
  const named = environment.CHROMIUM_PATH;
  if (named) return isRunnable(named) ? named : null;
  return (PLACES[platform] ?? []).find(isRunnable) ?? null;
}

/** Finds Chromium, or installs Debian's where that is possible, or says plainly what to do. */
function main() {
  const named = process.env.CHROMIUM_PATH;
  if (named && !isRunnable(named)) {
    say(`CHROMIUM_PATH is ${named}, but nothing that can be run stands there.`);
    say('Set it to the full path of Chromium, Chrome or Edge, or unset it to have the usual places looked through.');
    return 1;
  }
  if (findChromium() === null) tryInstalling('chromium', 'The browser tests need Chromium');
  const found = findChromium();
  if (found !== null) {
    say(`Browser tests use ${found}`);
    return 0;
  }
  say('The browser tests need Chromium, Chrome or Edge, and none was found in the usual places. Either');
  say('  install one (Debian and Ubuntu: sudo apt-get install chromium; Fedora: sudo dnf install chromium;');
  say('  macOS: brew install --cask chromium; Windows: winget install Google.Chrome), or');
  say('  name one that is elsewhere: CHROMIUM_PATH=/path/to/chromium npm test');
  return 1;
}

if (process.argv[1] && import.meta.url === pathToFileURL(process.argv[1]).href) process.exitCode = main();
