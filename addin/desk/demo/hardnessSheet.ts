import { highResultFormat } from './styles';
import { campaignStart, samples } from './samples';
import { seededDraws } from './seededDraws';
import type { SharedStrings } from './sharedStrings';
import { SheetWriter } from './SheetWriter';
import { element, textElement } from './xml';

export interface HardnessInputs { concentration: number; blank: number; molarMass: number }

export interface ResultColumn { ids: string[]; values: number[]; statuses: string[] }

const firstRow = 6;
const filled = 60;
/** Rows of the template: the last four wait for samples. */
const rows = 64;
const sampleVolume = 100;
const limit = 300;

/** Total hardness of about sixty samples; the formulas run on to the end of the half-filled template. */
export function hardnessSheet(inputs: HardnessInputs, strings: SharedStrings): { sheet: SheetWriter; results: ResultColumn } {
  const lastRow = firstRow + rows - 1;
  const sheet = new SheetWriter('Hardness', strings, {
    widths: { A: 11, B: 20, C: 12, D: 10, E: 10, F: 10, G: 10, H: 11, I: 13, J: 10, K: 13, L: 3, M: 13, N: 13, O: 13, P: 26, Q: 14 },
    frozenAt: 'B6',
    tabColor: 'FF17404F',
    landscape: true,
    conditionalFormats: [element('conditionalFormatting', { sqref: `I${firstRow}:I${lastRow}` },
      element('cfRule', { type: 'expression', dxfId: highResultFormat, priority: 1 }, textElement('formula', `AND(ISNUMBER(I${firstRow}),I${firstRow}>$D$3)`)))],
    dataValidations: [
      element('dataValidation', {
        type: 'list', allowBlank: 1, showInputMessage: 1, showErrorMessage: 1, sqref: `D${firstRow}:D${lastRow}`,
        promptTitle: 'Sample volume', prompt: 'Volume of the pipette in mL', errorTitle: 'Sample volume', error: 'Pipettes of 25, 50 and 100 mL are in use',
      }, textElement('formula1', '"25,50,100"')),
      element('dataValidation', {
        type: 'decimal', operator: 'between', allowBlank: 1, showErrorMessage: 1, sqref: `E${firstRow}:F${lastRow}`,
        errorTitle: 'Burette', error: 'The burette reads from 0 to 50 mL',
      }, textElement('formula1', '0') + textElement('formula2', '50')),
    ],
  });
  sheet.merged('A1:K1', 'Total hardness by EDTA titration', 'title');
  sheet.height(1, 26);
  sheet.merged('A2:K2', [
    { text: 'Drinking water, pH 10 buffer, visual end point. Burette BU-50-01, pipette PI-100-01. Results as CaCO' },
    { text: '3', sub: true }, { text: '; 1 mmol/L is 5.608 °dH.' },
  ], 'note');
  sheet.merged('A3:C3', 'Action limit, mg/L CaCO3', 'label');
  sheet.number('D3', limit, 'entry');
  sheet.merged('E3:G3', 'EDTA, mmol/L', 'label');
  sheet.formula('H3', 'EDTA_conc', inputs.concentration, 'four');
  sheet.text('I3', 'Blank, mL', 'label');
  sheet.formula('J3', 'Blank_vol', inputs.blank, 'three');
  sheet.merged('A4:C4', 'Sample', 'group');
  sheet.text('D4', 'Pipette', 'group');
  sheet.merged('E4:G4', 'Burette', 'group');
  sheet.merged('H4:J4', 'Total hardness', 'group');
  sheet.text('K4', 'Check', 'group');
  sheet.headings('A5', ['Sample', 'Taken at', 'Date', 'Volume, mL', 'Start, mL', 'End, mL', 'Used, mL', 'mmol/L', 'mg/L CaCO3', '°dH', 'Status']);

  const taken = samples(seededDraws(20250303), {
    prefix: 'DW-H', count: filled, firstDay: campaignStart, step: [2, 100],
    used: (point) => (point.hardness * sampleVolume) / inputs.concentration + inputs.blank,
  });
  for (let i = 0; i < rows; i += 1) {
    const row = firstRow + i;
    const sample = taken[i];
    if (sample === undefined) {
      sheet.blank(`A${row}`, 'entryText');
      sheet.blank(`B${row}`, 'entryText');
      sheet.blank(`C${row}`, 'date');
      sheet.blank(`D${row}`, 'entry');
      sheet.blank(`E${row}`, 'entry2');
      sheet.blank(`F${row}`, 'entry2');
      continue;
    }
    sheet.text(`A${row}`, sample.id, 'entryText');
    sheet.text(`B${row}`, sample.point, 'entryText');
    sheet.number(`C${row}`, sample.date, 'date');
    sheet.number(`D${row}`, sampleVolume, 'entry');
    sheet.number(`E${row}`, sample.start, 'entry2');
    sheet.number(`F${row}`, sample.end, 'entry2');
  }
  const used = taken.map((sample) => sample.end - sample.start);
  const molar = used.map((volume) => ((volume - inputs.blank) * inputs.concentration) / sampleVolume);
  const mass = molar.map((value) => value * inputs.molarMass);
  const statuses = mass.map((value) => (value > limit ? 'above limit' : 'ok'));
  const padded = <T>(values: readonly T[]): (T | string)[] => Array.from({ length: rows }, (_, i) => values[i] ?? '');
  sheet.fillDown('G', firstRow, 'IF(F6="","",F6-E6)', padded(used), 'two');
  sheet.fillDown('H', firstRow, 'IF(G6="","",(G6-Blank_vol)*EDTA_conc/D6)', padded(molar), 'three');
  sheet.fillDown('I', firstRow, 'IF(H6="","",H6*M_CaCO3)', padded(mass), 'one');
  sheet.fillDown('J', firstRow, 'IF(H6="","",H6*5.608)', padded(molar.map((value) => value * 5.608)), 'two');
  sheet.fillDown('K', firstRow, 'IF(I6="","",IF(I6>Limit,"above limit","ok"))', padded(statuses), 'center');
  return { sheet, results: { ids: taken.map((sample) => sample.id), values: mass, statuses } };
}
