import type { Send } from '../api/use-send';
import { EndQuestion, Hindrance } from './end-question';
import type { RowAction } from './row-table';

interface Retirable {
  name: string;
  isRetired: boolean;
  /** Where the thing is changed. */
  path: string;
  /** What follows when it is retired. */
  consequence: string;
  /** Why it cannot be retired now. */
  hindrance?: string;
}

/** Retiring a thing, or bringing it back: nothing is ever deleted. */
export function retiring(send: Send, { name, isRetired, path, consequence, hindrance }: Retirable): RowAction {
  const words = isRetired ? 'Bring back' : 'Retire';
  return {
    words,
    label: `${words} ${name}`,
    panel: (onDone) =>
      hindrance !== undefined && !isRetired ? (
        <Hindrance sentence={hindrance} onDone={onDone} />
      ) : (
        <EndQuestion
          sentence={isRetired ? `${name} can be used again from then on.` : consequence}
          words={`${words} ${name}`}
          onConfirm={() => send('PATCH', path, { isRetired: !isRetired })}
          onDone={onDone}
        />
      ),
  };
}
