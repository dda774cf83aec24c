import { dictionary } from '@zxcvbn-ts/language-common';
import { DomainError, PASSWORD_MAXIMUM, PASSWORD_MINIMUM } from '@app/contracts';

let common: Set<string> | undefined;

/** The 49,000 most common passwords (zxcvbn-ts, MIT). */
function isCommon(text: string): boolean {
  common ??= new Set(dictionary['passwords-common']);
  return common.has(text);
}

/** Refuses a password that is too short, too long, easily guessed, or the person's own name or address; no rules of composition. */
export function requireGoodPassword(
  password: string,
  person: { name: string; email: string },
  pointer = '/password',
): void {
  const found = weakness(password, person);
  if (found === undefined) return;
  const [code, detail] = found;
  throw new DomainError('invalid', code, detail, [{ pointer, code, detail }]);
}

function weakness(password: string, person: { name: string; email: string }): [string, string] | undefined {
  const length = [...password.normalize('NFKC')].length;
  if (length < PASSWORD_MINIMUM)
    return [
      'password-too-short',
      `Use at least ${PASSWORD_MINIMUM} characters; three or four words are easy to remember. This has ${length}.`,
    ];
  if (length > PASSWORD_MAXIMUM)
    return ['password-too-long', `Use at most ${PASSWORD_MAXIMUM} characters; this has ${length}.`];
  const plain = password.normalize('NFKC').toLowerCase();
  const own = [person.email, person.email.split('@')[0], person.name].map((text) => bare(text)).filter(Boolean);
  if (own.some((text) => isMadeOf(bare(plain), text)))
    return ['password-is-yours', 'Choose something other than your name or e-mail address.'];
  if (isGuessable(plain))
    return ['password-common', 'This is among the first passwords that anybody would try. Choose another.'];
  return undefined;
}

/** In the list as it stands, without digits and signs around it, or as one piece said again and again. */
function isGuessable(plain: string): boolean {
  const core = plain.replace(/^[^\p{L}]+|[^\p{L}]+$/gu, '');
  const pieces = [plain, core, repeated(plain), repeated(core)];
  return isCounted(plain) || new Set(plain).size < 5 || pieces.some((piece) => isCommon(piece));
}

/** Digits that count up or down, over nine too. */
const isCounted = (text: string) =>
  /^\d+$/.test(text) &&
  new Set([...text].slice(1).map((digit, at) => (Number(digit) - Number(text[at]) + 10) % 10)).size === 1;

/** The shortest piece that the text repeats: "abcabcabc" is "abc". */
function repeated(text: string): string {
  for (let size = 1; size <= text.length / 2; size++)
    if (text.length % size === 0 && text.slice(0, size).repeat(text.length / size) === text) return text.slice(0, size);
  return text;
}

const bare = (text: string) => text.toLowerCase().replace(/[^\p{L}\p{N}]/gu, '');

/** Whether nothing but the piece, repeated, and digits around it make up the text. */
const isMadeOf = (text: string, piece: string) => {
  const rest = text.replaceAll(piece, '');
  return rest !== text && /^\d*$/.test(rest);
};
