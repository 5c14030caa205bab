/** The mark: hatched masonry with its cold face drawn heavy. */
export function Wordmark() {
  return (
    <span className="flex items-center gap-2.5 text-base font-[680] tracking-[-0.01em] [font-stretch:122%]">
      <svg width="20" height="22" viewBox="0 0 20 22" fill="none" aria-hidden="true">
        <path d="M3 8 9 2M3 14 14 3M3 20 14 9M8 20l6-6" stroke="currentColor" strokeWidth="1.3" />
        <path d="M3 1v20" stroke="currentColor" />
        <path d="M15.5 1v20" stroke="var(--cold)" strokeWidth="3.4" />
      </svg>
      Coldface
    </span>
  );
}
