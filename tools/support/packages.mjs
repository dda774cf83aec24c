import { createHash } from 'node:crypto';
import { existsSync, readFileSync, writeFileSync } from 'node:fs';
import path from 'node:path';
import { step } from './say.mjs';

/**
 * Whether what npm says it installed is what the lock file asks for: the same version at every place, and nothing missing
 * but what is optional (binaries for other systems).
 */
export function matchesLock(lock, installed) {
  const isSame = ([place, wanted]) => {
    const found = installed.packages[place];
    return found ? found.version === wanted.version : Boolean(wanted.optional || wanted.devOptional || wanted.peer);
  };
  const wantedPlaces = Object.entries(lock.packages).filter(([place]) => place !== '');
  return wantedPlaces.every(isSame) && Object.keys(installed.packages).every((place) => place in lock.packages);
}

function areInstalled(root, stamp, hash) {
  const hidden = path.join(root, 'node_modules', '.package-lock.json');
  if (!existsSync(hidden)) return false;
  if (existsSync(stamp) && readFileSync(stamp, 'utf8') === hash) return true;
  const read = (file) => JSON.parse(readFileSync(file, 'utf8'));
  return matchesLock(read(path.join(root, 'package-lock.json')), read(hidden));
}

function keepStamp(stamp, hash) {
  try {
    writeFileSync(stamp, hash);
  } catch {
    // Somebody else's checkout: the packages are looked through again next time.
  }
}

/** The npm that runs us, or the one on PATH. */
export function npm(args) {
  const script = process.env.npm_execpath;
  return script && /npm-cli\.c?js$/.test(script)
    ? { command: process.execPath, args: [script, ...args] }
    : { command: 'npm', args };
}

/** Installs the npm packages from the lock file unless they are there. */
export async function ensurePackages(root, programs, log) {
  const stamp = path.join(root, 'node_modules', '.ebbline-lock-hash');
  const hash = createHash('sha256')
    .update(readFileSync(path.join(root, 'package-lock.json')))
    .digest('hex');
  if (areInstalled(root, stamp, hash)) {
    if (!existsSync(stamp) || readFileSync(stamp, 'utf8') !== hash) keepStamp(stamp, hash);
    return;
  }
  await step('Installing the npm packages (npm ci)', () =>
    programs.run({
      name: 'npm ci',
      ...npm(['ci', '--include=dev', '--no-audit', '--no-fund', '--loglevel=error']),
      cwd: root,
      log,
      env: { ...process.env, NODE_ENV: '' },
      timeoutSeconds: 900,
      onFailure:
        'npm ci failed: look at the lines below (is the network there, and can node_modules be written?), then start again.',
    }),
  );
  keepStamp(stamp, hash);
}
