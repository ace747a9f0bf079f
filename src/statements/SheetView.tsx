import { sheetCss } from '#shared/print/sheet-css.ts';
import { StatementSheet } from '#shared/print/StatementSheet.tsx';
import type { Sheet } from '#shared/statements/statements.api.ts';

/** The sheet on the screen: the same component and the same style as the PDF. */
export function SheetView({ sheet }: { sheet: Sheet }) {
  return (
    <div className="border border-zinc bg-white px-2 text-black sm:px-[10mm]">
      <style>{sheetCss}</style>
      <StatementSheet sheet={sheet} />
    </div>
  );
}
