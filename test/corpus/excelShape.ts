import { strToU8 } from 'fflate';
import { buildBook, MAIN, RELS } from '../desk/book/buildBook';

const HEAD = '<?xml version="1.0" encoding="UTF-8" standalone="yes"?>\r\n';
const MS = 'http://schemas.microsoft.com/office';
const OFFICE = 'application/vnd.openxmlformats-officedocument';
const relationships = (list: readonly (readonly [id: string, type: string, target: string, external?: boolean])[]): Uint8Array => strToU8(
  `${HEAD}<Relationships xmlns="http://schemas.openxmlformats.org/package/2006/relationships">${list.map(([id, type, target, external]) =>
    `<Relationship Id="${id}" Type="${type.startsWith('http') ? type : `${RELS}/${type}`}" Target="${target}"${external ? ' TargetMode="External"' : ''}/>`).join('')}</Relationships>`);

const samples = Array.from({ length: 12 }, (_, i) => ({ row: i + 4, name: `W-${i + 1}`, volume: 9 + i / 8, factor: [1, 2, 5][i % 3], tolerance: [0.01, 0.02, 0.05][i % 3] }));

const rows = samples.map(({ row, volume, factor, tolerance }, i) =>
  `<row r="${row}" spans="1:5" x14ac:dyDescent="0.25"><c r="A${row}" t="s"><v>${i + 5}</v></c><c r="B${row}" s="1"><v>${volume}</v></c><c r="C${row}"><v>${factor}</v></c>`
  + `<c r="D${row}" s="1"><v>${tolerance}</v></c><c r="E${row}" s="2">${i === 0 ? '<f t="shared" ref="E4:E15" si="0">B4*C4*Factor</f>' : '<f t="shared" si="0"/>'}<v>${volume * factor * 1.5}</v></c></row>`).join('\r\n');

const results = `${HEAD}<worksheet xmlns="${MAIN}" xmlns:r="${RELS}" xmlns:mc="http://schemas.openxmlformats.org/markup-compatibility/2006" mc:Ignorable="x14ac xr" xmlns:x14ac="${MS}/spreadsheetml/2009/9/ac" xmlns:xr="${MS}/spreadsheetml/2014/revision" xr:uid="{00000000-0001-0000-0000-000000000000}">`
  + '<sheetPr codeName="Sheet1"><tabColor theme="4"/><pageSetUpPr fitToPage="1"/></sheetPr><dimension ref="A1:E15"/>'
  + '<sheetViews><sheetView tabSelected="1" workbookViewId="0"><pane xSplit="1" ySplit="3" topLeftCell="B4" activePane="bottomRight" state="frozen"/><selection pane="bottomRight" activeCell="B4" sqref="B4"/></sheetView></sheetViews>'
  + '<sheetFormatPr defaultRowHeight="15" x14ac:dyDescent="0.25"/><cols><col min="1" max="1" width="14.7109375" bestFit="1" customWidth="1"/></cols>'
  + '<sheetData><row r="1" spans="1:5" x14ac:dyDescent="0.25"><c r="A1" s="3" t="inlineStr"><is><t xml:space="preserve">Invented  results</t><rPh sb="0" eb="1"><t>reading</t></rPh></is></c></row>\r\n'
  + `<row r="3" spans="1:5" ht="30" customHeight="1" x14ac:dyDescent="0.25">${['A', 'B', 'C', 'D', 'E'].map((c, i) => `<c r="${c}3" s="3" t="s"><v>${i}</v></c>`).join('')}</row>\r\n${rows}</sheetData>`
  + '<autoFilter ref="A3:E15" xr:uid="{00000000-0009-0000-0000-000000000000}"/><mergeCells count="1"><mergeCell ref="A1:E1"/></mergeCells><phoneticPr fontId="1" type="noConversion"/>'
  + '<conditionalFormatting sqref="E4:E15"><cfRule type="cellIs" dxfId="0" priority="1" operator="greaterThan"><formula>60</formula></cfRule></conditionalFormatting>'
  + '<dataValidations count="1"><dataValidation type="list" allowBlank="1" showInputMessage="1" sqref="C4:C15" xr:uid="{00000000-0002-0000-0000-000000000000}"><formula1>"1,2,5"</formula1></dataValidation></dataValidations>'
  + '<hyperlinks><hyperlink ref="H2" r:id="rId9" display="method"/></hyperlinks><printOptions gridLines="1"/><pageMargins left="0.7" right="0.7" top="0.75" bottom="0.75" header="0.3" footer="0.3"/>'
  + '<pageSetup paperSize="9" orientation="landscape" r:id="rId1"/><headerFooter><oddFooter>&amp;CPage &amp;P</oddFooter></headerFooter><drawing r:id="rId2"/><legacyDrawing r:id="rId3"/>'
  + '<mc:AlternateContent xmlns:mc="http://schemas.openxmlformats.org/markup-compatibility/2006"><mc:Choice Requires="x14"><controls><mc:AlternateContent><mc:Choice Requires="x14"><control shapeId="1026" r:id="rId4" name="Check Box 1"><controlPr defaultSize="0" autoFill="0"><anchor moveWithCells="1"><from><xdr:col xmlns:xdr="http://schemas.openxmlformats.org/drawingml/2006/spreadsheetDrawing">7</xdr:col></from></anchor></controlPr></control></mc:Choice></mc:AlternateContent></controls></mc:Choice></mc:AlternateContent>'
  + `<extLst><ext uri="{78C0D931-6437-407d-A8EE-F0AAD7539E65}" xmlns:x14="${MS}/spreadsheetml/2009/9/main"><x14:conditionalFormattings><x14:conditionalFormatting xmlns:xm="${MS}/excel/2006/main"><x14:cfRule type="dataBar" id="{8B2A4A01-0000-0000-0000-000000000001}"><x14:dataBar minLength="0" maxLength="100"><x14:cfvo type="autoMin"/><x14:cfvo type="autoMax"/></x14:dataBar></x14:cfRule><xm:sqref>B4:B15</xm:sqref></x14:conditionalFormatting></x14:conditionalFormattings></ext>`
  + `<ext uri="{05C60535-1F16-4fd2-B633-F4F36F0B64E0}" xmlns:x14="${MS}/spreadsheetml/2009/9/main"><x14:sparklineGroups xmlns:xm="${MS}/excel/2006/main"><x14:sparklineGroup displayEmptyCellsAs="gap"><x14:colorSeries theme="4"/><x14:sparklines><x14:sparkline><xm:f>Results!B4:E4</xm:f><xm:sqref>G4</xm:sqref></x14:sparkline></x14:sparklines></x14:sparklineGroup></x14:sparklineGroups></ext>`
  + `<ext uri="{A8765BA9-456A-4dab-B4F3-ACF838C121DE}" xmlns:x14="${MS}/spreadsheetml/2009/9/main"><x14:slicerList><x14:slicer r:id="rId7"/></x14:slicerList></ext></extLst></worksheet>`;

const pivotSheet = `${HEAD}<worksheet xmlns="${MAIN}"><dimension ref="A3:B6"/><sheetData><row r="3"><c r="A3" t="inlineStr"><is><t>Row Labels</t></is></c><c r="B3" t="inlineStr"><is><t>Sum of Volume</t></is></c></row>`
  + '<row r="4"><c r="A4"><v>1</v></c><c r="B4"><v>37.5</v></c></row><row r="5"><c r="A5"><v>2</v></c><c r="B5"><v>38</v></c></row><row r="6"><c r="A6"><v>5</v></c><c r="B6"><v>38.5</v></c></row></sheetData></worksheet>';

const strings = `${HEAD}<sst xmlns="${MAIN}" count="17" uniqueCount="17">${['Sample', 'Volume', 'Factor', 'Tolerance', 'Result'].map((t) => `<si><t>${t}</t></si>`).join('')}`
  + `${samples.map(({ name }, i) => (i === 3 ? `<si><r><rPr><b/><sz val="11"/></rPr><t>W-</t></r><r><t>4</t></r></si>` : `<si><t>${name}</t></si>`)).join('')}</sst>`;

const styles = `${HEAD}<styleSheet xmlns="${MAIN}"><numFmts count="1"><numFmt numFmtId="164" formatCode="0.00&quot; mL&quot;"/></numFmts><fonts count="2"><font><sz val="11"/><name val="Calibri"/><family val="2"/></font><font><b/><sz val="11"/><color theme="4"/><name val="Calibri"/><family val="2"/></font></fonts>`
  + '<fills count="3"><fill><patternFill patternType="none"/></fill><fill><patternFill patternType="gray125"/></fill><fill><patternFill patternType="solid"><fgColor rgb="FFDDEBF7"/><bgColor indexed="64"/></patternFill></fill></fills><borders count="1"><border><left/><right/><top/><bottom/><diagonal/></border></borders>'
  + '<cellStyleXfs count="1"><xf numFmtId="0" fontId="0" fillId="0" borderId="0"/></cellStyleXfs><cellXfs count="4"><xf numFmtId="0" fontId="0" fillId="0" borderId="0" xfId="0"/><xf numFmtId="164" fontId="0" fillId="0" borderId="0" xfId="0" applyNumberFormat="1"/><xf numFmtId="2" fontId="0" fillId="0" borderId="0" xfId="0" applyNumberFormat="1"/><xf numFmtId="0" fontId="1" fillId="2" borderId="0" xfId="0" applyFont="1" applyFill="1"/></cellXfs>'
  + '<cellStyles count="1"><cellStyle name="Normal" xfId="0" builtinId="0"/></cellStyles><dxfs count="1"><dxf><font><color rgb="FF9C0006"/></font></dxf></dxfs></styleSheet>';

const chart = `${HEAD}<c:chartSpace xmlns:c="http://schemas.openxmlformats.org/drawingml/2006/chart" xmlns:a="http://schemas.openxmlformats.org/drawingml/2006/main"><c:chart><c:plotArea><c:layout/><c:barChart><c:barDir val="col"/><c:grouping val="clustered"/><c:ser><c:idx val="0"/><c:order val="0"/><c:cat><c:strRef><c:f>Results!$A$4:$A$15</c:f></c:strRef></c:cat><c:val><c:numRef><c:f>Results!$E$4:$E$15</c:f></c:numRef></c:val></c:ser><c:axId val="1"/><c:axId val="2"/></c:barChart><c:catAx><c:axId val="1"/><c:scaling/><c:delete val="0"/><c:axPos val="b"/><c:crossAx val="2"/></c:catAx><c:valAx><c:axId val="2"/><c:scaling/><c:delete val="0"/><c:axPos val="l"/><c:crossAx val="1"/></c:valAx></c:plotArea></c:chart></c:chartSpace>`;

const XDR = 'http://schemas.openxmlformats.org/drawingml/2006/spreadsheetDrawing';
const anchor = (col: number, inside: string): string => `<xdr:twoCellAnchor><xdr:from><xdr:col>${col}</xdr:col><xdr:colOff>0</xdr:colOff><xdr:row>4</xdr:row><xdr:rowOff>0</xdr:rowOff></xdr:from><xdr:to><xdr:col>${col + 5}</xdr:col><xdr:colOff>0</xdr:colOff><xdr:row>14</xdr:row><xdr:rowOff>0</xdr:rowOff></xdr:to>${inside}<xdr:clientData/></xdr:twoCellAnchor>`;
const drawing = `${HEAD}<xdr:wsDr xmlns:xdr="${XDR}" xmlns:a="http://schemas.openxmlformats.org/drawingml/2006/main">`
  + anchor(8, `<xdr:graphicFrame macro=""><xdr:nvGraphicFramePr><xdr:cNvPr id="2" name="Chart 1"/><xdr:cNvGraphicFramePr/></xdr:nvGraphicFramePr><xdr:xfrm><a:off x="0" y="0"/><a:ext cx="0" cy="0"/></xdr:xfrm><a:graphic><a:graphicData uri="http://schemas.openxmlformats.org/drawingml/2006/chart"><c:chart xmlns:c="http://schemas.openxmlformats.org/drawingml/2006/chart" xmlns:r="${RELS}" r:id="rId1"/></a:graphicData></a:graphic></xdr:graphicFrame>`)
  + anchor(14, '<xdr:sp macro="" textlink=""><xdr:nvSpPr><xdr:cNvPr id="3" name="TextBox 2"/><xdr:cNvSpPr txBox="1"/></xdr:nvSpPr><xdr:spPr><a:xfrm><a:off x="0" y="0"/><a:ext cx="900000" cy="300000"/></a:xfrm><a:prstGeom prst="rect"><a:avLst/></a:prstGeom></xdr:spPr><xdr:txBody><a:bodyPr/><a:lstStyle/><a:p><a:r><a:rPr lang="en-US"/><a:t>Volumes at 20 °C</a:t></a:r></a:p></xdr:txBody></xdr:sp>')
  + '</xdr:wsDr>';

const part = (path: string, type: string): string => `<Override PartName="/${path}" ContentType="${type}"/>`;
const contentTypes = `${HEAD}<Types xmlns="http://schemas.openxmlformats.org/package/2006/content-types"><Default Extension="bin" ContentType="application/vnd.ms-office.vbaProject"/><Default Extension="rels" ContentType="application/vnd.openxmlformats-package.relationships+xml"/><Default Extension="vml" ContentType="${OFFICE}.vmlDrawing"/><Default Extension="xml" ContentType="application/xml"/>`
  + part('xl/workbook.xml', 'application/vnd.ms-excel.sheet.macroEnabled.main+xml')
  + [1, 2].map((n) => part(`xl/worksheets/sheet${n}.xml`, `${OFFICE}.spreadsheetml.worksheet+xml`)).join('')
  + part('xl/worksheets/sheet3.xml', `${OFFICE}.spreadsheetml.worksheet+xml`)
  + part('xl/sharedStrings.xml', `${OFFICE}.spreadsheetml.sharedStrings+xml`) + part('xl/styles.xml', `${OFFICE}.spreadsheetml.styles+xml`) + part('xl/calcChain.xml', `${OFFICE}.spreadsheetml.calcChain+xml`)
  + part('xl/drawings/drawing1.xml', `${OFFICE}.drawing+xml`) + part('xl/charts/chart1.xml', `${OFFICE}.drawingml.chart+xml`) + part('xl/comments1.xml', `${OFFICE}.spreadsheetml.comments+xml`)
  + part('xl/threadedComments/threadedComment1.xml', 'application/vnd.ms-excel.threadedcomments+xml') + part('xl/persons/person.xml', 'application/vnd.ms-excel.person+xml')
  + part('xl/pivotTables/pivotTable1.xml', `${OFFICE}.spreadsheetml.pivotTable+xml`) + part('xl/pivotCache/pivotCacheDefinition1.xml', `${OFFICE}.spreadsheetml.pivotCacheDefinition+xml`)
  + part('xl/slicers/slicer1.xml', 'application/vnd.ms-excel.slicer+xml') + part('xl/slicerCaches/slicerCache1.xml', 'application/vnd.ms-excel.slicerCache+xml')
  + part('xl/ctrlProps/ctrlProp1.xml', 'application/vnd.ms-excel.controlproperties+xml') + part('customXml/itemProps1.xml', `${OFFICE}.customXmlProperties+xml`)
  + part('xl/webextensions/taskpanes.xml', 'application/vnd.ms-office.webextensiontaskpanes+xml') + part('xl/webextensions/webextension1.xml', 'application/vnd.ms-office.webextension+xml')
  + part('docProps/custom.xml', `${OFFICE}.custom-properties+xml`) + '</Types>';

const field = (name: string): string => `<cacheField name="${name}" numFmtId="0"><sharedItems/></cacheField>`;

/**
 * A workbook in the shape in which Excel writes one, with parts that no library writes: macros, slicer, pivot table, both kinds of
 * comments, form control, custom XML, web extension, extension lists, a shared formula and a chain of calculation. By hand from the standard.
 */
export const excelShape: Uint8Array = buildBook({
  extra: {
    '[Content_Types].xml': strToU8(contentTypes),
    '_rels/.rels': relationships([['rId1', 'officeDocument', 'xl/workbook.xml'], ['rId2', 'custom-properties', 'docProps/custom.xml'], ['rId3', `${MS}/2011/relationships/webextensiontaskpanes`, 'xl/webextensions/taskpanes.xml']]),
    'xl/workbook.xml': strToU8(`${HEAD}<workbook xmlns="${MAIN}" xmlns:r="${RELS}"><fileVersion appName="xl" lastEdited="7" lowestEdited="7" rupBuild="27000"/><workbookPr codeName="ThisWorkbook" defaultThemeVersion="166925"/><bookViews><workbookView xWindow="0" yWindow="0" windowWidth="20000" windowHeight="9000"/></bookViews>`
      + '<sheets><sheet name="Results" sheetId="1" r:id="rId1"/><sheet name="Pivot" sheetId="2" r:id="rId2"/><sheet name="Constants" sheetId="3" state="veryHidden" r:id="rId3"/></sheets>'
      + '<definedNames><definedName name="_xlnm._FilterDatabase" localSheetId="0" hidden="1">Results!$A$3:$E$15</definedName><definedName name="_xlnm.Print_Titles" localSheetId="0">Results!$3:$3</definedName><definedName name="Factor">Constants!$A$1</definedName><definedName name="Local" localSheetId="0">Results!$B$4</definedName><definedName name="Twice">Constants!$A$1*2+1</definedName></definedNames>'
      + `<calcPr calcId="191029"/><pivotCaches><pivotCache cacheId="1" r:id="rId8"/></pivotCaches><extLst><ext uri="{BBE1A952-AA13-448e-AADC-164F8A28A991}" xmlns:x14="${MS}/spreadsheetml/2009/9/main"><x14:slicerCaches><x14:slicerCache r:id="rId9"/></x14:slicerCaches></ext></extLst></workbook>`),
    'xl/_rels/workbook.xml.rels': relationships([
      ['rId1', 'worksheet', 'worksheets/sheet1.xml'], ['rId2', 'worksheet', 'worksheets/sheet2.xml'], ['rId3', 'worksheet', 'worksheets/sheet3.xml'], ['rId4', 'styles', 'styles.xml'], ['rId5', 'sharedStrings', 'sharedStrings.xml'],
      ['rId6', 'calcChain', 'calcChain.xml'], ['rId7', `${MS}/2006/relationships/vbaProject`, 'vbaProject.bin'], ['rId8', 'pivotCacheDefinition', 'pivotCache/pivotCacheDefinition1.xml'],
      ['rId9', `${MS}/2007/relationships/slicerCache`, 'slicerCaches/slicerCache1.xml'], ['rId10', `${MS}/2017/10/relationships/person`, 'persons/person.xml'], ['rId11', 'customXml', '../customXml/item1.xml'],
    ]),
    'xl/worksheets/sheet1.xml': strToU8(results),
    'xl/worksheets/_rels/sheet1.xml.rels': relationships([
      ['rId1', 'printerSettings', '../printerSettings/printerSettings1.bin'], ['rId2', 'drawing', '../drawings/drawing1.xml'], ['rId3', 'vmlDrawing', '../drawings/vmlDrawing1.vml'], ['rId4', 'ctrlProp', '../ctrlProps/ctrlProp1.xml'],
      ['rId5', 'comments', '../comments1.xml'], ['rId6', `${MS}/2017/10/relationships/threadedComment`, '../threadedComments/threadedComment1.xml'], ['rId7', `${MS}/2007/relationships/slicer`, '../slicers/slicer1.xml'],
      ['rId9', 'hyperlink', 'https://example.org/method', true],
    ]),
    'xl/worksheets/sheet2.xml': strToU8(pivotSheet),
    'xl/worksheets/_rels/sheet2.xml.rels': relationships([['rId1', 'pivotTable', '../pivotTables/pivotTable1.xml']]),
    'xl/worksheets/sheet3.xml': strToU8(`${HEAD}<worksheet xmlns="${MAIN}"><dimension ref="A1"/><sheetData><row r="1"><c r="A1"><v>1.5</v></c></row></sheetData></worksheet>`),
    'xl/styles.xml': strToU8(styles),
    'xl/sharedStrings.xml': strToU8(strings),
    'xl/calcChain.xml': strToU8(`${HEAD}<calcChain xmlns="${MAIN}">${samples.map(({ row }) => `<c r="E${row}" i="1"/>`).join('')}</calcChain>`),
    'xl/vbaProject.bin': Uint8Array.from({ length: 3000 }, (_, i) => (i * 37 + (i >> 3)) & 255),
    'xl/printerSettings/printerSettings1.bin': Uint8Array.from({ length: 220 }, (_, i) => i & 255),
    'xl/drawings/drawing1.xml': strToU8(drawing),
    'xl/drawings/_rels/drawing1.xml.rels': relationships([['rId1', 'chart', '../charts/chart1.xml']]),
    'xl/charts/chart1.xml': strToU8(chart),
    'xl/drawings/vmlDrawing1.vml': strToU8('<xml xmlns:v="urn:schemas-microsoft-com:vml" xmlns:o="urn:schemas-microsoft-com:office:office" xmlns:x="urn:schemas-microsoft-com:office:excel"><v:shape id="_x0000_s1025" type="#_x0000_t202" style="visibility:hidden"><x:ClientData ObjectType="Note"><x:Row>3</x:Row><x:Column>1</x:Column></x:ClientData></v:shape></xml>'),
    'xl/comments1.xml': strToU8(`${HEAD}<comments xmlns="${MAIN}"><authors><author>tc={6F2A0001-0000-0000-0000-000000000001}</author></authors><commentList><comment ref="B4" authorId="0" shapeId="0"><text><t>[Threaded comment] read twice</t></text></comment></commentList></comments>`),
    'xl/threadedComments/threadedComment1.xml': strToU8(`${HEAD}<ThreadedComments xmlns="${MS}/spreadsheetml/2018/threadedcomments"><threadedComment ref="B4" dT="2026-01-01T00:00:00.00" personId="{6F2A0002-0000-0000-0000-000000000002}" id="{6F2A0001-0000-0000-0000-000000000001}"><text>read twice</text></threadedComment></ThreadedComments>`),
    'xl/persons/person.xml': strToU8(`${HEAD}<personList xmlns="${MS}/spreadsheetml/2018/threadedcomments"><person displayName="analyst" id="{6F2A0002-0000-0000-0000-000000000002}" userId="1" providerId="None"/></personList>`),
    'xl/ctrlProps/ctrlProp1.xml': strToU8(`${HEAD}<formControlPr xmlns="${MS}/spreadsheetml/2009/9/main" objectType="CheckBox" lockText="1"/>`),
    'xl/pivotCache/pivotCacheDefinition1.xml': strToU8(`${HEAD}<pivotCacheDefinition xmlns="${MAIN}" refreshOnLoad="0" createdVersion="6" recordCount="0" saveData="0"><cacheSource type="worksheet"><worksheetSource ref="A3:E15" sheet="Results"/></cacheSource><cacheFields count="5">${['Sample', 'Volume', 'Factor', 'Tolerance', 'Result'].map(field).join('')}</cacheFields></pivotCacheDefinition>`),
    'xl/pivotTables/pivotTable1.xml': strToU8(`${HEAD}<pivotTableDefinition xmlns="${MAIN}" name="Pivot1" cacheId="1" dataCaption="Values"><location ref="A3:B6" firstHeaderRow="1" firstDataRow="1" firstDataCol="1"/><pivotFields count="5"><pivotField/><pivotField dataField="1"/><pivotField axis="axisRow"/><pivotField/><pivotField/></pivotFields></pivotTableDefinition>`),
    'xl/pivotTables/_rels/pivotTable1.xml.rels': relationships([['rId1', 'pivotCacheDefinition', '../pivotCache/pivotCacheDefinition1.xml']]),
    'xl/slicers/slicer1.xml': strToU8(`${HEAD}<slicers xmlns="${MS}/spreadsheetml/2009/9/main"><slicer name="Factor" cache="Slicer_Factor" caption="Factor" rowHeight="241300"/></slicers>`),
    'xl/slicerCaches/slicerCache1.xml': strToU8(`${HEAD}<slicerCacheDefinition xmlns="${MS}/spreadsheetml/2009/9/main" name="Slicer_Factor" sourceName="Factor"><pivotTables><pivotTable tabId="2" name="Pivot1"/></pivotTables><data><tabular pivotCacheId="1"/></data></slicerCacheDefinition>`),
    'customXml/item1.xml': strToU8('<lab xmlns="urn:invented"><note>kept</note></lab>'),
    'customXml/itemProps1.xml': strToU8(`${HEAD}<ds:datastoreItem xmlns:ds="http://schemas.openxmlformats.org/officeDocument/2006/customXml" ds:itemID="{6F2A0003-0000-0000-0000-000000000003}"/>`),
    'customXml/_rels/item1.xml.rels': relationships([['rId1', 'customXmlProps', 'itemProps1.xml']]),
    'xl/webextensions/taskpanes.xml': strToU8(`${HEAD}<wetp:taskpanes xmlns:wetp="${MS}/webextensions/taskpanes/2010/11"><wetp:taskpane dockstate="right" visibility="0" width="350" row="1"><wetp:webextensionref xmlns:r="${RELS}" r:id="rId1"/></wetp:taskpane></wetp:taskpanes>`),
    'xl/webextensions/_rels/taskpanes.xml.rels': relationships([['rId1', `${MS}/2011/relationships/webextension`, 'webextension1.xml']]),
    'xl/webextensions/webextension1.xml': strToU8(`${HEAD}<we:webextension xmlns:we="${MS}/webextensions/webextension/2010/11" id="{6F2A0004-0000-0000-0000-000000000004}"><we:reference id="x" version="1.0.0.0" store="developer" storeType="Registry"/></we:webextension>`),
    'docProps/custom.xml': strToU8(`${HEAD}<Properties xmlns="http://schemas.openxmlformats.org/officeDocument/2006/custom-properties" xmlns:vt="http://schemas.openxmlformats.org/officeDocument/2006/docPropsVTypes"><property fmtid="{D5CDD505-2E9C-101B-9397-08002B2CF9AE}" pid="2" name="Checked by"><vt:lpwstr>nobody</vt:lpwstr></property></Properties>`),
  },
});
