export type RefusalCode =
  | 'not-excel'
  | 'empty-file'
  | 'password-protected'
  | 'too-large'
  | 'too-many-cells'
  | 'decompression-bomb'
  | 'corrupt'
  | 'old-format';

/** The file as a whole cannot be read. `detail` is a sentence for the person who uploaded it. */
export class WorkbookRefusedError extends Error {
  constructor(
    readonly code: RefusalCode,
    readonly detail: string,
    options?: ErrorOptions,
  ) {
    super(detail, options);
    this.name = 'WorkbookRefusedError';
  }
}
