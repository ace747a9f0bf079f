import { type Band, bandNames, bandOf, type Matrix, type Rating } from '#shared/risk/matrix.ts';

const looks: Record<Band, string> = {
  low: 'band-low',
  moderate: 'band-moderate',
  high: 'band-high',
  extreme: 'band-extreme',
};

/** A band in its word and pattern, with the rating behind it. */
export function RiskBand({ rating, matrix }: { rating: Rating | null; matrix: Matrix }) {
  const band = rating && bandOf(matrix, rating);
  if (!rating || !band)
    return (
      <span className="rounded border border-dashed border-line px-1.5 text-sm text-line">not rated</span>
    );
  return (
    <span
      className={`inline-flex gap-1.5 rounded border border-edge px-1.5 text-sm font-medium ${looks[band]}`}
    >
      {bandNames[band]}
      <span className="font-normal">
        {rating.likelihood}
        {rating.consequence}
      </span>
    </span>
  );
}
