/** How much of a file is read before it is turned away. */
export interface ReadLimits {
  /** Of the file as it came. */
  maxBytes: number;
  /** Of all parts that are read, inflated. */
  maxInflatedBytes: number;
  /** Inflated to compressed, of one part, once it has inflated to 8 MiB. */
  maxCompressionRatio: number;
  /** Cells that hold something, over all sheets. */
  maxCells: number;
  /** Characters in one cell; Excel itself stops at 32,767. */
  maxStringLength: number;
  maxSheets: number;
}

const MIB = 1024 * 1024;

/**
 * The ratio: sheets seen in practice compress 5 to 30 times, one repeated row about 100 times, deflate ends at 1,032.
 * The cells: one sheet, full to its 1,048,576th row, of seven columns. The inflated bytes: as many cells at 50 bytes.
 */
export const DEFAULT_LIMITS: Readonly<ReadLimits> = Object.freeze({
  maxBytes: 30 * MIB,
  maxInflatedBytes: 400 * MIB,
  maxCompressionRatio: 200,
  maxCells: 8_000_000,
  maxStringLength: 32_767,
  maxSheets: 200,
});
