/** Why a row gives no reading; thrown away with the row, never with the file. */
export class RowNotUsed {
  constructor(
    readonly code: string,
    readonly why: string,
    readonly column?: number,
  ) {}
}
