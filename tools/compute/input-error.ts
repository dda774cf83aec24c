/** What the user gave cannot be computed: one line that names the option or the row. Exit status 2. */
export class InputError extends Error {
  constructor(message: string) {
    super(message.replace(/\s+/g, ' '));
    this.name = 'InputError';
  }
}

/** A piece of the user's input as it may stand in a message: one line, not long. */
export const quoted = (text: string): string => {
  const plain = text.replace(/\s+/g, ' ');
  return `'${plain.length > 40 ? `${plain.slice(0, 37)}…` : plain}'`;
};
