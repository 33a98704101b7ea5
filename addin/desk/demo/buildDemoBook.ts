import { strToU8, zipSync } from 'fflate';
import { chartPart, drawingPart } from './chartPart';
import { chlorideSheet } from './chlorideSheet';
import { equipmentSheet } from './equipmentSheet';
import { hardnessSheet } from './hardnessSheet';
import { noteBoxesPart, notesPart } from './notesParts';
import type { Note } from './notesParts';
import { overviewSheet } from './overviewSheet';
import { appPropertiesPart, calcChainPart, contentTypesPart, corePropertiesPart, relationsPart, themePart, workbookPart } from './packageParts';
import type { Relation } from './packageParts';
import { pipetteSheet } from './pipetteSheet';
import { sharedStrings } from './sharedStrings';
import { stylesPart } from './styles';
import type { SheetLinks } from './SheetWriter';
import { tablesSheet } from './tablesSheet';
import { titrantSheet } from './titrantSheet';

const calciumCarbonate = 100.086;
const sodiumChloride = 58.44;
const chlorideMass = 35.45;

/**
 * The workbook of an invented drinking-water laboratory, as bytes of an .xlsx: hardness and chloride titrations, standardised titrants,
 * a pipette check, and the evidence of the equipment. It holds native formulas only, each with its stored value.
 * Every build gives the same bytes: readings come from a seeded generator, times are fixed.
 */
export function buildDemoBook(): Uint8Array {
  const strings = sharedStrings();
  const edta = titrantSheet({
    sheet: 'Titrant', title: 'EDTA titrant', prepared: 'Standardised against calcium carbonate on 2025-03-03. Burette BU-50-01.',
    standard: 'CaCO3', massBefore: 21.4837, massAfter: 20.4821, purity: 0.99975, molarMass: calciumCarbonate, flaskVolume: 1000, aliquot: 25,
    titrant: 'EDTA', nearConcentration: 10.04, nearBlank: 0.07, titrationDeviation: 0.028, step: [2, 100], seed: 31,
    equipment: { balance: 'BAL-02', purity: 'RM-CACO3', molarMass: 'AW-CA', flask: 'FL-1000-01', aliquot: 'PI-25-01', burette: 'BU-50-01' },
    blankName: 'Blank_vol', molarMassName: 'M_CaCO3',
  }, strings);
  const silver = titrantSheet({
    sheet: 'Silver titrant', title: 'Silver nitrate titrant', prepared: 'Standardised against sodium chloride on 2025-03-03. Burette BU-25-01.',
    standard: 'NaCl', massBefore: 19.8264, massAfter: 18.6551, purity: 0.9995, molarMass: sodiumChloride, flaskVolume: 1000, aliquot: 20,
    titrant: 'AgNO3', nearConcentration: 20.12, nearBlank: 0.14, titrationDeviation: 0.045, step: [5, 100], seed: 81,
    equipment: { balance: 'BAL-02', purity: 'RM-NACL', molarMass: 'AW-CL', flask: 'FL-1000-02', aliquot: 'PI-20-01', burette: 'BU-25-01' },
    blankName: 'Blank_Cl', molarMassName: 'M_NaCl',
    extraConstant: { label: 'Molar mass of chloride', symbol: 'M_Cl', value: chlorideMass, equipment: 'AW-CL' },
  }, strings);
  const hardness = hardnessSheet({ concentration: edta.concentration, blank: edta.blank, molarMass: calciumCarbonate }, strings);
  const chloride = chlorideSheet({ concentration: silver.concentration, blank: silver.blank, molarMass: chlorideMass }, strings);
  const tables = tablesSheet(strings);
  const sheets = [
    overviewSheet(hardness.results, chloride.results, strings), hardness.sheet, chloride.sheet, edta.sheet, silver.sheet,
    pipetteSheet(tables, strings), equipmentSheet(strings), tables.sheet,
  ];
  const names = sheets.map((sheet) => sheet.name);
  const place = (name: string): number => names.indexOf(name);

  const notes: Note[] = [
    { address: 'F5', column: 5, row: 4, text: 'Read the lower edge of the meniscus to 0.02 mL. Refill before a titration that would pass 50 mL.' },
    { address: 'I5', column: 8, row: 4, text: 'Reported to the waterworks with one decimal. Above the action limit: repeat in duplicate.' },
  ];
  const links = new Map<string, { sheet: SheetLinks; relations: Relation[] }>([
    ['Overview', { sheet: { drawing: 'rId1' }, relations: [{ id: 'rId1', type: 'drawing', target: '../drawings/drawing1.xml' }] }],
    ['Hardness', {
      sheet: { notes: 'rId1' },
      relations: [
        { id: 'rId1', type: 'vmlDrawing', target: '../drawings/vmlDrawing1.vml' },
        { id: 'rId2', type: 'comments', target: '../comments1.xml' },
      ],
    }],
    ['Chloride', { sheet: { table: 'rId1' }, relations: [{ id: 'rId1', type: 'table', target: '../tables/table1.xml' }] }],
  ]);

  const parts = new Map<string, string>();
  sheets.forEach((sheet, i) => {
    const link = links.get(sheet.name);
    parts.set(`xl/worksheets/sheet${i + 1}.xml`, sheet.part(link?.sheet ?? {}, i === 0));
    if (link !== undefined) parts.set(`xl/worksheets/_rels/sheet${i + 1}.xml.rels`, relationsPart(link.relations));
  });
  parts.set('xl/workbook.xml', workbookPart(names, [
    { name: 'EDTA_conc', refersTo: 'Titrant!$C$33' },
    { name: 'Blank_vol', refersTo: 'Titrant!$D$30' },
    { name: 'M_CaCO3', refersTo: 'Titrant!$C$10' },
    { name: 'AgNO3_conc', refersTo: "'Silver titrant'!$C$33" },
    { name: 'Blank_Cl', refersTo: "'Silver titrant'!$D$30" },
    { name: 'M_NaCl', refersTo: "'Silver titrant'!$C$10" },
    { name: 'M_Cl', refersTo: "'Silver titrant'!$C$34" },
    { name: 'Limit', refersTo: 'Hardness!$D$3', sheet: place('Hardness') },
    { name: 'Limit', refersTo: 'Chloride!$D$3', sheet: place('Chloride') },
    { name: '_xlnm.Print_Titles', refersTo: 'Hardness!$4:$5', sheet: place('Hardness') },
    { name: '_xlnm.Print_Titles', refersTo: 'Chloride!$5:$5', sheet: place('Chloride') },
  ]));
  parts.set('xl/_rels/workbook.xml.rels', relationsPart([
    ...sheets.map((_, i) => ({ id: `rId${i + 1}`, type: 'worksheet', target: `worksheets/sheet${i + 1}.xml` })),
    ...(['theme', 'styles', 'sharedStrings', 'calcChain'] as const).map((type, i) => ({
      id: `rId${sheets.length + 1 + i}`, type, target: type === 'theme' ? 'theme/theme1.xml' : `${type}.xml`,
    })),
  ]));
  parts.set('xl/theme/theme1.xml', themePart());
  parts.set('xl/styles.xml', stylesPart());
  parts.set('xl/sharedStrings.xml', strings.part());
  parts.set('xl/calcChain.xml', calcChainPart(sheets.map((sheet) => sheet.formulaAddresses)));
  parts.set('xl/comments1.xml', notesPart(notes));
  parts.set('xl/drawings/vmlDrawing1.vml', noteBoxesPart(notes));
  parts.set('xl/tables/table1.xml', chloride.tablePart);
  parts.set('xl/drawings/drawing1.xml', drawingPart([
    { relation: 'rId1', name: 'Hardness by sample', from: [0, 7], to: [7, 25] },
    { relation: 'rId2', name: 'Chloride by sample', from: [7, 7], to: [13, 25] },
  ]));
  parts.set('xl/drawings/_rels/drawing1.xml.rels', relationsPart([1, 2].map((n) => ({ id: `rId${n}`, type: 'chart', target: `../charts/chart${n}.xml` }))));
  parts.set('xl/charts/chart1.xml', chartPart({
    kind: 'bar', title: 'Total hardness by sample', valueTitle: 'mg/L CaCO3', color: '2B6C85',
    series: {
      name: 'Hardness!$I$5', nameText: 'mg/L CaCO3', labels: 'Hardness!$A$6:$A$65', labelTexts: hardness.results.ids,
      values: 'Hardness!$I$6:$I$65', valueNumbers: hardness.results.values,
    },
  }));
  parts.set('xl/charts/chart2.xml', chartPart({
    kind: 'marker', title: 'Chloride by sample', valueTitle: 'mg/L', color: '2F6F5E',
    series: {
      name: 'Chloride!$H$5', nameText: 'Chloride mg/L', labels: 'Chloride!$A$6:$A$53', labelTexts: chloride.results.ids,
      values: 'Chloride!$H$6:$H$53', valueNumbers: chloride.results.values,
    },
  }));
  parts.set('docProps/core.xml', corePropertiesPart());
  parts.set('docProps/app.xml', appPropertiesPart(names));
  return pack(parts);
}

function pack(parts: ReadonlyMap<string, string>): Uint8Array {
  const files: Record<string, Uint8Array> = {
    '[Content_Types].xml': strToU8(contentTypesPart([...parts.keys()])),
    '_rels/.rels': strToU8(relationsPart([
      { id: 'rId1', type: 'officeDocument', target: 'xl/workbook.xml' },
      { id: 'rId2', type: 'http://schemas.openxmlformats.org/package/2006/relationships/metadata/core-properties', target: 'docProps/core.xml' },
      { id: 'rId3', type: 'extended-properties', target: 'docProps/app.xml' },
    ])),
  };
  for (const [name, text] of parts) files[name] = strToU8(text);
  // The archive stores local time without a zone, and this date is made from local parts: the same bytes everywhere.
  return zipSync(files, { level: 6, mtime: new Date(2025, 2, 31, 12, 0, 0) });
}
