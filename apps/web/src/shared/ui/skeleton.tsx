/** The page's own lines before its words come. Shown only after a moment, so that a quick answer does not flicker. */
export function Skeleton({ lines = 4, label = 'Loading' }: { lines?: number; label?: string }) {
  return (
    <div className="skeleton" role="status" aria-label={label}>
      {Array.from({ length: lines }, (_, index) => (
        <span key={index} className={`skeleton__line skeleton__line--${index % 3}`} />
      ))}
    </div>
  );
}
