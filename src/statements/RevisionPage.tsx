import { useQuery } from '@tanstack/react-query';
import { FileDown, Printer } from 'lucide-react';
import { Link, useParams } from 'react-router-dom';
import { formatInstant } from '#shared/kernel/work-date.ts';
import { getSheetPdf } from '#shared/statements/statements.api.ts';
import { paths } from '../app/paths.ts';
import { addressOf } from '../lib/call.ts';
import { ButtonLink } from '../ui/Button.tsx';
import { Loaded } from '../ui/Loaded.tsx';
import { Notice } from '../ui/Notice.tsx';
import { Page } from '../ui/Page.tsx';
import { SheetView } from './SheetView.tsx';
import { sheetQuery } from './statements.queries.ts';

/** An issued revision, as it was frozen. */
export function RevisionPage() {
  const { id = '', number = '1' } = useParams();
  const query = useQuery(sheetQuery(id, Number(number)));
  return (
    <Loaded query={query}>
      {(sheet) => {
        const { frozen, revision } = sheet;
        return (
          <Page
            wide
            title={`${frozen.title}, revision ${number}`}
            lead={
              revision
                ? `Issued ${formatInstant(revision.issuedAt, frozen.site.timeZone)} by ${revision.issuedBy}`
                : null
            }
            actions={
              <>
                {sheet.pdf ? (
                  <ButtonLink
                    outside
                    kind="filled"
                    icon={FileDown}
                    to={addressOf(getSheetPdf, { params: { id, number } })}
                  >
                    PDF
                  </ButtonLink>
                ) : null}
                <ButtonLink outside icon={Printer} to={paths.printRevision(id, Number(number))}>
                  Print
                </ButtonLink>
                <ButtonLink to={paths.statement(id)}>Statement</ButtonLink>
              </>
            }
          >
            {sheet.pdf ? null : (
              <Notice>
                This server has no browser to make PDFs with. Print the page from your own browser instead.
              </Notice>
            )}
            {revision && revision.standing !== 'current' ? (
              <Notice kind="attention">
                This revision is {revision.standing}. Do not work from it.{' '}
                <Link to={paths.statement(id)}>See what is in force</Link>.
              </Notice>
            ) : null}
            {revision ? (
              <p className="my-3 text-sm break-all text-ink-soft">SHA-256 {revision.hash}</p>
            ) : null}
            <SheetView sheet={sheet} />
          </Page>
        );
      }}
    </Loaded>
  );
}
