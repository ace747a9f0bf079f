import { useQuery } from '@tanstack/react-query';
import { Printer } from 'lucide-react';
import { useParams } from 'react-router-dom';
import { sheetCss } from '#shared/print/sheet-css.ts';
import { StatementSheet } from '#shared/print/StatementSheet.tsx';
import { paths } from '../app/paths.ts';
import { Button, ButtonLink } from '../ui/Button.tsx';
import { Loaded } from '../ui/Loaded.tsx';
import { draftSheetQuery, sheetQuery } from './statements.queries.ts';

/** The sheet for the browser's own print: of a revision, or of the draft, marked as not for use. */
export function PrintPage() {
  const { id = '', number } = useParams();
  const revision = useQuery({ ...sheetQuery(id, Number(number)), enabled: number !== undefined });
  const draft = useQuery({ ...draftSheetQuery(id), enabled: number === undefined });
  return (
    <Loaded query={number === undefined ? draft : revision}>
      {(sheet) => (
        <main className="min-h-dvh bg-white text-black">
          <title>{`${sheet.frozen.title}, ${number === undefined ? 'draft' : `revision ${number}`}`}</title>
          <style>{sheetCss}</style>
          <div className="no-print flex flex-wrap gap-2 border-b border-zinc p-3">
            <Button kind="filled" icon={Printer} onClick={() => window.print()}>
              Print
            </Button>
            <ButtonLink to={paths.statement(id)}>Back to the statement</ButtonLink>
          </div>
          <StatementSheet sheet={sheet} />
        </main>
      )}
    </Loaded>
  );
}
