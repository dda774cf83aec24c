import { DomainError } from '@app/contracts';
import { requireGoodPassword } from './password-rules';

const PERSON = { name: 'Wenna Pascoe-Trevithick', email: 'wenna.pascoe.trevithick@overdale.example' };
const codeOf = (password: string) => {
  try {
    requireGoodPassword(password, PERSON, '/next');
    return 'taken';
  } catch (error) {
    expect((error as DomainError).fields[0].pointer).toBe('/next');
    return (error as DomainError).code;
  }
};

describe('a password', () => {
  it('has 15 characters or more, counted as a person counts them', () => {
    expect(codeOf('fourteen-chars')).toBe('password-too-short');
    expect(codeOf('fifteen chars ok')).toBe('taken');
    expect(codeOf('🐟🐠🐡🦈🐙🦀🦞')).toBe('password-too-short');
    expect(codeOf(`sea ${'x'.repeat(1020)}y`)).toBe('password-too-long');
  });

  it('needs no capitals, digits or signs, and takes any', () => {
    for (const password of [
      'tide table at noon',
      'ÆGIR OG RÁN Á HAFI',
      '潮汐表は正午に海の向こうから来る',
      '7#fQ!z09@kLw2$xT',
    ])
      expect(codeOf(password)).toBe('taken');
  });

  it('is not one that everybody tries, dressed up or said twice', () => {
    for (const password of [
      'passwordpassword',
      'PASSWORD12345678!',
      '1234567890123456',
      '9876543210987654',
      'aaaaaaaaaaaaaaaaaaa',
      'qwertyqwertyqwerty',
      '123-administrator-2026',
      'ababababababababab',
    ])
      expect(codeOf(password)).toBe('password-common');
  });

  it('is not the person’s own name or address', () => {
    for (const password of [
      'wenna.pascoe.trevithick',
      'Wenna Pascoe-Trevithick1',
      PERSON.email,
      'wennapascoetrevithick99',
    ])
      expect(codeOf(password)).toBe('password-is-yours');
    expect(codeOf('wenna keeps bees in june')).toBe('taken');
  });
});
