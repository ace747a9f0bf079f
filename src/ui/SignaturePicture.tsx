/** A signature as it was drawn. On white in both schemes, as ink is on paper. */
export function SignaturePicture({ svg, of, small = false }: { svg: string; of: string; small?: boolean }) {
  return (
    <img
      alt={`Signature of ${of}`}
      src={`data:image/svg+xml,${encodeURIComponent(svg)}`}
      className={`rounded border border-zinc bg-[#ffffff] ${small ? 'h-10 w-28 p-0.5' : 'max-h-40 w-full max-w-md p-2'}`}
    />
  );
}
