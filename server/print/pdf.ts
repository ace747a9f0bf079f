import { createElement } from 'react';
import { renderToStaticMarkup } from 'react-dom/server';
import { shortHash } from '#shared/kernel/canonical.ts';
import { sheetCss } from '#shared/print/sheet-css.ts';
import { sheetNumber, stampOf, StatementSheet } from '#shared/print/StatementSheet.tsx';
import type { Sheet } from '#shared/statements/statements.api.ts';
import type { PrintService } from './browser.ts';
import { fontCssFor } from './fonts.ts';

/** The sheet as a tagged PDF with number, revision, page of pages and short hash at every page's foot. */
export async function renderSheetPdf(sheet: Sheet, print: PrintService): Promise<Buffer> {
  const body = renderToStaticMarkup(createElement(StatementSheet, { sheet }));
  const fonts = await fontCssFor(body);
  const title = escapeHtml(
    `${sheet.frozen.title}, ${sheet.revision ? `revision ${sheet.revision.number}` : 'draft'}`,
  );
  const html =
    `<!doctype html><html lang="en"><head><meta charset="utf-8"><title>${title}</title>` +
    `<style>html,body{margin:0;padding:0}${fonts}${sheetCss}</style></head><body>${body}</body></html>`;
  return print.pdf({ html, footerHtml: footerOf(sheet) });
}

function footerOf(sheet: Sheet): string {
  const { frozen, revision } = sheet;
  const words = [
    `No. ${sheetNumber(frozen)}`,
    revision ? `revision ${revision.number}` : 'draft',
    stampOf(sheet),
    revision ? shortHash(revision.hash) : null,
  ].filter((part) => part !== null);
  const qr = sheet.verifyQrSvg
    ? `<img style="height:9mm;width:9mm" src="data:image/svg+xml;base64,${Buffer.from(sheet.verifyQrSvg).toString('base64')}">`
    : '';
  return (
    '<div style="font:7.5px sans-serif;width:100%;padding:0 10mm;display:flex;justify-content:space-between;align-items:center;color:#1a2226">' +
    `<span>${escapeHtml(frozen.title)}</span><span>${escapeHtml(words.join(' · '))}</span>` +
    `<span style="display:flex;align-items:center;gap:2mm">Page <span class="pageNumber"></span> of <span class="totalPages"></span>${qr}</span></div>`
  );
}

const entities: Record<string, string> = { '&': '&amp;', '<': '&lt;', '>': '&gt;', '"': '&quot;' };
const escapeHtml = (text: string): string =>
  text.replace(/[&<>"]/g, (character) => entities[character] ?? '');
