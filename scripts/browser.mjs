/** The browser that people's stories are played in: Debian's Chromium, or one that is here already. */
import fs from 'node:fs';
import path from 'node:path';
import { installPackage } from './debian.mjs';
import { StepFailure } from './steps.mjs';

const programs = ['chromium', 'chromium-browser', 'google-chrome'];

export async function provideBrowser() {
  if (!findBrowser()) await installPackage('chromium');
  const found = findBrowser();
  if (!found) throw new StepFailure(`None of ${programs.join(', ')} is in PATH; say where one is with CHROMIUM_PATH.`);
  return { path: found, said: found };
}

function findBrowser() {
  if (process.env.CHROMIUM_PATH) return process.env.CHROMIUM_PATH;
  return (process.env.PATH ?? '')
    .split(path.delimiter)
    .flatMap((folder) => programs.map((program) => path.join(folder, program)))
    .find((file) => fs.existsSync(file));
}
