import * as api from '#shared/statements/statements.api.ts';
import type { Sheet } from '#shared/statements/statements.api.ts';
import { renderSheetPdf } from '../print/pdf.ts';
import type { Feature } from '../platform/features.ts';
import { mount } from '../platform/mount.ts';
import * as drafts from './draft.service.ts';
import * as issue from './issue.service.ts';
import * as read from './read.service.ts';
import * as sheets from './sheet.service.ts';

export const statementRoutes: Feature = (router, platform) => {
  mount(router, platform, api.listStatements, async ({ db, actor, query }) => ({
    statements: await read.listStatements(db, actor.orgId, query),
  }));
  mount(router, platform, api.createStatement, ({ db, actor, params, body }) =>
    drafts.createStatement(db, actor, params.id, body),
  );
  mount(router, platform, api.getStatement, ({ db, actor, params }) =>
    read.getStatement(db, actor.orgId, params.id),
  );
  mount(router, platform, api.saveDraft, ({ db, actor, params, body }) =>
    drafts.saveDraft(db, actor, params.id, body),
  );
  mount(router, platform, api.submitDraft, ({ db, actor, params, body }) =>
    drafts.submitDraft(db, actor, params.id, body.lockVersion),
  );
  mount(router, platform, api.recallDraft, ({ db, actor, params, body }) =>
    drafts.recallDraft(db, actor, params.id, body.lockVersion),
  );
  mount(router, platform, api.returnDraft, ({ db, actor, params, body }) =>
    drafts.returnDraft(db, actor, params.id, body),
  );
  mount(router, platform, api.issueStatement, ({ db, actor, params, body }) =>
    issue.issueStatement(db, actor, params.id, body),
  );
  mount(router, platform, api.reviseStatement, ({ db, actor, params, body }) =>
    drafts.reviseStatement(db, actor, params.id, body.lockVersion),
  );
  mount(router, platform, api.withdrawStatement, ({ db, actor, params, body }) =>
    issue.withdrawStatement(db, actor, params.id, body),
  );
  mount(router, platform, api.discardStatement, async ({ db, actor, params }) => {
    await drafts.discardStatement(db, actor, params.id);
    return { done: true as const };
  });

  mount(router, platform, api.getSheet, ({ db, actor, params }) =>
    sheets.sheetOfRevision(db, actor, params, platform),
  );
  mount(router, platform, api.getDraftSheet, ({ db, actor, params }) =>
    sheets.sheetOfDraft(db, actor, params.id, platform),
  );
  mount(router, platform, api.getSheetPdf, async ({ db, actor, params }) =>
    pdfOf(await sheets.sheetOfRevision(db, actor, params, platform)),
  );
  mount(router, platform, api.getDraftPdf, async ({ db, actor, params }) =>
    pdfOf(await sheets.sheetOfDraft(db, actor, params.id, platform)),
  );
  mount(router, platform, api.verifyHash, ({ db, params }) => read.verifyHash(db, params.hash));

  async function pdfOf(sheet: Sheet) {
    const name = `${sheet.frozen.title}, ${sheet.revision ? `revision ${sheet.revision.number}` : 'draft'}.pdf`;
    return { fileName: name, content: await renderSheetPdf(sheet, platform.print), inline: true };
  }
};
