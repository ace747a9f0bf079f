import { useQuery } from '@tanstack/react-query';
import { FileDown, ListChecks, Pencil, Printer } from 'lucide-react';
import { useState } from 'react';
import { Link } from 'react-router-dom';
import { toast } from 'sonner';
import { shortHash } from '#shared/kernel/canonical.ts';
import { formatInstant } from '#shared/kernel/work-date.ts';
import {
  getSheetPdf,
  reviseStatement,
  type Statement,
  withdrawStatement,
} from '#shared/statements/statements.api.ts';
import { paths } from '../app/paths.ts';
import { useMayDo } from '../app/session.queries.ts';
import { addressOf, call } from '../lib/call.ts';
import { wordsOf } from '../lib/query.ts';
import { Badge } from '../ui/Badge.tsx';
import { Button, ButtonLink } from '../ui/Button.tsx';
import { DataTable } from '../ui/DataTable.tsx';
import { ConfirmDialog } from '../ui/Dialog.tsx';
import { TextArea } from '../ui/Field.tsx';
import { Loaded } from '../ui/Loaded.tsx';
import { Notice } from '../ui/Notice.tsx';
import { Page, Section } from '../ui/Page.tsx';
import { SheetView } from './SheetView.tsx';
import { sheetQuery, useStatementAct } from './statements.queries.ts';

const told = { onError: (error: Error) => toast(wordsOf(error)) };
const standingNames = { current: 'In force', superseded: 'Superseded', withdrawn: 'Withdrawn' };

/** A statement in force, or withdrawn: its sheet, its revisions, what can be done. */
export function IssuedView({ statement }: { statement: Statement }) {
  const { id, timeZone, currentRevision } = statement;
  const mayDo = useMayDo();
  const shown = currentRevision ?? statement.revisions[0]?.number ?? 1;
  const sheet = useQuery(sheetQuery(id, shown));
  const revise = useStatementAct(id, () =>
    call(reviseStatement, { params: { id }, body: { lockVersion: statement.lockVersion } }),
  );
  const withdrawn = statement.state === 'withdrawn';
  return (
    <Page
      wide
      title={statement.title}
      lead={`${statement.site}. ${withdrawn ? 'Withdrawn.' : `Revision ${shown} is in force.`}`}
      actions={
        <>
          <ButtonLink kind="filled" icon={ListChecks} to={paths.registerOf({ statementId: id })}>
            Register
          </ButtonLink>
          {sheet.data?.pdf ? (
            <ButtonLink
              outside
              icon={FileDown}
              to={addressOf(getSheetPdf, { params: { id, number: shown } })}
            >
              PDF
            </ButtonLink>
          ) : null}
          <ButtonLink outside icon={Printer} to={paths.printRevision(id, shown)}>
            Print
          </ButtonLink>
          {!withdrawn && mayDo('statement.write') ? (
            <Button icon={Pencil} busy={revise.isPending} onClick={() => revise.mutate(undefined, told)}>
              New revision
            </Button>
          ) : null}
          {!withdrawn && mayDo('statement.issue') ? <Withdraw statement={statement} /> : null}
        </>
      }
    >
      {sheet.data && !sheet.data.pdf ? (
        <Notice>
          This server has no browser to make PDFs with. Print the page from your own browser instead.
        </Notice>
      ) : null}
      <Section title="Revisions">
        <DataTable
          label="Revisions"
          rows={statement.revisions}
          keyOf={(revision) => revision.id}
          linkOf={({ number }) => paths.revision(id, number)}
          empty="None"
          columns={[
            { title: 'Revision', cell: ({ number }) => `Revision ${number}` },
            {
              title: 'Standing',
              cell: ({ standing }) => (
                <Badge tone={standing === 'current' ? 'done' : 'stop'}>{standingNames[standing]}</Badge>
              ),
            },
            {
              title: 'Issued',
              cell: ({ issuedAt, issuedBy }) => `${formatInstant(issuedAt, timeZone)}, ${issuedBy}`,
            },
            { title: 'What changed', cell: ({ changeNote }) => changeNote || '—', wide: true },
            {
              title: 'Hash',
              cell: ({ hash }) => <Link to={paths.verify(shortHash(hash))}>{shortHash(hash)}</Link>,
              wide: true,
            },
          ]}
        />
      </Section>
      <Section title="As it was issued">
        <Loaded query={sheet}>{(data) => <SheetView sheet={data} />}</Loaded>
      </Section>
    </Page>
  );
}

function Withdraw({ statement: { id, lockVersion, title } }: { statement: Statement }) {
  const [open, setOpen] = useState(false);
  const [reason, setReason] = useState('');
  const act = useStatementAct(id, () =>
    call(withdrawStatement, { params: { id }, body: { lockVersion, reason } }),
  );
  return (
    <>
      <Button kind="destructive" onClick={() => setOpen(true)}>
        Withdraw
      </Button>
      <ConfirmDialog
        destructive
        title={`Withdraw “${title}”?`}
        lead="It is out of force at once and for good, and nobody can sign it any more. Its revisions and signatures stay on record."
        act="Withdraw"
        open={open}
        busy={act.isPending}
        onClose={() => setOpen(false)}
        onConfirm={() => act.mutate(undefined, { onSuccess: () => setOpen(false) })}
      >
        <TextArea
          label="Why"
          value={reason}
          onChange={(event) => setReason(event.target.value)}
          error={act.error ? wordsOf(act.error) : undefined}
        />
      </ConfirmDialog>
    </>
  );
}
