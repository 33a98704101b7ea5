import { average, readAt, sampleDeviation } from './readings';
import { seededDraws } from './seededDraws';
import type { SharedStrings } from './sharedStrings';
import { SheetWriter } from './SheetWriter';

export interface TitrantSpec {
  sheet: string;
  title: string;
  prepared: string;
  /** Name of the primary standard, and the doubt-free figures that belong to it. */
  standard: string;
  massBefore: number;
  massAfter: number;
  purity: number;
  molarMass: number;
  flaskVolume: number;
  aliquot: number;
  titrant: string;
  /** Concentration that the invented readings are drawn around, mmol/L. */
  nearConcentration: number;
  nearBlank: number;
  titrationDeviation: number;
  /** Reading step of the burette as a fraction of whole numbers, mL. */
  step: readonly [number, number];
  seed: number;
  equipment: { balance: string; purity: string; molarMass: string; flask: string; aliquot: string; burette: string };
  /** Name of the mean blank, as formulas write it. */
  blankName: string;
  /** Name of the molar mass of the standard. */
  molarMassName: string;
  extraConstant?: { label: string; symbol: string; value: number; equipment: string };
}

export interface Titrant { sheet: SheetWriter; concentration: number; blank: number }

/** The sheet that standardises a titrant against a weighed primary standard, with blank titrations. Rows are the same for every titrant. */
export function titrantSheet(spec: TitrantSpec, strings: SharedStrings): Titrant {
  const sheet = new SheetWriter(spec.sheet, strings, {
    widths: { A: 40, B: 14, C: 14, D: 14, E: 16, F: 3, G: 12, H: 12, I: 14, J: 12, K: 12, L: 12, M: 26, N: 12, O: 30 }, tabColor: 'FF5B8A99', showGridLines: false,
  });
  const draws = seededDraws(spec.seed);
  sheet.text('A1', spec.title, 'title');
  sheet.height(1, 26);
  sheet.text('A2', spec.prepared, 'note');

  sheet.merged('A4:E4', 'Primary standard solution', 'section');
  sheet.headings('A5', ['Quantity', 'Symbol', 'Value', 'Unit', 'Equipment'], 20);
  const { equipment } = spec;
  quantity(sheet, 6, `Vessel with ${spec.standard}`, 'm1', 'g', equipment.balance);
  sheet.number('C6', spec.massBefore, 'entry4');
  quantity(sheet, 7, 'Vessel after emptying', 'm2', 'g', equipment.balance);
  sheet.number('C7', spec.massAfter, 'entry4');
  quantity(sheet, 8, 'Mass taken', 'm', 'g', '');
  const mass = sheet.formula('C8', 'C6-C7', spec.massBefore - spec.massAfter, 'four');
  quantity(sheet, 9, 'Purity (mass fraction)', 'P', 'g/g', equipment.purity);
  sheet.number('C9', spec.purity, 'entryPercent');
  quantity(sheet, 10, `Molar mass of ${spec.standard}`, spec.molarMassName, 'g/mol', equipment.molarMass);
  sheet.number('C10', spec.molarMass, 'entry3');
  quantity(sheet, 11, 'Volume of the flask', 'Vf', 'mL', equipment.flask);
  sheet.number('C11', spec.flaskVolume, 'entry2');
  quantity(sheet, 12, 'Concentration of the standard', 'cs', 'mmol/L', '');
  const standard = sheet.formula('C12', `C8*C9/${spec.molarMassName}/C11*1000000`,
    (((mass * spec.purity) / spec.molarMass) / spec.flaskVolume) * 1_000_000, 'four');
  quantity(sheet, 13, 'Aliquot titrated', 'Va', 'mL', equipment.aliquot);
  sheet.number('C13', spec.aliquot, 'entry2');

  const [numerator, denominator] = spec.step;
  const near = (standard * spec.aliquot) / spec.nearConcentration + spec.nearBlank;
  sheet.merged('A15:E15', 'Standardisation titrations', 'section');
  const used = titrations(16, 5, near, spec.titrationDeviation);
  sheet.merged('A22:C22', 'Mean volume used, mL', 'label');
  const meanUsed = sheet.formula('D22', 'AVERAGE(D17:D21)', average(used), 'result3');
  sheet.blank('E22', 'label');
  sheet.merged('A23:C23', 'Standard deviation, mL', 'label');
  sheet.formula('D23', 'STDEV(D17:D21)', sampleDeviation(used), 'four');
  sheet.blank('E23', 'label');

  sheet.merged('A25:E25', 'Blank titrations', 'section');
  const blanks = titrations(26, 3, spec.nearBlank, (0.8 * numerator) / denominator);
  sheet.merged('A30:C30', 'Mean blank, mL', 'label');
  const blank = sheet.formula('D30', 'AVERAGE(D27:D29)', average(blanks), 'result3');
  sheet.blank('E30', 'label');

  sheet.merged('A32:E32', 'Result', 'section');
  quantity(sheet, 33, `Concentration of ${spec.titrant}`, 'c', 'mmol/L', '');
  const concentration = sheet.formula('C33', `C12*C13/(D22-${spec.blankName})`, (standard * spec.aliquot) / (meanUsed - blank), 'result4');
  if (spec.extraConstant !== undefined) {
    quantity(sheet, 34, spec.extraConstant.label, spec.extraConstant.symbol, 'g/mol', spec.extraConstant.equipment);
    sheet.number('C34', spec.extraConstant.value, 'entry3');
  }
  return { sheet, concentration, blank };

  function titrations(headRow: number, count: number, volume: number, deviation: number): number[] {
    sheet.headings(`A${headRow}`, ['Titration', 'Start, mL', 'End, mL', 'Used, mL', 'Equipment'], 20);
    const first = headRow + 1;
    const volumes = Array.from({ length: count }, (_, i) => {
      const row = first + i;
      const start = readAt(draws.uniform() * 0.3, numerator, denominator);
      const end = readAt(start + draws.normal(volume, deviation), numerator, denominator);
      sheet.number(`A${row}`, i + 1, 'center');
      sheet.number(`B${row}`, start, 'entry2');
      sheet.number(`C${row}`, end, 'entry2');
      sheet.text(`E${row}`, equipment.burette, 'center');
      return end - start;
    });
    sheet.fillDown('D', first, `C${first}-B${first}`, volumes, 'two');
    return volumes;
  }
}

/** The words of one row of quantities; its value in column C is written by the caller. */
export function quantity(sheet: SheetWriter, row: number, label: string, symbol: string, unit: string, equipment: string): void {
  sheet.text(`A${row}`, label, 'label');
  for (const [column, words] of [['B', symbol], ['D', unit], ['E', equipment]] as const) {
    if (words === '') sheet.blank(`${column}${row}`, 'label');
    else sheet.text(`${column}${row}`, words, 'center');
  }
}
