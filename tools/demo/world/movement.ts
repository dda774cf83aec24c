import { lotMeanSd } from './scatter';

const DAY = 86400;

/** One way in which a channel's values move with time. */
export interface DemoMovement {
  line: string;
  channel: string;
  belongsTo: 'gauge' | 'process';
  cause: string;
  /** What it adds to a reading at an instant (s), in the characteristic's unit. */
  valueAt: (at: number) => number;
}

/** The instants at which movements begin and end, all s. */
export interface MovementInstants {
  startsAt: number;
  endsAt: number;
  firstWipeAt: number;
  secondWipeAt: number;
  adjustmentAt: number;
  processShiftAt: number;
  processShiftSizeInLotSds: number;
}

/** A layer that grows from `from` on and has `size` at `at`, until it is gone at `until`. */
function growing(from: number, at: number, until: number, size: number, exponent: number) {
  return (t: number): number => (t < from || t >= until ? 0 : size * ((t - from) / (at - from)) ** exponent);
}

/** Moves from 0 at `from` by `size` until `to`, and on at the same rate; starts afresh at `until`. */
function creeping(from: number, to: number, until: number, size: number) {
  return (t: number): number => (t < from || t >= until ? 0 : (size * (t - from)) / (to - from));
}

/** A slow wave about zero. */
function wave(from: number, days: number, amplitude: number, phase: number) {
  return (t: number): number => amplitude * Math.sin((2 * Math.PI * (t - from)) / (days * DAY) + phase);
}

/** Highest at 15:00 UTC, lowest at 03:00. */
function daily(amplitude: number) {
  return (t: number): number => amplitude * Math.cos((2 * Math.PI * (t - 15 * 3600)) / DAY);
}

/** Every movement of every channel. Sizes are set in lot-mean standard deviations, so that they compare across channels. */
export function movementsOf(when: MovementInstants): DemoMovement[] {
  const { startsAt: start, endsAt: end, firstWipeAt, secondWipeAt, adjustmentAt, processShiftAt } = when;
  const list: DemoMovement[] = [];
  const add = (
    belongsTo: 'gauge' | 'process',
    line: string,
    channel: string,
    cause: string,
    valueAt: (t: number) => number,
  ): void => {
    list.push({ line, channel, belongsTo, cause, valueAt });
  };
  const never = Infinity;
  const sd = lotMeanSd;

  const weight = sd('Coater 2', 'Coat weight');
  const dirt = [
    growing(firstWipeAt - 10 * DAY, firstWipeAt, firstWipeAt, 4 * weight, 2),
    growing(secondWipeAt - 11.5 * DAY, secondWipeAt, secondWipeAt, 6 * weight, 1.2),
    growing(end - 10 * DAY, end, never, 4.8 * weight, 1.2),
  ];
  add('gauge', 'Coater 2', 'Coat weight', 'dirt on the window', (t) => dirt[0](t) + dirt[1](t) + dirt[2](t));
  add('gauge', 'Coater 2', 'Coat weight', 'source decay', creeping(start, end, never, 2 * weight));
  add('process', 'Coater 2', 'Coat weight', 'slow movement of the process', wave(start, 14, 0.35 * weight, 0.8));

  const web = sd('Coater 2', 'Web thickness');
  add('gauge', 'Coater 2', 'Web thickness', 'daily temperature swing', daily(0.05));
  add('process', 'Coater 2', 'Web thickness', 'slow movement of the process', wave(start, 12, 0.6 * web, 2.1));
  const oven = sd('Coater 2', 'Oven exit temperature');
  add('process', 'Coater 2', 'Oven exit temperature', 'daily temperature swing', daily(0.5));
  add('process', 'Coater 2', 'Oven exit temperature', 'slow movement of the process', wave(start, 16, 0.7 * oven, 4));

  const thickness = sd('Calender 1', 'Thickness');
  const step = when.processShiftSizeInLotSds * thickness;
  add('process', 'Calender 1', 'Thickness', 'sustained shift', (t) => (t < processShiftAt ? 0 : step));
  add('process', 'Calender 1', 'Thickness', 'slow movement of the process', wave(start, 17, 0.5 * thickness, 1.3));
  const force = sd('Calender 1', 'Nip force');
  add('gauge', 'Calender 1', 'Nip force', 'creep of the load cell', creeping(start, end, never, -2.5 * force));
  add('process', 'Calender 1', 'Nip force', 'slow movement of the process', wave(start, 13, 0.4 * force, 5.2));

  const viscosity = sd('Slurry 3', 'Viscosity');
  add(
    'gauge',
    'Slurry 3',
    'Viscosity',
    'film on the sensor',
    creeping(start, adjustmentAt, adjustmentAt, -4.2 * viscosity),
  );
  add('gauge', 'Slurry 3', 'Viscosity', 'film on the sensor', creeping(adjustmentAt, end, never, -2.6 * viscosity));
  add('process', 'Slurry 3', 'Viscosity', 'slow movement of the process', wave(start, 15, 0.5 * viscosity, 3.3));
  add('gauge', 'Slurry 3', 'pH', 'ageing of the electrode', creeping(start, end, never, -3 * sd('Slurry 3', 'pH')));
  const density = sd('Slurry 3', 'Density');
  add('process', 'Slurry 3', 'Density', 'slow movement of the process', wave(start, 19, 0.8 * density, 0.2));
  return list;
}
