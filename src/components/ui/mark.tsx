/** The vessel, its brim, one person inside the order and one outside it. */
export function Mark() {
  return (
    <svg viewBox="0 0 24 24" fill="none" aria-hidden="true" focusable="false">
      <path
        d="M4.5 2.5V17a5.5 5.5 0 0 0 11 0V2.5"
        className="stroke-ink"
        strokeWidth="2.3"
        strokeLinecap="round"
      />
      <path d="M1 9.5h22.5" className="stroke-brim" strokeWidth="2.4" />
      <circle cx="10" cy="5.3" r="1.9" className="fill-ink" />
      <circle cx="20" cy="5.3" r="1.9" className="fill-ink" />
    </svg>
  );
}
