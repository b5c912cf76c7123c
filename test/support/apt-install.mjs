import { execFileSync } from 'node:child_process';
import { accessSync, constants, existsSync } from 'node:fs';
import { platform } from 'node:process';

/** Whether something that can be run stands at a path. */
export function isRunnable(path) {
  try {
    accessSync(path, platform === 'win32' ? constants.F_OK : constants.X_OK);
    return true;
  } catch {
    return false;
  }
}

function canInstall() {
  return platform === 'linux' && process.getuid?.() === 0 && existsSync('/usr/bin/apt-get');
}

/** Installs a Debian package where that is possible, saying what for; what goes wrong is said and left at that. */
export function tryInstalling(debianPackage, whatFor) {
  if (!canInstall()) return;
  say(`${whatFor}; installing it with apt-get.`);
  const apt = (...words) =>
    execFileSync('/usr/bin/apt-get', words, {
      stdio: 'inherit',
      env: { ...process.env, DEBIAN_FRONTEND: 'noninteractive' },
    });
  try {
    apt('update');
    apt('install', '--yes', '--no-install-recommends', debianPackage);
  } catch (error) {
    say(`apt-get could not install it: ${error instanceof Error ? error.message : error}`);
  }
}

export function say(text) {
  process.stdout.write(`${text}\n`);
}
