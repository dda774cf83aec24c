import { loggedPath } from './logged-path';

test('a log line has the path, but neither its query nor what opens a mailed link', () => {
  expect(loggedPath('/api/lots/12?text=24117')).toBe('/api/lots/12');
  expect(loggedPath('/api/auth/links/Zm9yIHRlc3Rz')).toBe('/api/auth/links/…');
  expect(loggedPath('/invitation/Zm9yIHRlc3Rz?x=1')).toBe('/invitation/…');
  expect(loggedPath('/password/Zm9yIHRlc3Rz')).toBe('/password/…');
  expect(loggedPath('/api/auth/password-reset')).toBe('/api/auth/password-reset');
});
