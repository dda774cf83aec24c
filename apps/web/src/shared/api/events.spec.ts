import { eventParser } from './events';

function parsed(...pieces: string[]): string[] {
  const found: string[] = [];
  const parse = eventParser((data) => found.push(data));
  pieces.forEach((piece) => parse(piece));
  return found;
}

test('an event is told when its empty line comes', () => {
  expect(parsed('data: {"a":1}\n')).toEqual([]);
  expect(parsed('data: {"a":1}\n\n')).toEqual(['{"a":1}']);
});

test('pieces may break anywhere, and lines may end in any of the three ways', () => {
  expect(parsed('da', 'ta: on', 'e\n', '\nda', 'ta:two\n\n')).toEqual(['one', 'two']);
  expect(parsed('data: one\r', '\n\r\n')).toEqual(['one']);
  expect(parsed('data: one\r\rdata: two\r\r\n')).toEqual(['one', 'two']);
});

test('several data lines are one event; comments and other fields say nothing', () => {
  expect(parsed(': still here\n\nid: 3\nevent: progress\ndata: a\ndata: b\n\n')).toEqual(['a\nb']);
});
