/** The sheet's look, black on white. Bands deepen in one hue and carry a pattern, so that they read in grey print. */
export const sheetCss = `
.sheet { font: 9pt/1.36 'Noto Sans', 'Noto Sans Variable', sans-serif; color: #1a2226; background: #fff; max-width: 190mm; margin: 0 auto; font-variant-numeric: tabular-nums; }
.sheet h1 { font-size: 17pt; line-height: 1.2; margin: 2mm 0 0; font-weight: 700; }
.sheet h2 { font-size: 11.5pt; margin: 6mm 0 2mm; padding-top: 1.5mm; border-top: 3px double #7c878c; font-weight: 700; break-after: avoid; }
.sheet h2.free { border: 0; }
.sheet h3 { font-size: 9.5pt; margin: 0 0 1mm; font-weight: 700; break-after: avoid; }
.sheet p { margin: 0 0 1.5mm; }
.sheet ul, .sheet ol { margin: 0 0 1.5mm; padding-left: 5mm; list-style: disc; }
.sheet ol { list-style: decimal; }
.sheet li { break-inside: avoid; }
.sheet .fine { font-size: 8pt; color: #3f484d; }
.sheet .caution { margin-top: 4mm; border-left: 3px solid #7c878c; padding-left: 3mm; }
.sheet .who-for { display: flex; gap: 2mm; align-items: center; font-weight: 700; }
.sheet .who-for .invented { margin-left: auto; font-weight: 400; font-size: 8pt; border: 1px solid #7c878c; padding: 0 2mm; }
.sheet .kind { color: #3f484d; }
.sheet .title-block { position: relative; border: 1.5px solid #1a2226; padding: 3mm; }
.sheet .title-block dl { display: grid; grid-template-columns: 2fr 1fr 1fr; margin: 2mm 28mm 0 0; border-top: 1px solid #7c878c; border-left: 1px solid #7c878c; }
.sheet .title-block dl > div { border-right: 1px solid #7c878c; border-bottom: 1px solid #7c878c; padding: 1mm 1.5mm; }
.sheet dt { font-size: 7.5pt; color: #3f484d; }
.sheet dd { margin: 0; white-space: pre-line; }
.sheet .verify { position: absolute; right: 3mm; bottom: 3mm; width: 25mm; font-size: 7pt; line-height: 1.25; text-align: center; }
.sheet .verify img { width: 23mm; height: 23mm; display: block; margin: 0 auto; }
.sheet .rows > div { display: grid; grid-template-columns: 42mm 1fr; gap: 3mm; border-bottom: 1px solid #cdd3d4; padding: 1mm 0; break-inside: avoid; }
.sheet .clause { font-size: 8pt; color: #3f484d; }
.sheet table { width: 100%; border-collapse: collapse; margin-bottom: 3mm; }
.sheet thead { display: table-header-group; }
.sheet th { text-align: left; vertical-align: bottom; font-weight: 700; }
.sheet td, .sheet th { border: 1px solid #7c878c; padding: 1.2mm 1.5mm; vertical-align: top; }
.sheet thead th { background: #eceeee; font-size: 8pt; }
.sheet .steps { table-layout: fixed; }
.sheet .steps thead th:nth-child(1) { width: 25%; }
.sheet .steps thead th:nth-child(2), .sheet .steps thead th:nth-child(4) { width: 9.5%; }
.sheet tr.step th { background: #f6f5f1; font-size: 10.5pt; border-top: 2px solid #1a2226; break-after: avoid; }
.sheet tr.step th p { font-size: 9pt; font-weight: 400; margin: 1mm 0 0; }
.sheet tr.step { break-after: avoid; break-inside: avoid; }
.sheet tr.hazard { break-inside: avoid; }
.sheet tr.step .number { color: #28478f; margin-right: 1mm; }
.sheet .controls { list-style: none; padding: 0; margin: 0; }
.sheet .controls li { padding: 0.6mm 0; border-bottom: 1px dotted #cdd3d4; break-inside: avoid; }
.sheet .controls li:last-child { border-bottom: 0; }
.sheet .controls .who { display: inline; }
.sheet .controls .who::before { content: ' · '; }
.sheet .level { font-weight: 700; font-size: 8pt; }
.sheet .level::after { content: ':'; }
.sheet .who { display: block; font-size: 8pt; color: #3f484d; }
.sheet tr.holdPoint td, .sheet tr.stopIf td { break-inside: avoid; }
.sheet tr.holdPoint strong { color: #28478f; margin-right: 1mm; }
.sheet tr.stopIf strong { color: #8f2b1c; margin-right: 1mm; }
.sheet .filled { font-weight: 700; }
.sheet .hole { border-bottom: 1.5px dashed #8f2b1c; color: #8f2b1c; }
.sheet .band { display: inline-block; padding: 0.3mm 1.5mm; border: 1px solid #7c878c; border-radius: 3px; font-weight: 700; font-size: 8pt; print-color-adjust: exact; -webkit-print-color-adjust: exact; }
.sheet .band small { display: block; font-weight: 400; font-size: 7pt; }
.sheet .band.low { background: #efe8d8; }
.sheet .band.moderate { background: radial-gradient(#8a6a2c 0.5px, transparent 0.7px) 0 0/4px 4px #e3c68d; }
.sheet .band.high { background: repeating-linear-gradient(45deg, #c9763a 0 3px, #d99561 3px 5px); color: #1a2226; }
.sheet .band.extreme { background: repeating-linear-gradient(45deg, transparent 0 3px, #93392a 3px 4px), repeating-linear-gradient(-45deg, #7a1f12 0 3px, #6a1a0f 3px 4px); color: #fff; }
.sheet .columns { columns: 2; column-gap: 8mm; }
.sheet .columns > div { break-inside: avoid; margin-bottom: 2mm; }
.sheet .acceptance ul { list-style: none; padding: 0; }
.sheet .acceptance { break-inside: avoid; }
.sheet .sign-on tr { break-inside: avoid; }
.sheet .sign-on tr.blank td { height: 11mm; }
.sheet .sign-on td { vertical-align: middle; }
.sheet .sign-on th:last-child { width: 46mm; }
.sheet img.signature { height: 12mm; max-width: 44mm; object-fit: contain; display: block; }
.sheet .stamp { position: fixed; top: 42%; left: 0; right: 0; text-align: center; font-size: 46pt; font-weight: 700; color: #8f2b1c; opacity: 0.2; transform: rotate(-28deg); pointer-events: none; z-index: 2; }
@media screen { .sheet { position: relative; padding: 12mm 0; } .sheet .stamp { position: absolute; top: 40mm; } }
@media screen and (max-width: 700px) {
  .sheet { padding: 4mm; font-size: 10.5pt; }
  .sheet .title-block dl { grid-template-columns: 1fr 1fr; margin-right: 0; }
  .sheet .verify { position: static; margin-top: 3mm; }
  .sheet .rows > div { grid-template-columns: 1fr; gap: 0; }
  .sheet .columns { columns: 1; }
  .sheet .steps, .sheet .steps tbody, .sheet .steps tr, .sheet .steps td, .sheet .steps th { display: block; }
  .sheet .steps thead { display: none; }
}
@page { size: A4; margin: 14mm 10mm 18mm; }
@media print { .sheet { max-width: none; } }
`;
