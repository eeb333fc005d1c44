/** The folder where an installation keeps what is its own: secrets, database, demo accounts. */
import { randomBytes } from 'node:crypto';
import fs from 'node:fs';
import path from 'node:path';
import { repository } from './processes.mjs';

export const dataFolder = path.resolve(repository, process.env.LINEWRIGHT_DATA ?? '.data');

const makers = {
  SESSION_KEY: () => randomBytes(32).toString('base64url'),
  KEY_PEPPER: () => randomBytes(32).toString('base64url'),
  POSTGRES_PASSWORD: () => randomBytes(24).toString('base64url'),
};

/** Made on the first start and kept: `{ secrets, made }`, made being the names of those that are new. */
export function keepSecrets() {
  fs.mkdirSync(dataFolder, { recursive: true, mode: 0o700 });
  const secrets = readData('secrets.json') ?? {};
  const made = Object.keys(makers).filter((name) => !secrets[name]);
  for (const name of made) secrets[name] = makers[name]();
  if (made.length > 0) writeData('secrets.json', secrets);
  return { secrets, made };
}

/** New ones for one test run, kept nowhere. */
export function newSecrets() {
  return Object.fromEntries(Object.entries(makers).map(([name, make]) => [name, make()]));
}

/** A JSON file of the data folder, or null where there is none. */
export function readData(name) {
  const file = path.join(dataFolder, name);
  return fs.existsSync(file) ? JSON.parse(fs.readFileSync(file, 'utf8')) : null;
}

/** Whole or not at all, and for its owner's eyes only. */
export function writeData(name, value) {
  const file = path.join(dataFolder, name);
  fs.writeFileSync(`${file}.new`, `${JSON.stringify(value, null, 2)}\n`, { mode: 0o600 });
  fs.renameSync(`${file}.new`, file);
}
