import { readdirSync, readFileSync } from 'node:fs';
import { join, relative } from 'node:path';

const SOURCE = join(__dirname, '..');
const RAW_COLOUR = /#[0-9a-f]{3,8}\b|\b(?:rgb|rgba|hsl|hsla|oklch|oklab|lab|lch)\(/gi;
/** A hash that begins no colour: a private field, a fragment of an address. */
const NO_COLOUR = /^#(?:[0-9a-f]{3,8})$/i;

function sources(): string[] {
  return readdirSync(SOURCE, { recursive: true, encoding: 'utf8' })
    .filter((name) => /\.(tsx?|css)$/.test(name) && !/\.spec\.tsx?$/.test(name))
    .map((name) => join(SOURCE, name));
}

function coloursIn(text: string): string[] {
  return [...text.matchAll(RAW_COLOUR)]
    .map((match) => match[0])
    .filter((found) => !found.startsWith('#') || (NO_COLOUR.test(found) && [4, 5, 7, 9].includes(found.length)));
}

test('the scan finds a raw colour when there is one', () => {
  expect(coloursIn('a { color: #a83a16; background: rgb(1 2 3) }')).toEqual(['#a83a16', 'rgb(']);
});

test('only theme/base.css knows a colour', () => {
  const offenders = sources()
    .filter((path) => relative(SOURCE, path) !== join('theme', 'base.css'))
    .flatMap((path) => coloursIn(readFileSync(path, 'utf8')).map((colour) => `${relative(SOURCE, path)}: ${colour}`));
  expect(offenders).toEqual([]);
});

test('only theme/functional.css reads the raw palette', () => {
  const offenders = sources()
    .filter((path) => !/theme[\\/](base|functional)\.css$/.test(path))
    .filter((path) => /var\(--(day|night)-/.test(readFileSync(path, 'utf8')))
    .map((path) => relative(SOURCE, path));
  expect(offenders).toEqual([]);
});
