/** Where a key leads from the lot at `index` of `count`; null when the key is not one of the tape's. */
export function steppedIndex(key: string, index: number, count: number): number | null {
  if (count === 0 || index < 0) return null;
  switch (key) {
    case 'ArrowLeft':
      return Math.max(0, index - 1);
    case 'ArrowRight':
      return Math.min(count - 1, index + 1);
    case 'Home':
      return 0;
    case 'End':
      return count - 1;
    default:
      return null;
  }
}
