/** Grey lines in the place of what is still on its way. */
export function Skeleton({ lines = 3, label }: { lines?: number; label: string }) {
  return (
    <div role="status" className="space-y-3 py-2">
      <span className="sr-only">{label}</span>
      {Array.from({ length: lines }, (_, line) => `line-${line}`).map((key) => (
        <div key={key} aria-hidden className="space-y-2">
          <div className="h-4 w-3/4 animate-pulse rounded bg-raised" />
          <div className="h-3 w-full animate-pulse rounded bg-raised" />
        </div>
      ))}
    </div>
  );
}
