import { formatInstant } from '../kernel/work-date.ts';
import type { SignatureOnSheet } from '../statements/statements.api.ts';
import { svgAddress } from './StatementSheet.tsx';

/** Who signed which revision and when, with the signatures; empty rows to sign by hand where nobody has yet. */
export function SignOnTable({ signatures, timeZone }: { signatures: SignatureOnSheet[]; timeZone: string }) {
  return (
    <table className="sign-on">
      <thead>
        <tr>
          <th scope="col">Name</th>
          <th scope="col">Employer, trade</th>
          <th scope="col">Revision</th>
          <th scope="col">Signed</th>
          <th scope="col">Signature</th>
        </tr>
      </thead>
      <tbody>
        {signatures.map((signature) => (
          <tr key={`${signature.name}-${signature.signedAt}`}>
            <td>{signature.name}</td>
            <td>
              {signature.employer}, {signature.trade}
            </td>
            <td>{signature.revision}</td>
            <td>{formatInstant(signature.signedAt, timeZone)}</td>
            <td>
              <Signed signature={signature} />
            </td>
          </tr>
        ))}
        {signatures.length === 0
          ? Array.from({ length: 6 }, (_, index) => (
              <tr key={index} className="blank">
                {Array.from({ length: 5 }, (_, cell) => (
                  <td key={cell} />
                ))}
              </tr>
            ))
          : null}
      </tbody>
    </table>
  );
}

function Signed({ signature: { name, svg, typedName, witness } }: { signature: SignatureOnSheet }) {
  if (svg) return <img className="signature" alt={`Signature of ${name}`} src={svgAddress(svg)} />;
  return (
    <>
      Typed: {typedName}
      {witness ? <span className="who">Witness: {witness}</span> : null}
    </>
  );
}
