import { randomBytes } from 'node:crypto';
import { chmodSync, existsSync, mkdirSync, readFileSync, renameSync, rmSync, statSync, writeFileSync } from 'node:fs';
import path from 'node:path';
import { Failure } from './failure.mjs';

/** Node's own recursive mkdir never returns where a file system answers "no such file" (seen in /proc with Node 20). */
function makeFolders(folder) {
  if (existsSync(folder)) return;
  makeFolders(path.dirname(folder));
  mkdirSync(folder);
}

/** Makes the data folder and proves that it can be written. Root's is enterable, since PostgreSQL runs as another user. */
export function openDataFolder(dataDir) {
  if (!existsSync(dataDir)) {
    makeFolders(dataDir);
    chmodSync(dataDir, process.getuid?.() === 0 ? 0o711 : 0o700);
  }
  if (!statSync(dataDir).isDirectory()) {
    throw new Failure(`${dataDir} is a file, not a folder: set EBBLINE_DATA_DIR to another place.`);
  }
  if (process.getuid?.() === 0 && statSync(dataDir).uid !== 0) {
    throw new Failure(
      `${dataDir} belongs to another user, who could not read what root writes into it: start as that user, or set EBBLINE_DATA_DIR.`,
    );
  }
  mkdirSync(path.join(dataDir, 'logs'), { recursive: true, mode: 0o700 });
  const probe = path.join(dataDir, `.probe-${process.pid}`);
  writeFileSync(probe, 'probe');
  rmSync(probe);
}

/** The JSON object in `<dataDir>/<name>`, or an empty one when there is no such file. */
export function readNotes(dataDir, name) {
  const file = path.join(dataDir, name);
  if (!existsSync(file)) return {};
  const text = readFileSync(file, 'utf8');
  try {
    return JSON.parse(text);
  } catch {
    throw new Failure(`${file} cannot be read as JSON: restore it, or start with another EBBLINE_DATA_DIR.`);
  }
}

/** Writes `<dataDir>/<name>` whole or not at all, readable by its owner alone. */
export function writeNotes(dataDir, name, notes) {
  const file = path.join(dataDir, name);
  const next = `${file}.next`;
  writeFileSync(next, `${JSON.stringify(notes, null, 2)}\n`, { mode: 0o600 });
  renameSync(next, file);
}

const secret = (bytes) => randomBytes(bytes).toString('base64url');

/** A password that a person can type: four groups of letters and digits that look like nothing else, 79 bits. */
export function readablePassword() {
  const letters = 'abcdefghjkmnpqrstuvwxyz23456789';
  const take = () =>
    [...randomBytes(64)].filter((byte) => byte < letters.length * 8).map((byte) => letters[byte % letters.length]);
  const text = take().slice(0, 16).join('');
  return text.match(/.{4}/g).join('-');
}

/** The secrets of this installation: read, and those that are missing generated and kept. */
export function readSecrets(dataDir) {
  const kept = readNotes(dataDir, 'secrets.json');
  const secrets = {
    ...kept,
    databasePassword: kept.databasePassword ?? secret(24),
    jwtSecret: kept.jwtSecret ?? secret(48),
  };
  if (!kept.databasePassword || !kept.jwtSecret) writeNotes(dataDir, 'secrets.json', secrets);
  return { ...secrets, isNew: kept.databasePassword === undefined };
}

/** The password with which the demo people are about to be made; kept, since the database holds only its hash. */
export function keepDemoPassword(dataDir, wanted) {
  const kept = readNotes(dataDir, 'secrets.json');
  const demoPassword = wanted ?? kept.demoPassword ?? readablePassword();
  writeNotes(dataDir, 'secrets.json', { ...kept, demoPassword });
  return demoPassword;
}
