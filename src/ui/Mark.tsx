/** The mark: an L turned to lie along the edge, the board in section. */
export function Mark({ size = 22 }: { size?: number }) {
  return (
    <svg viewBox="0 0 24 24" width={size} height={size} aria-hidden className="text-chalk">
      <path d="M3 4v16h18" fill="none" stroke="currentColor" strokeWidth="5" />
    </svg>
  );
}
