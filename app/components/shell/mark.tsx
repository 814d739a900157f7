/** The mark: a weep under the lamp's cone. */
export function Mark({ className = 'size-8' }: { className?: string }) {
  return (
    <svg viewBox="0 0 32 32" className={className} aria-hidden="true">
      <path d="M3 2h26l-8 13H11Z" className="fill-action" opacity="0.35" />
      <path
        d="M16 8c4.2 6.2 7.5 9.2 7.5 13.500a7.5 7.5 0 0 1-15 0C8.5 17.2 11.8 14.2 16 8Z"
        className="fill-glow stroke-ink"
        strokeWidth="1.5"
      />
      <path
        d="M12.5 22a3.6 3.6 0 0 0 3 3.2"
        fill="none"
        className="stroke-ink"
        strokeWidth="1.5"
        strokeLinecap="round"
      />
    </svg>
  );
}

export function Wordmark() {
  return (
    <span className="inline-flex items-center gap-2 text-xl font-semibold tracking-tight">
      <Mark />
      Weepmark
    </span>
  );
}
