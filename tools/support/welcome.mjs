import { say } from './say.mjs';

const PEOPLE = [
  ['engineer', 'quality engineer'],
  ['engineer2', 'a second quality engineer'],
  ['manager', 'quality manager'],
  ['lead', 'line lead'],
  ['technician', 'metrology technician'],
  ['director', 'plant director'],
  ['admin', 'administrator'],
];

function signIns({ isDemo, demoPassword, settings }) {
  if (!isDemo) return ['  Sign in    no demo people here: this data folder began with EBBLINE_SEED=empty'];
  const isOther = settings.demoPassword !== undefined && settings.demoPassword !== demoPassword;
  return [
    ...PEOPLE.map(
      ([name, role], i) => `  ${i === 0 ? 'Sign in' : '       '}    ${`${name}@marrowby.example`.padEnd(30)}${role}`,
    ),
    `  Password   ${demoPassword}   (the same for all of them)`,
    ...(isOther
      ? ['             EBBLINE_DEMO_PASSWORD is not used: these people were made at the first start with the one above']
      : []),
  ];
}

/** Says where everything is. */
export function sayWelcome(trial, took) {
  const { settings, ports } = trial;
  say(
    [
      '',
      `Ebbline is ready (${took}).`,
      '',
      `  Address    http://127.0.0.1:${settings.port}`,
      ...signIns(trial),
      `  Mail       http://127.0.0.1:${ports.mailPage}   (every mail is kept here, none is delivered)`,
      `  Data       ${settings.dataDir}   (logs in logs/)`,
      '',
      'Ctrl-C ends everything.',
    ].join('\n'),
  );
}
