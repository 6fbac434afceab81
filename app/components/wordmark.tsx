/** The product's name as it is always written: two words parted by one kerf. */
export function Wordmark() {
  return (
    <span className="measure inline-flex items-stretch text-lead leading-6 font-semibold text-ink">
      <span aria-hidden="true">kerf</span>
      <svg aria-hidden="true" width="9" height="24" className="shrink-0 overflow-visible">
        <line x1="4.5" x2="4.5" y1="1" y2="23" className="stroke-blue" strokeWidth="1.5" />
      </svg>
      <span aria-hidden="true">post</span>
      <span className="sr-only">Kerfpost</span>
    </span>
  );
}
