import { accessSync, constants } from 'node:fs';
import { delimiter, join } from 'node:path';
import { installPackages } from './machine.mjs';
import { Halt } from './halt.mjs';
import { run } from './run.mjs';

const missing =
  'The browser journeys need Chromium, which is not installed and can’t be installed from here: install it (on Debian: sudo apt-get install chromium), or set CHROMIUM to its program, and run the tests again.';

/** @param {string} file */
function runnable(file) {
  try {
    accessSync(file, constants.X_OK);
    return true;
  } catch {
    return false;
  }
}

/** The browser's program, or undefined when this machine has none. @returns {string | undefined} */
export function findChromium() {
  const { CHROMIUM, PATH = '' } = process.env;
  const folders = ['/usr/bin', ...PATH.split(delimiter).filter((folder) => folder !== '')];
  const named = folders.flatMap((folder) =>
    ['chromium', 'chromium-browser'].map((name) => join(folder, name)),
  );
  return [...(CHROMIUM ? [CHROMIUM] : []), ...named].find(runnable);
}

/** The browser's program, installed from Debian's packages when there is none. @param {(text: string) => void} note */
export async function chromium(note) {
  const found = findChromium();
  if (found) return found;
  note('installing Debian’s package');
  await installPackages(['chromium', 'fonts-liberation'], missing, run);
  const installed = findChromium();
  if (!installed) throw new Halt(missing);
  return installed;
}
