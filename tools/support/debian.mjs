import { existsSync } from 'node:fs';
import { Failure } from './failure.mjs';
import { step } from './say.mjs';

/** The first file of this name on PATH, or undefined. */
export function onPath(name, pathVariable = process.env.PATH ?? '') {
  const folder = pathVariable.split(':').find((entry) => entry.startsWith('/') && existsSync(`${entry}/${name}`));
  return folder && `${folder}/${name}`;
}

/** The one command that installs these Debian packages. */
export const installCommand = (names) =>
  `apt-get update && apt-get install -y --no-install-recommends ${names.join(' ')}`;

/** Installs Debian packages when we may; otherwise stops and says the one command that does. */
export async function installFromDebian(names, why, programs, log) {
  if (!onPath('apt-get')) {
    throw new Failure(`${why} Install ${names.join(' and ')} with this system's own package manager and start again.`);
  }
  const command = installCommand(names);
  if (process.getuid() !== 0) {
    throw new Failure(
      `${why} This user may not install it. Run once:\n\n  sudo sh -c '${command}'\n\nand start again.`,
    );
  }
  await step(`Installing ${names.join(', ')} from Debian's packages`, () =>
    programs.run({
      name: 'apt-get',
      command: 'sh',
      args: ['-c', command],
      log,
      env: { ...process.env, DEBIAN_FRONTEND: 'noninteractive' },
      timeoutSeconds: 600,
      onFailure: `${why} Installing it failed: look at the lines below, or run \`${command}\` by hand and start again.`,
    }),
  );
}
