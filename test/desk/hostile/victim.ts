import { buildBook, MAIN } from '../book/buildBook';

const table = `<table xmlns="${MAIN}" id="1" name="T" displayName="T" ref="E1:F4" totalsRowCount="1"><autoFilter ref="E1:F3"><filterColumn colId="0"><filters><filter val="1"/></filters></filterColumn></autoFilter>`
  + '<tableColumns count="2"><tableColumn id="1" name="m"/><tableColumn id="2" name="V"><calculatedColumnFormula>T[[#This Row],[m]]*2</calculatedColumnFormula></tableColumn></tableColumns></table>';

/** Small and with a bit of everything: shared strings and formulas, arrays old and new, a table, names, merges, hidden rows, protection. */
export const victim: Uint8Array = buildBook({
  strings: `<sst xmlns="${MAIN}" count="3" uniqueCount="3"><si><t>one</t></si><si><r><t>rich </t></r><r><t>text</t></r></si><si><t xml:space="preserve"> 12 </t></si></sst>`,
  styles: `<styleSheet xmlns="${MAIN}"><numFmts count="1"><numFmt numFmtId="164" formatCode="0.000"/></numFmts><cellXfs count="3"><xf numFmtId="0"/><xf numFmtId="164"/><xf numFmtId="0"><protection hidden="1"/></xf></cellXfs></styleSheet>`,
  metadata: `<metadata xmlns="${MAIN}" xmlns:x="http://schemas.microsoft.com/office/spreadsheetml/2017/dynamicarray"><metadataTypes count="1"><metadataType name="XLDAPR" minSupportedVersion="120000" cellMeta="1"/></metadataTypes><futureMetadata name="XLDAPR" count="1"><bk><extLst><ext uri="{bdbb8cdc-fa1e-496e-a857-3c3f30c029c3}"><x:dynamicArrayProperties fDynamic="1" fCollapsed="0"/></ext></extLst></bk></futureMetadata><cellMetadata count="1"><bk><rc t="1" v="0"/></bk></cellMetadata></metadata>`,
  calcChain: `<calcChain xmlns="${MAIN}"><c r="B1" i="1"/><c r="B2"/></calcChain>`,
  before: '<workbookPr/>',
  after: '<definedNames><definedName name="Factor">Data!$A$1</definedName><definedName name="Local" localSheetId="1">Other!$A$1*2</definedName></definedNames><calcPr calcId="191029"/>',
  sheets: [
    {
      name: 'Data', tables: [table],
      xml: '<dimension ref="A1:H6"/><cols><col min="3" max="3" width="9" style="1"/></cols><sheetData>'
        + '<row r="1" spans="1:8"><c r="A1"><v>2.5</v></c><c r="B1"><f t="shared" ref="B1:B3" si="0">A1*2</f><v>5</v></c><c r="C1" t="s"><v>0</v></c><c r="E1" t="inlineStr"><is><t>m</t></is></c><c r="F1" t="inlineStr"><is><t>V</t></is></c><c r="H1" cm="1"><f t="array" ref="H1:H3">A1:A3*10</f><v>25</v></c></row>'
        + '<row r="2"><c r="A2"><v>4</v></c><c r="B2"><f t="shared" si="0"/><v>8</v></c><c r="C2" t="s"><v>1</v></c><c r="E2"><v>1</v></c><c r="F2"><f>T[[#This Row],[m]]*2</f><v>2</v></c><c r="H2"><v>40</v></c></row>'
        + '<row r="3" hidden="1"><c r="A3"><v>-1</v></c><c r="B3"><f t="shared" si="0"/><v>-2</v></c><c r="C3" t="s"><v>2</v></c><c r="E3"><v>7</v></c><c r="F3"><f>T[[#This Row],[m]]*2</f><v>14</v></c><c r="H3"><v>-10</v></c></row>'
        + '<row r="4"><c r="B4"><f>SUM(B1:B3)</f><v>11</v></c><c r="C4"><f>C3+1</f><v>13</v></c><c r="F4"><f>SUBTOTAL(109,T[V])</f><v>2</v></c></row>'
        + '<row r="5"><c r="A5"><f t="array" ref="A5:B5">TRANSPOSE(A1:A2)</f><v>2.5</v></c><c r="B5"><v>4</v></c><c r="C5" t="b"><v>1</v></c><c r="D5" t="e"><v>#N/A</v></c></row>'
        + '<row r="6"><c r="A6"><f>Factor*Other!A1+IF(B4&gt;0,SQRT(A2),0)</f><v>4.5</v></c><c r="B6" t="str"><f>C1&amp;" "&amp;TEXT(A1,"0.00")</f><v>one 2.50</v></c><c r="C6" s="1"/></row>'
        + '</sheetData><mergeCells count="1"><mergeCell ref="C8:D9"/></mergeCells>',
    },
    { name: 'Other', xml: '<sheetData><row><c><v>1</v></c><c s="2"><f>A1+Local</f><v>3</v></c></row></sheetData><sheetProtection sheet="1"/>' },
  ],
});
