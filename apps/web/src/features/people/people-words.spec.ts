import type { PersonView } from '@app/contracts';
import { lineWords, roleWords, stateWords } from './people-words';

const person: PersonView = {
  id: 4,
  name: 'Wenna Pascoe',
  email: 'wenna@overdale.example',
  roles: ['engineer', 'line_lead'],
  lineIds: [2],
  state: 'invited',
  invitedUntil: '2026-03-18T12:00:00.000Z',
};
const now = Date.parse('2026-03-11T12:00:00Z');

test('a person’s roles, lines and state are said in words, in the plant’s zone', () => {
  expect(roleWords(person)).toBe('quality engineer, line lead');
  const lines = [
    { id: 1, name: 'Kiln 1', plantId: 1, heldCount: 0 },
    { id: 2, name: 'Press 4', plantId: 1, heldCount: 0 },
  ];
  expect(lineWords(person, lines)).toBe('Press 4');
  expect(lineWords({ ...person, lineIds: [] }, lines)).toBe('none');
  expect(stateWords(person, 'Europe/Helsinki', now)).toBe('invited until 18 Mar 14:00');
  expect(stateWords(person, 'Europe/Helsinki', now + 8 * 86_400_000)).toBe('invitation expired 18 Mar 14:00');
  expect(stateWords({ ...person, invitedUntil: null }, 'UTC', now)).toBe('invited; the link has ended');
  expect(stateWords({ ...person, state: 'disabled', invitedUntil: null }, 'UTC', now)).toBe('disabled');
});
