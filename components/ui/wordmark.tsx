/**
 * Our mark: a sheet under its clip, a part punched through it, and the tick that proves it. The hole shows the
 * ground, so it works on paper, on a sheet and in print.
 */
function HouseMark({ className = "size-7" }: { className?: string }) {
  return (
    <svg viewBox="0 0 28 28" aria-hidden="true" className={`shrink-0 fill-current text-petrol ${className}`}>
      <path d="M3 1h22v4H3Z" />
      <path fillRule="evenodd" d="M3 7h22v20H3Zm11 2-7 4v8l7 4 7-4v-8Z" />
      <path d="m10.4 17 2.7 2.7 4.6-5" className="fill-none stroke-current" strokeWidth="2.2" />
    </svg>
  );
}

/** The name as it stands in the head of every page. */
export function Wordmark() {
  return (
    <span translate="no" className="inline-flex items-center gap-2.5">
      <HouseMark />
      <span className="font-heading text-20 leading-none font-semibold tracking-[-0.01em] text-ink max-[24rem]:hidden">
        Partproof
      </span>
    </span>
  );
}
