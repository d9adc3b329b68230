/** The mark: a falling stroke that crosses a level and leaves a notch in it. */
export function Mark({ className }: { className?: string }) {
  return (
    <svg viewBox="0 0 48 48" className={className} aria-hidden="true" focusable="false">
      <path d="M3 22.5h7.2l3.4 6H3zM24.2 22.5H45v6H27.8z" fill="currentColor" />
      <path
        d="M10.5 5.5C13 21 21.5 33 41 42.5"
        fill="none"
        stroke="var(--tarn-line)"
        strokeWidth="5.5"
        strokeLinecap="round"
      />
    </svg>
  );
}

export function Wordmark({ className }: { className?: string }) {
  return (
    <span className={className}>
      <span className="inline-flex items-center gap-[0.3em]">
        <Mark className="size-[1.25em]" />
        <span className="font-medium tracking-[-0.03em]">steepfall</span>
      </span>
    </span>
  );
}
