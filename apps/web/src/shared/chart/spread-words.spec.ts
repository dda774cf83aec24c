import { spreadWords } from './spread-words';

describe('spreadWords', () => {
  it('leaves words alone that do not touch', () => {
    expect(spreadWords([10, 50, 90], 14, 0, 100)).toEqual([10, 50, 90]);
  });

  it('parts words that touch and answers in the order given', () => {
    expect(spreadWords([52, 50], 14, 0, 100)).toEqual([64, 50]);
  });

  it('keeps words inside the pane', () => {
    expect(spreadWords([-20, 120], 14, 0, 100)).toEqual([0, 100]);
    expect(spreadWords([96, 99], 14, 0, 100)).toEqual([86, 100]);
  });

  it('packs from the top when they do not fit, and is empty for none', () => {
    expect(spreadWords([5, 5, 5], 10, 0, 15)).toEqual([0, 10, 20]);
    expect(spreadWords([], 10, 0, 15)).toEqual([]);
  });
});
