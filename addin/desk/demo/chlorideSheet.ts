import { warningFormat } from './styles';
import { campaignStart, samples } from './samples';
import { seededDraws } from './seededDraws';
import type { SharedStrings } from './sharedStrings';
import { SheetWriter } from './SheetWriter';
import type { ResultColumn } from './hardnessSheet';
import { element, textElement, xmlPart } from './xml';

export interface ChlorideInputs { concentration: number; blank: number; molarMass: number }

const firstRow = 6;
const filled = 48;
/** Rows of the table: the last two wait for samples. */
const rows = 50;
const sampleVolume = 100;
const limit = 90;

const columns: readonly { name: string; formula?: string }[] = [
  { name: 'Sample' }, { name: 'Taken at' }, { name: 'Date' }, { name: 'Volume mL' }, { name: 'Start mL' }, { name: 'End mL' },
  { name: 'Net mL', formula: 'IF(ChlorideData[[#This Row],[End mL]]="","",ChlorideData[[#This Row],[End mL]]-ChlorideData[[#This Row],[Start mL]]-Blank_Cl)' },
  {
    name: 'Chloride mg/L',
    formula: 'IF(ChlorideData[[#This Row],[Net mL]]="","",ChlorideData[[#This Row],[Net mL]]*AgNO3_conc/ChlorideData[[#This Row],[Volume mL]]*M_Cl)',
  },
  { name: 'Status', formula: 'IF(ChlorideData[[#This Row],[Chloride mg/L]]="","",IF(ChlorideData[[#This Row],[Chloride mg/L]]>Limit,"watch","ok"))' },
];

/** Chloride by silver nitrate titration, kept as a table whose calculated columns use structured references. */
export function chlorideSheet(inputs: ChlorideInputs, strings: SharedStrings): { sheet: SheetWriter; results: ResultColumn; tablePart: string } {
  const lastRow = firstRow + rows - 1;
  const sheet = new SheetWriter('Chloride', strings, {
    widths: { A: 11, B: 20, C: 12, D: 11, E: 10, F: 10, G: 10, H: 14, I: 10, J: 3, K: 13, L: 12, M: 12, N: 10, O: 10, P: 10, Q: 26, R: 10, S: 30 },
    frozenAt: 'B6',
    tabColor: 'FF2F6F5E',
    landscape: true,
    conditionalFormats: [element('conditionalFormatting', { sqref: `I${firstRow}:I${lastRow}` },
      element('cfRule', { type: 'cellIs', dxfId: warningFormat, priority: 1, operator: 'equal' }, textElement('formula', '"watch"')))],
    dataValidations: [element('dataValidation', {
      type: 'decimal', operator: 'between', allowBlank: 1, showErrorMessage: 1, sqref: `E${firstRow}:F${lastRow}`,
      errorTitle: 'Burette', error: 'The burette reads from 0 to 25 mL',
    }, textElement('formula1', '0') + textElement('formula2', '25'))],
  });
  sheet.merged('A1:I1', 'Chloride by silver nitrate titration', 'title');
  sheet.height(1, 26);
  sheet.merged('A2:I2', 'Drinking water, chromate indicator. Burette BU-25-01, pipette PI-100-02. Blank subtracted.', 'note');
  sheet.merged('A3:C3', 'Watch level, mg/L', 'label');
  sheet.number('D3', limit, 'entry');
  sheet.merged('E3:F3', 'AgNO3, mmol/L', 'label');
  sheet.formula('G3', 'AgNO3_conc', inputs.concentration, 'four');
  sheet.text('H3', 'Blank, mL', 'label');
  sheet.formula('I3', 'Blank_Cl', inputs.blank, 'three');
  sheet.headings('A5', columns.map((column) => column.name));

  const taken = samples(seededDraws(20250310), {
    prefix: 'DW-C', count: filled, firstDay: campaignStart, step: [5, 100],
    used: (point) => ((point.chloride / inputs.molarMass) * sampleVolume) / inputs.concentration + inputs.blank,
  });
  const results: ResultColumn = { ids: [], values: [], statuses: [] };
  for (let i = 0; i < rows; i += 1) {
    const row = firstRow + i;
    const sample = taken[i];
    if (sample === undefined) {
      sheet.blank(`A${row}`, 'entryText');
      sheet.blank(`B${row}`, 'entryText');
      sheet.blank(`C${row}`, 'date');
      for (const letter of ['D', 'E', 'F']) sheet.blank(`${letter}${row}`, letter === 'D' ? 'entry' : 'entry2');
      calculated(row, '', '', '');
      continue;
    }
    sheet.text(`A${row}`, sample.id, 'entryText');
    sheet.text(`B${row}`, sample.point, 'entryText');
    sheet.number(`C${row}`, sample.date, 'date');
    sheet.number(`D${row}`, sampleVolume, 'entry');
    sheet.number(`E${row}`, sample.start, 'entry2');
    sheet.number(`F${row}`, sample.end, 'entry2');
    const net = sample.end - sample.start - inputs.blank;
    const chloride = ((net * inputs.concentration) / sampleVolume) * inputs.molarMass;
    const status = chloride > limit ? 'watch' : 'ok';
    calculated(row, net, chloride, status);
    results.ids.push(sample.id);
    results.values.push(chloride);
    results.statuses.push(status);
  }
  return { sheet, results, tablePart: tableXml(`A${firstRow - 1}:I${lastRow}`) };

  function calculated(row: number, net: number | '', chloride: number | '', status: string): void {
    sheet.formula(`G${row}`, columns[6].formula!, net, 'three');
    sheet.formula(`H${row}`, columns[7].formula!, chloride, 'one');
    sheet.formula(`I${row}`, columns[8].formula!, status, 'center');
  }
}

function tableXml(ref: string): string {
  return xmlPart(element('table', {
    xmlns: 'http://schemas.openxmlformats.org/spreadsheetml/2006/main',
    id: 1, name: 'ChlorideData', displayName: 'ChlorideData', ref, totalsRowShown: 0,
  }, element('autoFilter', { ref })
    + element('tableColumns', { count: columns.length }, columns.map((column, i) => element('tableColumn', { id: i + 1, name: column.name },
      column.formula === undefined ? '' : textElement('calculatedColumnFormula', column.formula))).join(''))
    + element('tableStyleInfo', { name: 'TableStyleLight9', showFirstColumn: 0, showLastColumn: 0, showRowStripes: 1, showColumnStripes: 0 })));
}
