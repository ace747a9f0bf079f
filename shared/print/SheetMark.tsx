/** The mark: an L turned to lie along the edge, the board in section. */
export function SheetMark() {
  return (
    <svg className="mark" viewBox="0 0 24 24" width="20" height="20" aria-hidden="true">
      <path d="M3 5v14h18" fill="none" stroke="currentColor" strokeWidth="4" />
    </svg>
  );
}
