import type { SpecificationVersionView } from '@app/contracts';
import { appliesWords, limitsWords, sortVersions, statedValue } from './specification-words';

const version = (number: number, validFrom: string, until: string | null): SpecificationVersionView => ({
  id: number,
  version: number,
  validFrom,
  until,
  nominal: 60,
  lower: 58.8,
  upper: 61.2,
  appliesToIndividuals: true,
  proposedBy: 'Ines',
  approvedBy: 'Ada',
  approvedAt: validFrom,
});
const MARCH = '2026-03-01T00:00:00Z';
const MAY = '2026-05-01T00:00:00Z';
const versions = [version(2, MAY, null), version(1, MARCH, MAY)];
const numbers = (found: readonly SpecificationVersionView[]) => found.map((one) => one.version);

test('a version that begins later is not in force yet', () => {
  const { upcoming, inForce, earlier } = sortVersions(versions, Date.parse('2026-04-01T00:00:00Z'));
  expect([numbers(upcoming), inForce?.version, numbers(earlier)]).toEqual([[2], 1, []]);
});

test('at its start it takes over', () => {
  const { upcoming, inForce, earlier } = sortVersions(versions, Date.parse(MAY));
  expect([numbers(upcoming), inForce?.version, numbers(earlier)]).toEqual([[], 2, [1]]);
});

test('before the first nothing is in force', () => {
  expect(sortVersions(versions, Date.parse('2026-01-01T00:00:00Z')).inForce).toBeNull();
  expect(sortVersions([], 0)).toEqual({ upcoming: [], inForce: null, earlier: [] });
});

test('a stated value shows the resolution’s decimals, and never fewer than it has', () => {
  const thickness = { unit: 'µm', resolution: 0.1 };
  expect([statedValue(25, thickness), statedValue(25.05, thickness), statedValue(-0.125, thickness)]).toEqual([
    '25.0\u202fµm',
    '25.05\u202fµm',
    '\u22120.125\u202fµm',
  ]);
  expect(statedValue(7.25, { unit: '', resolution: 0.1 })).toBe('7.25');
});

test('one limit or both are said in words', () => {
  const characteristic = { name: 'Torque', unit: 'N·m', resolution: 0.1 };
  const limits = { nominal: 5, lower: 4.5, upper: 5.5, appliesToIndividuals: false };
  expect(limitsWords(limits, characteristic)).toBe(
    'nominal value 5.0\u202fN·m, specification limits 4.5\u202fN·m and 5.5\u202fN·m',
  );
  expect(limitsWords({ ...limits, upper: null }, characteristic)).toBe(
    'nominal value 5.0\u202fN·m, at least 4.5\u202fN·m',
  );
  expect(limitsWords({ ...limits, lower: null }, characteristic)).toBe(
    'nominal value 5.0\u202fN·m, at most 5.5\u202fN·m',
  );
  expect([appliesWords(limits), appliesWords({ appliesToIndividuals: true })]).toEqual([
    'lot mean only',
    'every reading',
  ]);
});
